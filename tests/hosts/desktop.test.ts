import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { beforeEach, describe, expect, test, vi } from 'vitest'
import { channels } from '../../main/contract/channels'
import { restartProgram, startProgram } from './desktop-program'
import type * as Fake from './electron-fake'

type Program = typeof Fake
let program: Program
beforeEach(async () => { program = await startProgram() })

const first = () => program.seen.windows[0]
const refused = { ok: false, error: { code: 'refused' } }
const prevented = (contents: Fake.FakeContents, event: string) => {
  let stopped = false
  contents.emit(event, { preventDefault: () => { stopped = true } }, 'https://example.org/')
  return stopped
}

describe('a window', () => {
  test('is kept apart from Node', () => {
    expect(first().options.webPreferences).toMatchObject({
      contextIsolation: true, sandbox: true, nodeIntegration: false, webSecurity: true, webviewTag: false, nodeIntegrationInSubFrames: false,
    })
    expect(first().options.webPreferences.preload).toMatch(/preload[\\/]preload\.cjs$/)
  })

  test('loads its own page, and shows when it is ready', () => {
    expect(first().state.url).toBe('latchwright://window/index.html')
    expect(first().state.shown).toBe(false)
    first().emit('ready-to-show')
    expect(first().state.shown).toBe(true)
  })

  test('comes back after its page died', async () => {
    first().webContents.emit('render-process-gone', {}, { reason: 'clean-exit' })
    first().webContents.emit('render-process-gone', {}, { reason: 'oom' })
    await vi.waitFor(() => expect(first().reloads).toBe(1))
    expect(program.seen.boxes.map((box) => box.buttons)).toEqual([['Load again']])
  })

  test('names the program, and what has to be known about its numbers', () => {
    expect(program.app.name).toBe('Latchwright')
    expect(JSON.stringify(program.seen.aboutPanel)).toContain('Planning estimates, not sign-off')
  })

  test('goes nowhere else', () => {
    const { webContents } = first()
    expect(webContents.windowOpen?.()).toEqual({ action: 'deny' })
    expect(webContents.webrtc).toBe('disable_non_proxied_udp')
    const download = { prevented: false, preventDefault: () => { download.prevented = true } }
    program.seen.download?.(download)
    expect(download.prevented).toBe(true)
    for (const event of ['will-navigate', 'will-redirect', 'will-frame-navigate', 'will-attach-webview']) {
      expect([event, prevented(webContents, event)]).toEqual([event, true])
    }
  })

  test('loads nothing from a network', () => {
    const isCancelled = (url: string) => {
      let answer = { cancel: false }
      program.seen.beforeRequest?.({ url }, (given) => { answer = given })
      return answer.cancel
    }
    expect(['https://example.org/', 'http://127.0.0.1/', 'file:///etc/passwd', 'ws://example.org', 'latchwright://other/x'].map(isCancelled)).toEqual(Array(5).fill(true))
    expect(['latchwright://window/assets/main.js', 'data:image/png;base64,', 'blob:latchwright://window/1'].map(isCancelled)).toEqual([false, false, false])
  })

  test('may write to the clipboard and nothing more', () => {
    const asked = (permission: string, contents: Fake.FakeContents) => {
      let allowed = false
      program.seen.permissionRequest?.(contents, permission, (answer) => { allowed = answer })
      expect(program.seen.permissionCheck?.(contents, permission)).toBe(allowed)
      return allowed
    }
    const { webContents } = first()
    expect(['media', 'geolocation', 'notifications', 'clipboard-read', 'openExternal', 'usb', 'fileSystem'].some((name) => asked(name, webContents))).toBe(false)
    expect(asked('clipboard-sanitized-write', webContents)).toBe(true)
    webContents.mainFrame.url = 'https://example.org/'
    expect(asked('clipboard-sanitized-write', webContents)).toBe(false)
    expect(program.seen.permissionCheck?.(null, 'clipboard-sanitized-write')).toBe(false)
    expect(program.seen.devicePermission?.()).toBe(false)
  })
})

