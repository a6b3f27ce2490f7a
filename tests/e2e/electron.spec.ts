import { mkdtemp, readFile, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { _electron, expect, test, type ElectronApplication, type Page } from '@playwright/test'
import { electronPath } from '../../main/tools/electron-runtime.mjs'

const root = fileURLToPath(new URL('../..', import.meta.url))
const executablePath = electronPath(root)
const hasDisplay = process.platform !== 'linux' || Boolean(process.env['DISPLAY'])

test.skip(executablePath === null, "Electron's runtime is not installed here: node_modules/electron/path.txt and dist/ are missing. Fetch it with: npx install-electron")
test.skip(!hasDisplay, 'Electron needs a display, and DISPLAY is not set. Run under: xvfb-run -a npm test')

let program: ElectronApplication
let page: Page
let folder: string
const complaints: string[] = []

async function launch(...given: string[]): Promise<void> {
  const switches = [`--user-data-dir=${join(folder, 'data')}`, ...(process.platform === 'linux' ? ['--no-sandbox'] : [])]
  program = await _electron.launch({ executablePath: executablePath ?? '', args: [...switches, root, ...given], cwd: root })
  page = await program.firstWindow()
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text())
  })
  page.on('pageerror', (error) => complaints.push(error.message))
  await page.waitForFunction(() => document.querySelector('[role="grid"], [role="application"], main') !== null)
}

test.beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'latchwright-electron-'))
  complaints.length = 0
})
test.afterEach(async () => {
  await program.evaluate(({ app }) => app.exit(0)).catch(() => undefined)
})

type Doors = Readonly<Record<string, (request: unknown) => Promise<{ ok: boolean; value?: unknown }>>>

/** Calls a channel as the page does. */
function answers(name: string, request: object) {
  return page.evaluate(([channel, value]) => (window as unknown as { latchwright: Doors }).latchwright[channel](value), [name, request] as const)
}

test('the window is alive, alone, and says nothing on its console', async () => {
  await launch()
  expect(await answers('about', {})).toMatchObject({ ok: true, value: { host: 'desktop' } })
  expect(await page.evaluate(() => typeof (globalThis as { require?: unknown }).require)).toBe('undefined')
  expect(page.url()).toMatch(/^latchwright:\/\/window\//)
  await page.evaluate(() => { window.open('https://example.org/') })
  await page.evaluate(() => { window.location.href = 'https://example.org/' })
  await page.waitForTimeout(300)
  expect(page.url()).toMatch(/^latchwright:\/\/window\//)
  expect(program.windows()).toHaveLength(1)
  expect(await page.evaluate(() => fetch('https://example.org/').then(() => 'reached', () => 'refused'))).toBe('refused')
  expect(complaints.filter((text) => !text.includes('example.org'))).toEqual([])
})

test('a plan is computed by the workers of the main side', async () => {
  await launch()
  const document = { schema: 'latchwright.plan/1', converter: { architecture: 'flash', resolution_bits: 4, sample_rate_hz: 1e9 } }
  const reply = await answers('plan.run', { document, revision: 1 })
  expect(reply).toMatchObject({ ok: true, value: { revision: 1, result: { schema: 'latchwright.result/1' } } })
})

test('a plan file of the command line is opened, changed and saved over itself', async () => {
  const path = join(folder, 'given.bank.json')
  const document = { schema: 'latchwright.plan/1', title: 'Given on the line', converter: { architecture: 'flash', resolution_bits: 4, sample_rate_hz: 1e9 } }
  await writeFile(path, JSON.stringify(document))
  await launch(path)
  await expect.poll(() => program.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].getTitle())).toContain('Given on the line')
  await page.keyboard.press('ControlOrMeta+s')
  await expect.poll(() => readFile(path, 'utf8')).toMatch(/\}\n$/)
  expect(JSON.parse(await readFile(path, 'utf8'))).toMatchObject({ title: 'Given on the line' })
  expect(await answers('files.save', { text: 'x', path: join(folder, 'elsewhere'), suggested_name: 'x' })).toMatchObject({ ok: false })
})

test('a window with unsaved changes asks before it goes', async () => {
  await launch()
  await program.evaluate(({ dialog }) => {
    const seen = globalThis as unknown as { asked: number }
    seen.asked = 0
    dialog.showMessageBox = async () => {
      seen.asked += 1
      return { response: 0, checkboxChecked: false }
    }
  })
  await answers('window.dirty', { dirty: true, title: 'Changed' })
  await program.evaluate(({ BrowserWindow }) => { BrowserWindow.getAllWindows()[0].close() })
  await expect.poll(() => program.evaluate(() => (globalThis as unknown as { asked: number }).asked)).toBe(1)
  expect(await program.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().length)).toBe(1)
})
