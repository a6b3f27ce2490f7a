import { mkdtemp, readFile, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { chromium, type Browser, type Page } from 'playwright'
import { afterAll, afterEach, beforeAll, beforeEach, expect, test, vi } from 'vitest'
import { channels } from '../../main/contract/channels'
import type { Loopback } from '../../main/loopback'
import { ensureBuilt } from '../built-program'
import { browserArguments, browserPath, prepareBrowser } from '../e2e/browser'
import { startProgram } from './desktop-program'
import type * as Fake from './electron-fake'
import { loopback } from './hosts'

vi.mock('electron', () => import('./electron-fake'))

/** The built page in a real browser, its bridge led to the shell's own channels: the desktop program without Electron's runtime. */
let browser: Browser
let host: Loopback
let program: typeof Fake
let page: Page
let folder: string
const complaints: string[] = []

beforeAll(async () => {
  await ensureBuilt()
  await prepareBrowser()
  browser = await chromium.launch({ executablePath: browserPath(), args: browserArguments })
  host = await loopback({ root: fileURLToPath(new URL('../../out/renderer', import.meta.url)) })
})
afterAll(async () => {
  await browser.close()
  await host.close()
})
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'latchwright-page-'))
  complaints.length = 0
})
afterEach(async () => {
  await page.close()
  program.app.emit('will-quit')
})

const shell = () => program.seen.windows[0]

async function openWindow(...files: string[]): Promise<void> {
  program = await startProgram(...files)
  page = await browser.newPage({ viewport: { width: 1440, height: 900 } })
  page.on('console', (message) => { if (message.type() === 'error') complaints.push(message.text()) })
  page.on('pageerror', (error) => complaints.push(error.message))
  await page.exposeFunction('callShell', (name: string, request: unknown) => program.callFrom(shell(), name, request))
  await page.addInitScript((names) => {
    const { callShell } = window as unknown as { callShell: (name: string, request: unknown) => Promise<unknown> }
    const doors = Object.fromEntries(names.map((name) => [name, (request: unknown) => callShell(name, request)]))
    Object.assign(window, { latchwright: doors })
  }, Object.keys(channels))
  await page.goto(`http://127.0.0.1:${host.port}/${new URL(shell().state.url).hash}`)
}
const planFile = async () => {
  const path = join(folder, 'given.bank.json')
  await writeFile(path, JSON.stringify({
    schema: 'latchwright.plan/1', title: 'Given on the line', converter: { architecture: 'flash', resolution_bits: 3, sample_rate_hz: 1e9 },
  }))
  return path
}
const title = () => expect.poll(() => shell().state.title, { timeout: 20_000 })

test('the file of the command line is on the desk, is changed, and saved over itself without a dialog', async () => {
  const path = await planFile()
  await openWindow(path)
  await title().toBe('Given on the line — Latchwright')
  await page.getByLabel('Resolution', { exact: false }).first().fill('4')
  await page.keyboard.press('Enter')
  await title().toBe('• Given on the line — Latchwright')
  await page.keyboard.press('ControlOrMeta+s')
  await title().toBe('Given on the line — Latchwright')
  expect(JSON.parse(await readFile(path, 'utf8'))).toMatchObject({ title: 'Given on the line', converter: { resolution_bits: 4 } })
  expect(program.seen.saveOptions).toEqual([])
  expect(complaints).toEqual([])
})

test('the keys that the menu presses open a file through the dialog', async () => {
  await openWindow()
  program.seen.openAnswer = { canceled: false, filePaths: [await planFile()] }
  await page.getByText('Bank', { exact: false }).first().waitFor()
  const items = program.seen.menu.flatMap((item) => item.submenu ?? [])
  items.find((item) => item.label === 'Open …')?.click?.({}, shell())
  expect(shell().webContents.keys[0]).toMatchObject({ type: 'keyDown', keyCode: 'O' })
  await page.keyboard.press('ControlOrMeta+o')
  await title().toBe('Given on the line — Latchwright')
})

test('unsaved work is kept, and offered by the next window after a crash', async () => {
  await openWindow(await planFile())
  await title().toBe('Given on the line — Latchwright')
  await page.getByLabel('Resolution', { exact: false }).first().fill('4')
  await page.keyboard.press('Enter')
  await expect.poll(async () => JSON.stringify(await program.callFrom(shell(), 'recovery.read', {})), { timeout: 20_000 }).toContain('resolution_bits\\":4')
  await page.reload()
  await page.getByText('was not saved when the window closed last').waitFor()
})
