import { spawn } from 'node:child_process'
import { copyFile, mkdir, mkdtemp, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { beforeEach, describe, expect, test } from 'vitest'

const tools = new URL('../../main/tools/', import.meta.url).pathname
let root: string

/** A project of a few files around the real starter: its build does nothing, its host says how it was called. */
beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'latchwright-start-'))
  for (const folder of ['main/tools', 'out/main', 'node_modules/electron']) await mkdir(join(root, folder), { recursive: true })
  for (const name of ['start.mjs', 'electron-runtime.mjs']) await copyFile(join(tools, name), join(root, 'main/tools', name))
  await writeFile(join(root, 'main/tools/prepare.mjs'), 'console.error("prepared")')
  await writeFile(join(root, 'package.json'), '{"type":"module"}')
  await host('console.log("host", ...process.argv.slice(2))')
})
const host = (text: string) => writeFile(join(root, 'out/main/headless.js'), text)
const installs = (text: string) => writeFile(join(root, 'node_modules/electron/install.js'), text)
const electronIs = async (text: string) => {
  await mkdir(join(root, 'node_modules/electron/dist'), { recursive: true })
  await writeFile(join(root, 'node_modules/electron/path.txt'), 'electron')
  await writeFile(join(root, 'node_modules/electron/dist/electron'), `#!/bin/sh\n${text}\n`, { mode: 0o755 })
}

interface Outcome { code: number | null; out: string; err: string[] }
function start(given: string[], display = '', stopAt?: RegExp): Promise<Outcome> {
  return new Promise((resolve) => {
    const env = { ...process.env, DISPLAY: display, WAYLAND_DISPLAY: '', INIT_CWD: root }
    const child = spawn(process.execPath, [join(root, 'main/tools/start.mjs'), ...given], { env, stdio: ['ignore', 'pipe', 'pipe'] })
    let [out, err] = ['', '']
    child.stdout.on('data', (chunk: Buffer) => {
      out += chunk.toString()
      if (stopAt?.test(out)) child.kill('SIGINT')
    })
    child.stderr.on('data', (chunk: Buffer) => { err += chunk.toString() })
    child.once('close', (code) => resolve({ code, out, err: err.split('\n').filter((line) => line !== '') }))
  })
}

describe.runIf(process.platform === 'linux')('npm start', () => {
  test('without a display serves the window, and says so in one line', async () => {
    const { code, out, err } = await start(['--port', '4321'])
    expect([code, out]).toEqual([0, 'host serve --open --port 4321\n'])
    expect(err).toEqual(['prepared', 'There is no display here, so the window is served to a browser instead.'])
  })

  test('starts Electron where its runtime is, with the plan file', async () => {
    await electronIs('echo electron "$@"')
    await writeFile(join(root, 'a.bank.json'), '{}')
    const { code, out, err } = await start(['a.bank.json'], ':0')
    expect([code, out, err]).toEqual([0, `electron ${root} ${join(root, 'a.bank.json')}\n`, ['prepared']])
  })

  test('serves the window when the runtime cannot be fetched', async () => {
    await installs('process.exit(1)')
    const { code, out, err } = await start([], ':0')
    expect([code, out]).toEqual([0, 'host serve --open --port 0\n'])
    expect(err).toEqual(['prepared', expect.stringContaining('could not be fetched')])
  })

  test('starts Electron once it was fetched', async () => {
    await installs(`
      import fs from 'node:fs'
      const home = ${JSON.stringify(join(root, 'node_modules/electron'))}
      fs.mkdirSync(home + '/dist')
      fs.writeFileSync(home + '/dist/electron', '#!/bin/sh\\necho fetched', { mode: 0o755 })
      fs.writeFileSync(home + '/path.txt', 'electron')`)
    expect(await start([], ':0')).toMatchObject({ code: 0, out: 'fetched\n', err: ['prepared'] })
  })

  test('serves the window when the runtime does not run here', async () => {
    await electronIs('exit 127')
    const { out, err } = await start([], ':0')
    expect(out).toContain('host serve')
    expect(err.at(-1)).toContain('does not run on this machine')
  })

  test('can be asked for the browser at once', async () => {
    await electronIs('echo electron')
    expect((await start(['--browser'], ':0')).out).toContain('host serve')
  })

  test('ends cleanly with Ctrl-C', async () => {
    await host('console.log("ready"); process.once("SIGINT", () => process.exit(130)); setInterval(() => {}, 1000)')
    expect((await start([], '', /ready/)).code).toBe(0)
  })

  test.each([[['--port', 'x'], 2], [['--stranger'], 2], [['missing.json'], 3]])('refuses %j', async (given, expected) => {
    const { code, out, err } = await start(given)
    expect([code, out]).toEqual([expected, ''])
    expect(err.join(' ')).toMatch(/--port|stranger|missing\.json/)
  })

  test('stops when the program cannot be built', async () => {
    await writeFile(join(root, 'main/tools/prepare.mjs'), 'process.exit(1)')
    expect(await start([])).toMatchObject({ code: 1, out: '' })
  })
})
