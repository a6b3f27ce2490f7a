import { app, Menu, type BaseWindow, BrowserWindow, type MenuItemConstructorOptions } from 'electron'

export interface MenuDoors {
  newWindow(path?: string): void
  recent: readonly string[]
}

/** Builds the menu in the program's own words. Items of the page are its own shortcuts: the menu presses the keys. */
export function setMenu(doors: MenuDoors): void {
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(doors)))
}

function menuTemplate(doors: MenuDoors): MenuItemConstructorOptions[] {
  const mac: MenuItemConstructorOptions[] = process.platform === 'darwin' ? [{ role: 'appMenu' }] : []
  return [...mac, planMenu(doors), editMenu(), viewMenu(), { role: 'windowMenu' }, helpMenu()]
}

function planMenu(doors: MenuDoors): MenuItemConstructorOptions {
  const recent = doors.recent.map((path): MenuItemConstructorOptions => ({ label: path, click: () => doors.newWindow(path) }))
  return {
    label: 'Plan',
    submenu: [
      { label: 'New window', accelerator: 'CmdOrCtrl+N', click: () => doors.newWindow() },
      key('Open …', 'O'),
      { label: 'Open recent', enabled: recent.length > 0, submenu: recent },
      { type: 'separator' },
      key('Save', 'S'),
      key('Save as …', 'S', ['shift']),
      { type: 'separator' },
      key('Export sheet …', 'E'),
      { type: 'separator' },
      { role: process.platform === 'darwin' ? 'close' : 'quit' },
    ],
  }
}

function editMenu(): MenuItemConstructorOptions {
  return {
    label: 'Edit',
    submenu: [
      key('Undo', 'Z'), key('Redo', 'Z', ['shift']), { type: 'separator' },
      { role: 'cut' }, { role: 'copy' }, { role: 'paste' }, { role: 'selectAll' },
    ],
  }
}

function viewMenu(): MenuItemConstructorOptions {
  const tools: MenuItemConstructorOptions[] = app.isPackaged ? [] : [{ type: 'separator' }, { role: 'toggleDevTools' }]
  return {
    label: 'View',
    submenu: [{ role: 'resetZoom' }, { role: 'zoomIn' }, { role: 'zoomOut' }, { type: 'separator' }, { role: 'togglefullscreen' }, ...tools],
  }
}

function helpMenu(): MenuItemConstructorOptions {
  const keys: MenuItemConstructorOptions = { label: 'Keyboard shortcuts', click: (_item, window) => press(window, 'F1', []) }
  return { role: 'help', submenu: [keys, { label: `About ${app.name}`, click: () => app.showAboutPanel() }] }
}

type Modifier = 'shift'

/** An item that stands for a shortcut of the page: shown with its keys, and pressing them when it is chosen. */
function key(label: string, letter: string, more: Modifier[] = []): MenuItemConstructorOptions {
  const modifiers = [process.platform === 'darwin' ? 'meta' as const : 'control' as const, ...more]
  return {
    label, accelerator: ['CmdOrCtrl', ...more.map(() => 'Shift'), letter].join('+'), registerAccelerator: false,
    click: (_item, window) => press(window, letter, modifiers),
  }
}

function press(window: BaseWindow | undefined, keyCode: string, modifiers: ('meta' | 'control' | Modifier)[]): void {
  if (!(window instanceof BrowserWindow)) return
  window.webContents.sendInputEvent({ type: 'keyDown', keyCode, modifiers })
  window.webContents.sendInputEvent({ type: 'keyUp', keyCode, modifiers })
}