describe('the page', () => {
  const fetchPage = (address: string, method = 'GET') => program.seen.pages.get('latchwright')?.(new Request(address, { method }))

  test('comes from a secure origin of its own', () => {
    expect(program.seen.schemes).toEqual([{ scheme: 'latchwright', privileges: { standard: true, secure: true, supportFetchAPI: true } }])
  })

  test('has the same strict headers as in the browser host', async () => {
    const { contentPolicy } = await import('../../main/usecases/window-policy')
    const answer = await fetchPage('latchwright://window/index.html')
    expect(answer?.status).toBe(200)
    expect(answer?.headers.get('content-security-policy')).toBe(contentPolicy)
    expect(answer?.headers.get('x-content-type-options')).toBe('nosniff')
    expect(await answer?.text()).toContain('Latchwright')
  })

  test.each(['latchwright://window/..%2fsecret.txt', 'latchwright://window/nothing.js', 'latchwright://other/index.html'])('nothing at %s', async (address) => {
    expect((await fetchPage(address))?.status).toBe(404)
  })
})

describe('a channel', () => {
  test('is there for every entry of the contract', () => {
    expect([...program.seen.handlers.keys()].sort()).toEqual(Object.keys(channels).sort())
  })

  test('answers the window', async () => {
    expect(await program.callFrom(first(), 'about', {})).toMatchObject({ ok: true, value: { host: 'desktop' } })
    expect(await program.callFrom(first(), 'window.dirty', { dirty: 'yes' })).toMatchObject({ ok: false, error: { code: 'bad_request' } })
  })

  test('answers no other sender', async () => {
    const strangers = [null, { url: 'https://example.org/' }, { url: 'latchwright://window/index.html' }, { url: 'file:///index.html' }]
    for (const name of Object.keys(channels)) {
      for (const stranger of strangers) expect(await program.callFrom(first(), name, {}, stranger)).toMatchObject(refused)
    }
    first().webContents.mainFrame.url = 'https://example.org/#latchwright://window/'
    expect(await program.callFrom(first(), 'about', {})).toMatchObject(refused)
  })

  test('reaches the page by the preload, name by name', async () => {
    await import('../../main/preload')
    const doors = program.seen.exposed.get('latchwright') ?? {}
    expect(Object.keys(doors).sort()).toEqual(Object.keys(channels).sort())
    await doors['plan.run']({ revision: 1 })
    expect(program.seen.invoked).toEqual([['plan.run', { revision: 1 }]])
  })
})

describe('unsaved changes', () => {
  const mark = (dirty: boolean, title = 'My plan') => program.callFrom(first(), 'window.dirty', { dirty, title })
  const settle = () => new Promise((resolve) => setTimeout(resolve, 20))

  test('show in the title', async () => {
    await mark(true)
    expect(first().state).toMatchObject({ title: '• My plan — Latchwright', edited: true })
    await mark(false)
    expect(first().state).toMatchObject({ title: 'My plan — Latchwright', edited: false })
    await mark(false, '')
    expect(first().state.title).toBe('Latchwright')
  })

  test('are asked about before the window goes; keeping them keeps it', async () => {
    await mark(true)
    first().close()
    first().close()
    await settle()
    expect(program.seen.boxes).toHaveLength(1)
    expect(program.seen.boxes[0].buttons).toEqual(['Keep editing', 'Discard changes'])
    expect(first().destroyed).toBe(false)
  })

  test('go when the person says so, and so does what was kept of them', async () => {
    await mark(true)
    await program.callFrom(first(), 'recovery.keep', { text: 'half a plan' })
    program.seen.boxAnswer = { response: 1 }
    first().close()
    await settle()
    expect(first().destroyed).toBe(true)
    expect(program.seen.quits).toBe(0)
    const other = await restartProgram(program)
    expect(await other.callFrom(other.seen.windows[0], 'recovery.read', {})).toEqual({ ok: true, value: { text: null } })
  })

  test('stop the program from quitting, which goes on after they are discarded', async () => {
    await mark(true)
    program.seen.boxAnswer = { response: 1 }
    program.app.emit('before-quit')
    first().close()
    await settle()
    expect(program.seen.quits).toBe(1)
  })

  test('are none: the window just goes', () => {
    first().close()
    expect([first().destroyed, program.seen.boxes.length]).toEqual([true, 0])
  })
})

