import { spawn } from 'node:child_process'
import { accessSync, constants } from 'node:fs'
import { delimiter, join } from 'node:path'

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
 * @returns whether a browser was started
 */
export function openAppWindow(url: string, around: Surroundings = process): boolean {
  const browser = hasDisplay(around) ? findBrowser(around) : null
  if (browser === null) return false
  const asRoot = around.platform === 'linux' && process.getuid?.() === 0 ? ['--no-sandbox', '--test-type'] : []
  const child = spawn(browser, [`--app=${url}`, '--window-size=1440,900', '--no-first-run', '--no-default-browser-check', ...asRoot], { stdio: 'ignore', detached: true })
  child.once('error', () => undefined)
  child.unref()
  return true
}
