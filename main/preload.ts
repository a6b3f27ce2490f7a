import { contextBridge, ipcRenderer } from 'electron'
import { channels } from './contract/channels'

contextBridge.exposeInMainWorld('latchwright', Object.fromEntries(
  Object.keys(channels).map((name) => [name, (request: unknown) => ipcRenderer.invoke(name, request)]),
))