describe('the menu', () => {
  const find = (label: string, items = program.seen.menu): Fake.MenuItem | undefined =>
    items.flatMap((item) => [item, ...(item.submenu ?? [])]).find((item) => item.label === label)

  test('presses the keys of the page', () => {
    find('Save as …')?.click?.({}, first())
    const control = process.platform === 'darwin' ? 'meta' : 'control'
    expect(first().webContents.keys).toEqual(['keyDown', 'keyUp'].map((type) => ({ type, keyCode: 'S', modifiers: [control, 'shift'] })))
  })

  test('opens more windows', () => {
    find('New window')?.click?.({}, undefined)
    expect(program.seen.windows).toHaveLength(2)
  })

  test('offers the recent plans, each for a window of its own', async () => {
    const path = join(program.home, 'recent.bank.json')
    await writeFile(path, '{}')
    program.seen.openAnswer = { canceled: false, filePaths: [path] }
    await program.callFrom(first(), 'files.open', { path: null })
    program.app.emit('browser-window-focus')
    await vi.waitFor(() => expect(find('Open recent')?.submenu).toHaveLength(1))
    find('Open recent')?.submenu?.[0].click?.({}, undefined)
    expect(program.seen.windows[1].state.url).toContain(encodeURIComponent(path))
  })

  test('has developer tools only outside a package', async () => {
    const { setMenu } = await import('../../main/electron/menu')
    const roles = () => program.seen.menu.flatMap((item) => item.submenu ?? []).map((item) => item.role)
    expect(roles()).toContain('toggleDevTools')
    program.app.isPackaged = true
    setMenu({ newWindow: () => undefined, recent: [] })
    expect(roles()).not.toContain('toggleDevTools')
    const { openWindow } = await import('../../main/electron/windows')
    openWindow({ prepare: () => undefined })
    expect(program.seen.windows.at(-1)?.options.webPreferences.devTools).toBe(false)
  })
})

describe('the command line', () => {
  test('opens a plan file, which the window may then read', async () => {
    const path = join(program.home, 'given.bank.json')
    await writeFile(path, '{"title":"given"}')
    program = await startProgram(path)
    expect(first().state.url).toBe(`latchwright://window/index.html#open=${encodeURIComponent(path)}`)
    expect(await program.callFrom(first(), 'files.open', { path })).toEqual({ ok: true, value: { text: '{"title":"given"}', path, name: 'given.bank.json' } })
  })

  test('runs a command without a window', async () => {
    const stdout = vi.spyOn(process.stdout, 'write').mockImplementation((...given: unknown[]) => {
      const done = given.at(-1)
      if (typeof done === 'function') done()
      return true
    })
    try {
      program = await startProgram('plan', '--help')
    } finally {
      expect(stdout.mock.calls.flat().join('')).toContain('plan')
      stdout.mockRestore()
    }
    expect(program.seen.exits).toEqual([0])
    expect(program.seen.windows).toHaveLength(0)
  })

  test('hands over files from the system while it runs', () => {
    let stopped = false
    program.app.emit('open-file', { preventDefault: () => { stopped = true } }, '/plans/a.bank.json')
    expect(stopped).toBe(true)
    expect(program.seen.windows.at(-1)?.state.url).toContain(encodeURIComponent('a.bank.json'))
  })
})
