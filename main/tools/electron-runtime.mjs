import { spawn } from 'node:child_process'
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/**
 * Electron's executable, looked for as files only: nothing is loaded and nothing is fetched.
 *
 * @param {string} root folder of the project
 * @returns {string | null}
 */
export function electronPath(root) {
  const home = join(root, 'node_modules', 'electron')
  try {
    const name = readFileSync(join(home, 'path.txt'), 'utf8').trim()
    const path = join(process.env.ELECTRON_OVERRIDE_DIST_PATH || join(home, 'dist'), name)
    return existsSync(path) ? path : null
  } catch {
    return null
  }
}

const signals = ['SIGINT', 'SIGTERM']

/**
 * Fetches Electron's runtime in a child process and watches it: when nothing arrives for a while, it is given up.
 *
 * @param {string} root folder of the project
 * @param {{ quiet_ms?: number, script?: string }} [options]
 * @returns {Promise<string | null>} the executable, or null
 */
export async function fetchElectron(root, { quiet_ms = 20_000, script = join(root, 'node_modules', 'electron', 'install.js') } = {}) {
  if (!existsSync(script)) return null
  const work = mkdtempSync(join(tmpdir(), 'latchwright-fetch-'))
  const child = spawn(process.execPath, [script], {
    env: { ...process.env, TMPDIR: work, TMP: work, TEMP: work }, stdio: 'ignore', detached: process.platform !== 'win32',
  })
  const end = () => endGroup(child)
  const interrupted = (signal) => {
    end()
    rmSync(work, { recursive: true, force: true })
    process.kill(process.pid, signal)
  }
  process.once('exit', end)
  for (const signal of signals) process.once(signal, interrupted)
  await watch(child, [work, join(root, 'node_modules', 'electron', 'dist')], quiet_ms)
  process.off('exit', end)
  for (const signal of signals) process.off(signal, interrupted)
  rmSync(work, { recursive: true, force: true })
  return electronPath(root)
}

function watch(child, folders, quiet_ms) {
  return new Promise((resolve) => {
    let seen = -1
    let since_ms = Date.now()
    const timer = setInterval(() => {
      const size = folders.reduce((sum, folder) => sum + sizeOf(folder), 0)
      if (size !== seen) [seen, since_ms] = [size, Date.now()]
      else if (Date.now() - since_ms > quiet_ms) endGroup(child)
    }, Math.min(500, quiet_ms / 4))
    const done = () => {
      clearInterval(timer)
      resolve(undefined)
    }
    child.once('exit', done)
    child.once('error', done)
  })
}

function endGroup(child) {
  if (child.exitCode !== null || child.signalCode !== null || child.pid === undefined) return
  try {
    if (process.platform === 'win32') child.kill('SIGKILL')
    else process.kill(-child.pid, 'SIGKILL')
  } catch {
    child.kill('SIGKILL')
  }
}

function sizeOf(folder) {
  try {
    return readdirSync(folder, { recursive: true }).reduce((sum, name) => sum + fileSize(join(folder, String(name))), 0)
  } catch {
    return 0
  }
}

const fileSize = (path) => statSync(path, { throwIfNoEntry: false })?.size ?? 0
