import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { existsSync, readFileSync } from 'node:fs'
import { mkdir, mkdtemp, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { beforeEach, expect, test, vi } from 'vitest'
import { electronPath, fetchElectron } from '../../main/tools/electron-runtime.mjs'

let root: string
let home: string
beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'latchwright-root-'))
  home = join(root, 'node_modules', 'electron')
  await mkdir(home, { recursive: true })
})
const script = async (text: string) => {
  const path = join(root, 'install.mjs')
  await writeFile(path, `import fs from 'node:fs'\nimport os from 'node:os'\nconst home = ${JSON.stringify(home)}\n${text}`)
  return path
}

test('the runtime is there when both its name and its file are', async () => {
  expect(electronPath(root)).toBeNull()
  await writeFile(join(home, 'path.txt'), 'electron')
  expect(electronPath(root)).toBeNull()
  await mkdir(join(home, 'dist'))
  await writeFile(join(home, 'dist', 'electron'), '')
  expect(electronPath(root)).toBe(join(home, 'dist', 'electron'))
})

test('a fetch that brings it is waited for, however long it takes, while something arrives', async () => {
  const path = await script(`
    const folder = fs.mkdtempSync(os.tmpdir() + '/electron-download-')
    for (let part = 0; part < 8; part += 1) {
      await new Promise((resolve) => setTimeout(resolve, 250))
      fs.appendFileSync(folder + '/part', 'x')
    }
    fs.mkdirSync(home + '/dist')
    fs.writeFileSync(home + '/dist/electron', '')
    fs.writeFileSync(home + '/path.txt', 'electron')`)
  expect(await fetchElectron(root, { quiet_ms: 1200, script: path })).toBe(join(home, 'dist', 'electron'))
})

test('a fetch in silence is given up, and ended with all it started', async () => {
  const path = await script(`
    import { spawn } from 'node:child_process'
    const beat = "setInterval(() => fs.appendFileSync(process.argv[1], '.'), 50)"
    spawn(process.execPath, ['-e', beat, home + '/beats'], { stdio: 'ignore' })
    setInterval(() => {}, 1000)`)
  const started_ms = Date.now()
  expect(await fetchElectron(root, { quiet_ms: 1500, script: path })).toBeNull()
  expect(Date.now() - started_ms).toBeLessThan(6000)
  const beats = () => readFileSync(join(home, 'beats'), 'utf8').length
  const before = beats()
  await new Promise((resolve) => setTimeout(resolve, 500))
  expect(before).toBeGreaterThan(0)
  expect(beats()).toBe(before)
})

test('an interruption ends the fetch and all it started, and leaves nothing behind', async () => {
  const path = await script(`
    fs.writeFileSync(home + '/tmp', os.tmpdir())
    setInterval(() => fs.appendFileSync(home + '/beats', '.'), 50)`)
  const runtime = JSON.stringify(new URL('../../main/tools/electron-runtime.mjs', import.meta.url).href)
  const fetching = `import(${runtime}).then(({ fetchElectron }) => fetchElectron(${JSON.stringify(root)}, { script: ${JSON.stringify(path)} }))`
  const program = spawn(process.execPath, ['-e', fetching], { stdio: 'ignore' })
  const ended = once(program, 'exit')
  const beats = () => readFileSync(join(home, 'beats'), 'utf8').length
  await vi.waitFor(() => expect(beats()).toBeGreaterThan(0), 10_000)
  program.kill('SIGTERM')
  expect((await ended)[1]).toBe('SIGTERM')
  await new Promise((resolve) => setTimeout(resolve, 100))
  const before = beats()
  await new Promise((resolve) => setTimeout(resolve, 300))
  expect(beats()).toBe(before)
  expect(existsSync(readFileSync(join(home, 'tmp'), 'utf8'))).toBe(false)
})

test('a fetch that fails is null at once, and leaves nothing behind', async () => {
  const path = await script(`fs.writeFileSync(home + '/tmp', os.tmpdir())\nprocess.exit(1)`)
  expect(await fetchElectron(root, { script: path })).toBeNull()
  expect(existsSync(readFileSync(join(home, 'tmp'), 'utf8'))).toBe(false)
  expect(await fetchElectron(root, { script: join(root, 'nothing.js') })).toBeNull()
})
