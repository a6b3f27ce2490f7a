import { spawn } from 'node:child_process'
import { accessSync, constants, mkdtempSync, rm } from 'node:fs'
import { tmpdir } from 'node:os'
import { delimiter, join } from 'node:path'
import { writeEntryPage } from './entry-page'

const linuxNames = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'microsoft-edge', 'brave-browser']
const macNames = ['Google Chrome', 'Chromium', 'Microsoft Edge', 'Brave Browser']
const windowsPaths = ['Google\\Chrome\\Application\\chrome.exe', 'Chromium\\Application\\chrome.exe', 'Microsoft\\Edge\\Application\\msedge.exe']

export interface Surroundings { readonly platform: NodeJS.Platform; readonly env: NodeJS.ProcessEnv }

/** Whether a window could be shown at all. */
export function hasDisplay({ platform, env }: Surroundings): boolean {
  return platform === 'win32' || platform === 'darwin' || Boolean(env.DISPLAY) || Boolean(env.WAYLAND_DISPLAY)
}

/** The installed Chromium or Chrome, or null. */
export function findBrowser(around: Surroundings): string | null {
  return candidates(around).find(isExecutable) ?? null
}

function candidates({ platform, env }: Surroundings): string[] {
  if (platform === 'darwin') return macNames.map((name) => `/Applications/${name}.app/Contents/MacOS/${name}`)
  if (platform === 'win32') {
    const roots = [env.PROGRAMFILES, env['PROGRAMFILES(X86)'], env.LOCALAPPDATA].filter((root) => root !== undefined)
    return windowsPaths.flatMap((path) => roots.map((root) => join(root, path)))
  }
  const folders = (env.PATH ?? '').split(delimiter).filter((folder) => folder !== '')
  return linuxNames.flatMap((name) => folders.map((folder) => join(folder, name)))
}

function isExecutable(path: string): boolean {
  try {
    accessSync(path, constants.X_OK)
    return true
  } catch {
    return false
  }
}

/**
 * Opens the address as a window of its own in an installed Chromium or Chrome. It outlives nothing and blocks nothing.
 *
 * @param url  led to from a file, so that it stands in no command line
 * @returns    what takes that file away once it was used; null when no browser was started
 */
export function openAppWindow(url: string, around: Surroundings = process): (() => void) | null {
  const browser = hasDisplay(around) ? findBrowser(around) : null
  if (browser === null) return null
  const page = writeEntryPage(url, browser)
  const profile = around.platform === 'linux' && process.getuid?.() === 0 ? mkdtempSync(join(tmpdir(), 'latchwright-profile-')) : null
  const asRoot = profile === null ? [] : ['--no-sandbox', '--test-type', `--user-data-dir=${profile}`]
  const child = spawn(browser, [`--app=${page.address}`, '--window-size=1440,900', '--no-first-run', '--no-default-browser-check', ...asRoot], { stdio: 'ignore', detached: true })
  const gone = () => { if (profile !== null) rm(profile, { recursive: true, force: true }, () => undefined) }
  child.once('error', gone)
  child.once('exit', gone)
  child.unref()
  return page.remove
}
