/* npm test: lint, types, build, everything under vitest, a real browser. The last line is the count and nothing else. */
import { spawn } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('..', import.meta.url))
const reports = mkdtempSync(join(tmpdir(), 'latchwright-tests-'))
const long = process.argv.includes('--long')
const tool = (path) => join(root, 'node_modules', path)
const total = { passed: 0, failed: [], skipped: [] }

function run(args, environment = {}, stdio = 'inherit', note = () => {}) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, args, { cwd: root, stdio, env: { ...process.env, ...environment } })
    child.stdout?.on('data', note)
    child.stderr?.on('data', note)
    child.once('error', () => resolve(1))
    child.once('close', (code) => resolve(code ?? 1))
  })
}

function readReport(name) {
  try {
    return JSON.parse(readFileSync(join(reports, name), 'utf8'))
  } catch {
    return null
  }
}

/** Adds results; a runner that failed without a failed test, or left no report, is a failure itself. */
function add(step, code, results) {
  const failed = (results ?? []).filter((result) => result.state === 'failed')
  for (const { name, state, reason } of results ?? []) {
    if (state === 'passed') total.passed += 1
    else if (state === 'failed') total.failed.push(`${step}: ${name}`)
    else total.skipped.push(`${step}: ${name} (${reason ?? 'no reason given'})`)
  }
  if (results === null || results.length === 0 || (code !== 0 && failed.length === 0)) total.failed.push(`${step}: ended with ${code}, see above`)
}

/** A step that is one test; what it says is held back until it ends, as several run at once. */
async function one(step, args) {
  let said = ''
  const started = Date.now()
  const code = await run(args, {}, 'pipe', (chunk) => { said += chunk.toString() })
  console.log(`== ${step}: ${code === 0 ? 'passed' : 'failed'} (${Math.round((Date.now() - started) / 1000)} s)\n${said.trimEnd()}`.trimEnd())
  add(step, code, [{ name: step, state: code === 0 ? 'passed' : 'failed' }])
}

const states = { passed: 'passed', failed: 'failed' }

function unitResults(report) {
  return report?.testResults.flatMap(({ name, status, assertionResults }) => {
    const file = name.slice(root.length)
    const tests = assertionResults.map((test) => ({ name: `${file} ${test.fullName}`, state: states[test.status] ?? 'skipped', reason: test.meta?.skipReason }))
    const brokenFile = status === 'failed' && !tests.some((test) => test.state === 'failed')
    return brokenFile ? [...tests, { name: file, state: 'failed' }] : tests
  }) ?? null
}

function browserResults(report) {
  const specs = (suite) => [...(suite.specs ?? []), ...(suite.suites ?? []).flatMap(specs)]
  const all = report?.suites.flatMap(specs) ?? null
  return all?.flatMap((spec) => spec.tests.map((test) => ({
    name: `${spec.file} ${spec.title}`,
    state: test.status === 'skipped' ? 'skipped' : spec.ok && (test.status === 'expected' || test.status === 'flaky') ? 'passed' : 'failed',
    reason: test.annotations.find((annotation) => annotation.type === 'skip')?.description,
  }))) ?? null
}

async function unit() {
  console.log('\n== unit')
  const code = await run([tool('vitest/vitest.mjs'), 'run', '--config', 'tests/vitest.config.ts', '--reporter=default', '--reporter=json',
    `--outputFile.json=${join(reports, 'unit.json')}`], long ? { LATCHWRIGHT_LONG: '1' } : {})
  add('unit', code, unitResults(readReport('unit.json')))
}

async function browser() {
  if (!readdirSync(join(root, 'tests/e2e')).some((name) => name.endsWith('.spec.ts'))) {
    total.failed.push('browser: there are no tests')
    return
  }
  console.log('\n== browser')
  const code = await run([tool('@playwright/test/cli.js'), 'test', '--config', 'tests/e2e/playwright.config.ts', '--reporter=list,json'],
    { PLAYWRIGHT_JSON_OUTPUT_FILE: join(reports, 'browser.json') })
  add('browser', code, browserResults(readReport('browser.json')))
}

await Promise.all([
  one('lint', [tool('eslint/bin/eslint.js'), '--config', 'tests/eslint.config.mjs', '--max-warnings', '0', '.']),
  one('types', [tool('typescript/bin/tsc'), '--noEmit', '-p', '.']).then(() => one('build', ['main/tools/prepare.mjs'])),
])
await unit()
await browser()
rmSync(reports, { recursive: true, force: true })

const list = (title, names) => (names.length === 0 ? '' : `\n${title}:\n${names.map((name) => `  ${name}`).join('\n')}\n`)
console.log(list('Skipped', total.skipped) + list('Failed', total.failed))
console.log(`${total.passed} passed, ${total.failed.length} failed${total.skipped.length === 0 ? '' : `, ${total.skipped.length} skipped`}`)
process.exitCode = total.failed.length === 0 ? 0 : 1
