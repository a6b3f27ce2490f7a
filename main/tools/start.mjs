import { spawn, spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { parseArgs } from 'node:util'
import { electronPath, fetchElectron } from './electron-runtime.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..', '..')
const usage = `npm start -- [PLAN FILE] [--browser] [--port N]
  PLAN FILE   open this plan
  --browser   serve the window to a browser of this machine without trying Electron
  --port N    port of the browser host (default: any free one)`

function readArguments() {
  try {
    const { values, positionals } = parseArgs({
      allowPositionals: true,
      options: { browser: { type: 'boolean' }, port: { type: 'string' }, help: { type: 'boolean' } },
    })
    if (values.help) end(usage, 0)
    const port = Number(values.port ?? 0)
    if (!Number.isInteger(port) || port < 0 || port > 65535) end(`--port takes a number from 0 to 65535, not ${values.port}.`, 2)
    const files = positionals.map((path) => resolve(process.env.INIT_CWD ?? process.cwd(), path))
    const missing = files.find((path) => !existsSync(path))
    if (missing !== undefined) end(`There is no file ${missing}.`, 3)
    return { browser: values.browser === true, port, files }
  } catch (error) {
    return end(`${error.message}\n${usage}`, 2)
  }
}

function end(message, code) {
  console.error(message)
  process.exit(code)
}

const hasDisplay = () => ['win32', 'darwin'].includes(process.platform) || Boolean(process.env.DISPLAY || process.env.WAYLAND_DISPLAY)

/** The reason why the window is served to a browser, or null after the desktop program ran. */
async function runDesktop({ browser, files }) {
  if (browser) return 'As asked, the window is served to a browser.'
  if (!hasDisplay()) return 'There is no display here, so the window is served to a browser instead.'
  const path = electronPath(root) ?? await fetchElectron(root)
  if (path === null) return "Electron's runtime is not installed and could not be fetched, so the window is served to a browser instead."
  const started_ms = Date.now()
  const code = await run(path, [root, ...files])
  if (code !== 0 && Date.now() - started_ms < 5000) return 'Electron does not run on this machine, so the window is served to a browser instead.'
  process.exitCode = code
  return null
}

function run(path, given) {
  return new Promise((done) => {
    const child = spawn(path, given, { stdio: 'inherit' })
    for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal))
    child.once('error', () => done(1))
    child.once('exit', (code, signal) => done(signal === null ? code : 0))
  })
}

/** Serves the window until Ctrl-C, which is how it is meant to end. */
async function serve({ port, files }) {
  const code = await run(process.execPath, [join(root, 'out', 'main', 'headless.js'), 'serve', '--open', '--port', String(port), ...files.slice(0, 1)])
  process.exitCode = code === 130 ? 0 : code
}

const given = readArguments()
const prepared = spawnSync(process.execPath, [join(root, 'main', 'tools', 'prepare.mjs')], { stdio: 'inherit', cwd: root })
if (prepared.status !== 0) end('The program could not be built; see above.', 1)
const reason = await runDesktop(given)
if (reason !== null) {
  console.error(reason)
  await serve(given)
}
