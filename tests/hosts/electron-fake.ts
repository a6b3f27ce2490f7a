import { EventEmitter } from 'node:events'
import { mkdtempSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

type Listener = (event: FakeEvent, ...rest: unknown[]) => unknown
export interface FakeEvent { sender: unknown; senderFrame: unknown }
export const home = process.env['LATCHWRIGHT_TEST_HOME'] ?? mkdtempSync(join(tmpdir(), 'latchwright-desktop-'))

/** What the shell did with Electron, for tests to look at. */
export const seen = {
  handlers: new Map<string, Listener>(),
  schemes: [] as { scheme: string; privileges: object }[],
  pages: new Map<string, (request: Request) => Promise<Response>>(),
  windows: [] as FakeWindow[],
  permissionRequest: undefined as undefined | ((contents: unknown, permission: string, decide: (allow: boolean) => void) => void),
  permissionCheck: undefined as undefined | ((contents: unknown, permission: string) => boolean),
  devicePermission: undefined as undefined | (() => boolean),
  download: undefined as undefined | ((event: { preventDefault: () => void }) => void),
  beforeRequest: undefined as undefined | ((details: { url: string }, decide: (answer: { cancel: boolean }) => void) => void),
  menu: [] as MenuItem[],
  openAnswer: { canceled: true, filePaths: [] as string[] },
  saveAnswer: { canceled: true, filePath: '' },
  saveOptions: [] as { defaultPath?: string }[],
  boxAnswer: { response: 0 },
  boxes: [] as { message: string; buttons: string[] }[],
  aboutPanel: {},
  quits: 0,
  exits: [] as number[],
  exposed: new Map<string, Record<string, (request: unknown) => unknown>>(),
  invoked: [] as unknown[][],
}

export interface MenuItem { label?: string; role?: string; submenu?: MenuItem[]; enabled?: boolean; click?: (item: unknown, window: unknown) => void }

export class FakeContents extends EventEmitter {
  windowOpen: (() => { action: string }) | undefined
  keys: object[] = []
  webrtc = ''
  mainFrame = { url: 'latchwright://window/index.html' }
  constructor(readonly id: number) { super() }
  setWindowOpenHandler(handler: () => { action: string }) { this.windowOpen = handler }
  setWebRTCIPHandlingPolicy(policy: string) { this.webrtc = policy }
  sendInputEvent(event: object) { this.keys.push(event) }
  getURL() { return this.mainFrame.url }
}

export class FakeWindow extends EventEmitter {
  static fromWebContents(contents: FakeContents) { return seen.windows.find((window) => window.webContents === contents) ?? null }
  static getAllWindows() { return seen.windows.filter((window) => !window.destroyed) }
  readonly id = seen.windows.length + 1
  readonly webContents = new FakeContents(seen.windows.length + 101)
  readonly state = { title: '', edited: false, shown: false, url: '', file: '' }
  destroyed = false
  constructor(readonly options: { webPreferences: Record<string, unknown> }) {
    super()
    seen.windows.push(this)
    app.emit('web-contents-created', {}, this.webContents)
  }
  reloads = 0
  reload() { this.reloads += 1 }
  isDestroyed() { return this.destroyed }
  show() { this.state.shown = true }
  async loadURL(url: string) { this.state.url = url }
  setTitle(title: string) { this.state.title = title }
  setDocumentEdited(edited: boolean) { this.state.edited = edited }
  setRepresentedFilename(file: string) { this.state.file = file }
  /** As a person would: asks first, and goes when nobody objects. */
  close() {
    let prevented = false
    this.emit('close', { preventDefault: () => { prevented = true } })
    if (!prevented) this.destroy()
  }
  destroy() {
    if (this.destroyed) return
    this.destroyed = true
    this.emit('closed')
  }
}

export const app = Object.assign(new EventEmitter(), {
  name: 'latchwright', isPackaged: false,
  whenReady: async () => undefined,
  getPath: () => home,
  getVersion: () => '0.0.0',
  disableHardwareAcceleration: () => undefined,
  setName: (name: string) => { app.name = name },
  addRecentDocument: () => undefined,
  setAboutPanelOptions: (options: object) => { seen.aboutPanel = options },
  showAboutPanel: () => undefined,
  quit: () => { seen.quits += 1 },
  exit: (code: number) => { seen.exits.push(code) },
})
export const BrowserWindow = FakeWindow
export const ipcMain = { handle: (name: string, listener: Listener) => { seen.handlers.set(name, listener) } }
export const protocol = {
  registerSchemesAsPrivileged: (schemes: typeof seen.schemes) => { seen.schemes.push(...schemes) },
  handle: (scheme: string, answer: (request: Request) => Promise<Response>) => { seen.pages.set(scheme, answer) },
}
export const session = {
  defaultSession: {
    setPermissionRequestHandler: (handler: typeof seen.permissionRequest) => { seen.permissionRequest = handler },
    setPermissionCheckHandler: (handler: typeof seen.permissionCheck) => { seen.permissionCheck = handler },
    setDevicePermissionHandler: (handler: typeof seen.devicePermission) => { seen.devicePermission = handler },
    on: (_name: 'will-download', listener: typeof seen.download) => { seen.download = listener },
    webRequest: { onBeforeRequest: (handler: typeof seen.beforeRequest) => { seen.beforeRequest = handler } },
  },
}
export const dialog = {
  showOpenDialog: async () => seen.openAnswer,
  showSaveDialog: async (_window: unknown, options: { defaultPath?: string }) => {
    seen.saveOptions.push(options)
    return seen.saveAnswer
  },
  showMessageBox: async (_window: unknown, options: (typeof seen.boxes)[number]) => {
    seen.boxes.push(options)
    return seen.boxAnswer
  },
}
export const Menu = {
  buildFromTemplate: (items: MenuItem[]) => items,
  setApplicationMenu: (items: MenuItem[]) => { seen.menu = items },
}
export const contextBridge = {
  exposeInMainWorld: (name: string, doors: Record<string, (request: unknown) => unknown>) => { seen.exposed.set(name, doors) },
}
export const ipcRenderer = {
  invoke: async (...given: unknown[]) => {
    seen.invoked.push(given)
    return { ok: true, value: given }
  },
}

/** Calls a channel as a frame would; by default as the top frame of the window. */
export async function callFrom(
  window: FakeWindow, name: string, request: unknown, senderFrame: unknown = window.webContents.mainFrame,
): Promise<unknown> {
  return seen.handlers.get(name)?.({ sender: window.webContents, senderFrame }, request)
}
