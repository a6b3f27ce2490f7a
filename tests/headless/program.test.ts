import { execFile, spawn } from 'node:child_process'
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { resultSchema } from '../../main/contract/result'
import { commandFile, ensureBuilt } from '../built-program'
import { brokenPlans } from '../documents/broken-plans'
import { smallest } from '../documents/samples'

interface Ran { readonly code: number | null; readonly out: string; readonly err: string }

let folder = ''
let file = ''
beforeAll(async () => {
  await ensureBuilt()
  folder = await mkdtemp(join(tmpdir(), 'latchwright-'))
  file = join(folder, 'a.bank.json')
  await writeFile(file, JSON.stringify(smallest))
})
afterAll(async () => { await rm(folder, { recursive: true }) })

/** The program as a person starts it. */
function run(args: readonly string[], environment: Record<string, string> = {}): Promise<Ran> {
  return new Promise((resolve) => {
    const options = { env: { ...process.env, ...environment }, maxBuffer: 100_000_000 }
    const child = execFile(process.execPath, [commandFile, ...args], options, (_error, out, err) => {
      resolve({ code: child.exitCode, out, err })
    })
  })
}

/** Starts the program, does something to it when it has said something or after a time, and waits for its end. */
function interrupt(args: readonly string[], when: RegExp | number): Promise<Ran> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [commandFile, ...args], { stdio: ['pipe', 'pipe', 'pipe'] })
    const said = { out: '', err: '' }
    const note = (stream: 'out' | 'err') => (chunk: Buffer) => {
      said[stream] += chunk.toString()
      if (typeof when !== 'number' && when.test(said[stream])) child.kill('SIGINT')
    }
    child.stdout.on('data', note('out'))
    child.stderr.on('data', note('err'))
    if (typeof when === 'number') setTimeout(() => child.kill('SIGINT'), when)
    child.once('close', (code) => { resolve({ code, ...said }) })
  })
}

test('a plan, with the real planner', async () => {
  const { code, out, err } = await run(['plan', file])
  expect([0, 1], err).toContain(code)
  const result = resultSchema.parse(JSON.parse(out))
  expect(result.comparators).toHaveLength(63)
  expect(code).toBe(result.findings.some(({ severity }) => severity === 'stop') ? 1 : 0)
  expect(out).not.toMatch(/NaN|Infinity/)
})

test('ten broken plans', async () => {
  for (const [index, { bytes, faults }] of brokenPlans(10, 5).entries()) {
    const broken = join(folder, `broken-${index}.bank.json`)
    await writeFile(broken, bytes)
    const { code, out, err } = await run(['plan', broken])
    expect({ code, out }).toEqual({ code: 2, out: '' })
    expect(err).toMatch(/^latchwright: \d+ problems? in the plan\n/)
    expect(err).not.toMatch(/NaN|Infinity|undefined|\n {4}at /)
    for (const { path, code: kind } of faults) expect(err).toMatch(new RegExp(`^${path.replaceAll('.', '\\.') || 'document'}(:| ).*\\[${kind}\\]`, 'm'))
  }
})

test('the sheet: a PDF, the same bytes for the same date', async () => {
  const sheet = async (name: string, ...more: string[]) => {
    const out = join(folder, name)
    const ran = await run(['sheet', file, '--out', out, ...more], { SOURCE_DATE_EPOCH: '1700000000' })
    expect(ran.out, ran.err).toBe('')
    expect([0, 1], ran.err).toContain(ran.code)
    return readFile(out)
  }
  const [first, second, letter] = [await sheet('1.pdf'), await sheet('2.pdf', '--date', '2023-11-14'), await sheet('3.pdf', '--paper', 'letter')]
  expect(first.subarray(0, 5).toString()).toBe('%PDF-')
  expect(second.equals(first)).toBe(true)
  expect(letter.equals(first)).toBe(false)
})

test('waves: the columns, and every number a number', async () => {
  const { code, out } = await run(['waves', file, '--overdrive', '5m'])
  expect(code).toBe(0)
  const [header, ...rows] = out.trimEnd().split('\n')
  expect(header).toBe('time_s,clock_v,x_pos_v,x_neg_v,o_pos_v,o_neg_v,tail_v')
  expect(rows.length).toBeGreaterThan(50)
  expect(rows.every((row) => row.split(',').map(Number).every(Number.isFinite))).toBe(true)
})

describe('ends', () => {
  test('a reader that has enough makes no noise', async () => {
    const child = spawn(process.execPath, [commandFile, 'plan', file], { stdio: ['ignore', 'pipe', 'pipe'] })
    let err = ''
    child.stderr.on('data', (chunk: Buffer) => { err += chunk.toString() })
    child.stdout.destroy()
    const code = await new Promise((resolve) => child.once('close', resolve))
    expect([0, 1]).toContain(code)
    expect(err).not.toMatch(/EPIPE|Error|\n {4}at /)
  })

  test('Ctrl-C ends with 130: while it waits for its input, and while it serves', async () => {
    expect(await interrupt(['plan', '-'], 800)).toMatchObject({ code: 130, out: '' })
    const served = await interrupt(['serve'], /http:\/\/127\.0\.0\.1:\d+\/\S*\n/)
    expect(served).toMatchObject({ code: 130 })
  })
})
