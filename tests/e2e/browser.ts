import { execFileSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { delimiter, join } from 'node:path'

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome', 'microsoft-edge']
const places = [
  '/Applications/Chromium.app/Contents/MacOS/Chromium', '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe', 'C:\\Program Files (x86)\\Google\\Chrome\\Application\\chrome.exe',
]

/** Where @sparticuz/chromium unpacks itself. */
const unpacked = join(tmpdir(), 'chromium')

/** Some systems install a script of that name which only says where to get the browser. */
function runs(path: string): boolean {
  try {
    return /\d+\.\d+/.test(execFileSync(path, ['--version'], { encoding: 'utf8', timeout: 20_000, stdio: ['ignore', 'pipe', 'ignore'] }))
  } catch {
    return false
  }
}

function installed(): string | null {
  const folders = (process.env['PATH'] ?? '').split(delimiter).filter((folder) => folder !== '')
  const candidates = [...names.flatMap((name) => folders.map((folder) => join(folder, name))), ...places]
  return candidates.filter((path) => existsSync(path)).find((path) => path.includes('Program Files') || runs(path)) ?? null
}

/** The browser of the tests: the one LATCHWRIGHT_BROWSER names, an installed one, or the one inside a package. */
export function browserPath(): string {
  process.env['LATCHWRIGHT_BROWSER'] ??= installed() ?? unpacked
  return process.env['LATCHWRIGHT_BROWSER']
}

/** Unpacks the packaged browser, once, when it is the one that is used. */
export async function prepareBrowser(): Promise<void> {
  if (browserPath() !== unpacked || existsSync(unpacked)) return
  const { default: chromium } = await import('@sparticuz/chromium')
  const path = await chromium.executablePath()
  if (path !== unpacked) throw new Error(`the packaged browser went to ${path}, not to ${unpacked}`)
}

export const browserArguments = ['--no-sandbox', '--disable-gpu']
