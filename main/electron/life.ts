import { app, BrowserWindow } from 'electron'
import { resolve } from 'node:path'

type Open = (path?: string) => unknown

/**
 * Follows what the system asks of the program: files to open, windows again, the end with the last window.
 * Must run before the program is ready, because a file may be handed over that early.
 *
 * @param files  plan files of the command line
 * @returns      what opens the first windows, once the program is ready
 */
export function followLife(files: readonly string[]): (open: Open) => void {
  const waiting = [...files]
  let opening: Open | null = null
  app.on('open-file', (event, path) => {
    event.preventDefault()
    if (opening === null) waiting.push(resolve(path))
    else opening(resolve(path))
  })
  app.on('activate', () => {
    if (BrowserWindow.getAllWindows().length === 0) opening?.()
  })
  app.on('window-all-closed', () => {
    if (process.platform !== 'darwin') app.quit()
  })
  return (open) => {
    opening = open
    if (waiting.length === 0) open()
    for (const path of waiting.splice(0)) open(path)
  }
}
