/*
 * npm run bench: how long things take, beside what is aimed at. It measures and judges nothing: a missed aim is printed, not an error.
 * npm run bench -- engine plans sheet edits: only these parts.
 */
import { spawn, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { availableParallelism, cpus, loadavg } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { build } from 'vite'
import { headLine, rowLine } from './table.mjs'

const root = fileURLToPath(new URL('../..', import.meta.url))
const parts = {
  engine: 'Engine: one pass over a latch (balanced trajectory, differential mode, noise, weights)',
  plans: 'Plans: plan() of the demos, all corners they ask for. Cold: the first of a fresh process. Warm: jitter changes from run to run, so no remembered bank answers',
  sheet: 'Sheet: makeSheet() of a finished result, A4. Cold: the first of a fresh process',
  edits: 'Edits: the built window in a real browser, from the key that enters a change to the frame that shows the new bank',
}

/** The measuring code in one file, inside node_modules so that it finds its packages. */
async function bundle(folder) {
  await build({
    configFile: false, root, logLevel: 'error', publicDir: false,
    build: {
      ssr: true, outDir: folder, target: 'node20', emptyOutDir: true, chunkSizeWarningLimit: 4000,
      rolldownOptions: { input: join(root, 'tests/bench/part.ts'), output: { entryFileNames: '[name].mjs', chunkFileNames: '[name]-[hash].mjs' } },
    },
  })
  return join(folder, 'part.mjs')
}

/** Rows of one part, measured in a process of its own; null when it broke. */
function measure(file, part) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [file, part], { cwd: root, stdio: ['ignore', 'pipe', 'inherit'] })
    let said = ''
    child.stdout.on('data', (chunk) => { said += chunk })
    child.once('close', (code) => resolve(code === 0 ? JSON.parse(said) : null))
  })
}

function facts() {
  const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'))
  const load = loadavg().map((value) => value.toFixed(1))
  const cores = availableParallelism()
  const busy = Number(load[0]) > cores / 2 ? '\nThe machine is doing other work: compare the CPU column, wall times are longer than on an idle one.' : ''
  return `Latchwright ${version} · node ${process.versions.node} · ${process.platform} ${process.arch} · ${cores} cores, ${cpus()[0]?.model.trim() ?? 'unknown'}`
    + ` · load average ${load.join(' ')}${busy}`
}

const unknown = process.argv.slice(2).filter((name) => !(name in parts))
if (unknown.length > 0) {
  console.error(`There is no part ${unknown.join(', ')}. Parts: ${Object.keys(parts).join(', ')}.`)
  process.exit(2)
}
const wanted = process.argv.length > 2 ? process.argv.slice(2) : Object.keys(parts)
if (wanted.includes('edits') && spawnSync(process.execPath, [join(root, 'main/tools/prepare.mjs')], { stdio: 'inherit', cwd: root }).status !== 0) process.exit(1)

console.log(`${facts()}\nTimes in ms. CPU: median of all threads of the measuring process. Aim: that of the design; — where it states none.
“CPU only”: the aim is met by processor time, not by the clock. 95 %: of a handful of runs, the longest.`)
const folder = mkdtempSync(join(root, 'node_modules', '.latchwright-bench-'))
process.once('exit', () => rmSync(folder, { recursive: true, force: true }))
for (const signal of ['SIGINT', 'SIGTERM']) process.once(signal, () => process.exit(130))
const file = await bundle(folder)
for (const part of wanted) {
  console.log(`\n${parts[part]}\n${headLine()}`)
  const measured = await measure(file, part)
  for (const row of measured?.rows ?? []) console.log(rowLine(row))
  for (const note of measured?.notes ?? ['  not measured: this part broke, see above']) console.log(note)
  if (measured === null) process.exitCode = 1
}
console.log(`\nload average at the end ${loadavg().map((value) => value.toFixed(1)).join(' ')}`)
