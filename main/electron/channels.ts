import { BrowserWindow, ipcMain, type IpcMainInvokeEvent } from 'electron'
import { channels, type ChannelName } from '../contract/channels'
import { fail, type Reply } from '../contract/errors'
import { isWindowAddress } from './window-files'

/** What answers a channel for one window. */
export type WindowAnswer = (name: ChannelName, request: unknown, window: BrowserWindow) => Promise<Reply<unknown>>

/** Listens on every channel of the contract, for the top frame of the program's own windows only. */
export function listenOnChannels(answer: WindowAnswer): void {
  for (const name of Object.keys(channels) as ChannelName[]) {
    ipcMain.handle(name, async (event, request: unknown) => {
      const window = senderWindow(event)
      return window === null ? fail('refused', 'Only the window of this program is answered.') : answer(name, request, window)
    })
  }
}

function senderWindow(event: IpcMainInvokeEvent): BrowserWindow | null {
  const frame = event.senderFrame
  if (frame === null || frame !== event.sender.mainFrame || !isWindowAddress(frame.url)) return null
  return BrowserWindow.fromWebContents(event.sender)
}
