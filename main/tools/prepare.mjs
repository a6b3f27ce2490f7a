/*
 * Builds the program into out/ when out/ is not that of the present sources. Runs after every install and before
 * every start, several at once perhaps: it builds beside, in out-<pid>, and renames. Quiet when all is well.
 */
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))))
const sources = ['app', 'main', 'assets', 'package.json', 'package-lock.json', 'electron.config.ts', 'tsconfig.json']
const out = join(root, 'out')
const stampName = '.sources'

/** Path, size and time of every file of the sources, one after the other. */
function* filesOf(path) {
  const found = statSync(path, { throwIfNoEntry: false })
  if (!found) return
  if (!found.isDirectory()) yield `${path.slice(root.length)} ${found.size} ${Math.floor(found.mtimeMs)}`
  else for (const name of readdirSync(path).sort()) yield* filesOf(join(path, name))
}

function fingerprint() {
  const hash = createHash('sha256').update(`node ${process.versions.node.split('.')[0]}\n`)
  for (const source of sources) for (const line of filesOf(join(root, source))) hash.update(`${line}\n`)
  return hash.digest('hex')
}

function stampOf(folder) {
  const stamp = join(folder, stampName)
  return existsSync(stamp) ? readFileSync(stamp, 'utf8') : null
}

function canBuild() {
  const require = createRequire(join(root, 'package.json'))
  return ['electron-vite', 'vite', '@vitejs/plugin-react'].every((name) => {
    try {
      return require.resolve(name) !== ''
    } catch {
      return false
    }
  })
}

function isRunning(pid) {
  try {
    return process.kill(pid, 0)
  } catch (error) {
    return error.code === 'EPERM'
  }
}

/** Folders that builds left behind when they were killed. */
function sweep() {
  for (const name of readdirSync(root)) {
    const pid = /^out-(\d+)(?:-old)?$/.exec(name)?.[1]
    if (pid !== undefined && Number(pid) !== process.pid && !isRunning(Number(pid))) rmSync(join(root, name), { recursive: true, force: true })
  }
}

async function build(folder) {
  process.env.LATCHWRIGHT_OUT = folder
  const electronVite = await import('electron-vite')
  await electronVite.build({ configFile: join(root, 'electron.config.ts'), logLevel: 'error' })
}

/** Puts a finished build in place; another process may be doing the same with an equal one. */
function putInPlace(folder, stamp) {
  const old = `${folder}-old`
  for (let attempt = 0; attempt < 20 && existsSync(folder); attempt += 1) {
    if (stampOf(out) === stamp && !force) break
    try {
      if (existsSync(out)) renameSync(out, old)
      renameSync(folder, out)
    } catch (error) {
      if (!['ENOTEMPTY', 'EEXIST', 'ENOENT', 'EPERM', 'EBUSY'].includes(error.code)) throw error
    }
    rmSync(old, { recursive: true, force: true })
  }
  rmSync(folder, { recursive: true, force: true })
  if (!existsSync(out)) throw new Error('the build could not be put in place')
}

const force = process.argv.includes('--force')
process.chdir(root)
const stamp = fingerprint()

if (force || stampOf(out) !== stamp) {
  if (!canBuild()) {
    const state = existsSync(out) ? 'The built program in out/ is used as it is.' : 'The program is not built.'
    console.error(`latchwright: the build tools are not installed. ${state} Run: npm ci`)
  } else {
    const folder = join(root, `out-${process.pid}`)
    try {
      sweep()
      await build(folder)
      writeFileSync(join(folder, stampName), stamp)
      putInPlace(folder, stamp)
    } catch (error) {
      rmSync(folder, { recursive: true, force: true })
      console.error(`latchwright: the build failed. ${error instanceof Error ? error.message : String(error)}`)
      process.exitCode = 1
    }
  }
}
