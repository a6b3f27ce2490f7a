import { link, mkdtemp, readFile, rm, symlink, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { faceNames } from '../../main/headless/names'
import { harmless } from '../../main/headless/streams'
import { smallest } from '../documents/samples'
import { run } from './in-process'

let folder = ''
let file = ''
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'latchwright-'))
  file = join(folder, 'a.bank.json')
  await writeFile(file, JSON.stringify(smallest))
})
afterAll(async () => { await rm(folder, { recursive: true }) })

describe('plan', () => {
  test('the result is one line of JSON on standard output', async () => {
    const { code, out, err } = await run(['plan', file])
    expect({ code, err }).toEqual({ code: 0, err: '' })
    expect(out.endsWith('}\n')).toBe(true)
    expect(out.trimEnd()).not.toContain('\n')
    expect(JSON.parse(out)).toMatchObject({ schema: 'latchwright.result/1', plan: { converter: { resolution_bits: 6 } } })
  })

  test('from standard input', async () => {
    expect(await run(['plan', '-'], JSON.stringify(smallest))).toMatchObject({ code: 0, err: '' })
  })

  test('into a file', async () => {
    const result = join(folder, 'r.json')
    expect(await run(['plan', file, '--out', result])).toEqual({ code: 0, out: '', err: '' })
    expect(JSON.parse(await readFile(result, 'utf8'))).toMatchObject({ schema: 'latchwright.result/1' })
    expect(await run(['plan', file, '--out', join(folder, 'no', 'r.json')])).toMatchObject({ code: 3, out: '' })
  })

  test('never over the plan itself', async () => {
    const before = await readFile(file, 'utf8')
    expect(await run(['plan', file, '--out', join(folder, '.', 'a.bank.json')])).toMatchObject({ code: 2, out: '', err: expect.stringContaining('--out') as string })
    expect(await readFile(file, 'utf8')).toBe(before)
  })

  test('nor through a link to it', async () => {
    const links = [join(folder, 'hard.json'), join(folder, 'soft.json')]
    await link(file, links[0])
    await symlink(file, links[1])
    for (const out of links) expect(await run(['plan', file, '--out', out])).toMatchObject({ code: 2, out: '', err: expect.stringContaining('--out') as string })
  })

  test('what a document brings along cannot steer a terminal', () => {
    expect(harmless('a\u001b[31m\u009b\u202e\u2066\r\u007f“µ”\nb')).toBe('a\\u001b[31m\\u009b\\u202e\\u2066\\u000d\\u007f“µ”\nb')
  })

  test('a stop finding ends with 1, after the result', async () => {
    const { code, out, err } = await run(['plan', file, '--set', 'title=stop'])
    expect(code).toBe(1)
    expect(JSON.parse(out)).toMatchObject({ findings: [{ severity: 'stop' }] })
    expect(err).toBe('stop [too_fast] The window is too short. Take two lanes.\n')
  })

  test('workings of an entry', async () => {
    expect(JSON.parse((await run(['plan', file, '--workings', '2'])).out)).toMatchObject({ workings: [{ value: 2 }] })
    expect(await run(['plan', file, '--workings', '4'])).toMatchObject({ code: 2, out: '' })
    expect(await run(['plan', file, '--workings', '0'])).toMatchObject({ code: 2, out: '' })
  })

  test('a byte order mark is said', async () => {
    const { code, err } = await run(['plan', '-'], `\uFEFF${JSON.stringify(smallest)}`)
    expect(code).toBe(0)
    expect(err).toContain('byte order mark')
  })
})

describe('--set', () => {
  const planOf = async (...settings: string[]) => {
    const { code, out, err } = await run(['plan', file, ...settings.flatMap((setting) => ['--set', setting])])
    return { code, err, plan: out === '' ? null : (JSON.parse(out) as { plan: Record<string, never> }).plan }
  }

  test('numbers with prefix, JSON, text; several; the last of the same path wins', async () => {
    const { plan } = await planOf('converter.sample_rate_hz=1G', 'title=Fast one', 'corners=["all"]', 'converter.flash.ladder_ohm=300', 'converter.lanes=2', 'converter.lanes=4')
    expect(plan).toMatchObject({
      title: 'Fast one', corners: ['typical', 'slow', 'fast'], converter: { sample_rate_hz: 1e9, lanes: 4, flash: { ladder_ohm: 300, capture_latches: 1 } },
    })
  })

  test('into lists', async () => {
    const { plan } = await planOf('overrides.0={"item":"power.clock","value":1}', 'overrides.0.value=2m', 'corners.0=slow', 'corners.1=fast')
    expect(plan).toMatchObject({ overrides: [{ item: 'power.clock', value: 2e-3 }], corners: ['slow', 'fast'] })
    expect(await planOf('overrides.2.value=1', 'corners.1=slow')).toMatchObject({ code: 2, err: expect.stringMatching(/^overrides\.2\.value: .*\n^corners\.1: /m) as string })
  })

  test('paths that are not there, and values that are not allowed, all at once', async () => {
    const { code, plan, err } = await planOf('converter.lane=2', 'converter.yield=2', 'process.card=generic-28', 'process.card.vdd_v=1', '__proto__.a=1', 'title.x=1')
    expect({ code, plan }).toEqual({ code: 2, plan: null })
    const lines = err.trimEnd().split('\n')
    expect(lines[0]).toContain('5 problems')
    expect(lines).toHaveLength(6)
    expect(err).toMatch(/^converter\.lane: .*unknown_key.*converter\.lanes/m)
    expect(err).toMatch(/^converter\.yield: .*out_of_range/m)
    expect(err).toMatch(/^process\.card\.vdd_v: .*wrong_type/m)
    expect(err).toMatch(/^__proto__\.a: .*unknown_key/m)
    expect(err).toMatch(/^title\.x: .*unknown_key/m)
    expect(Object.prototype).not.toHaveProperty('a')
  })

  test('without an equals sign', async () => {
    expect(await run(['plan', file, '--set', 'title'])).toMatchObject({ code: 2, out: '' })
  })
})

describe('waves', () => {
  test('CSV with the overdrive that was asked for', async () => {
    expect(await run(['waves', file, '--overdrive', '5 mV'])).toEqual({ code: 0, out: 'time_s,clock_v\n0,0\n1e-12,0.9\n', err: '' })
  })

  test.each(['0', '-1', '5 ns', '30', 'x'])('no overdrive of %s', async (overdrive) => {
    expect(await run(['waves', file, `--overdrive=${overdrive}`])).toMatchObject({ code: 2, out: '' })
  })

  test('no entry beyond the last', async () => {
    expect(await run(['waves', file, '--index', '9'])).toMatchObject({ code: 2, out: '' })
  })
})

describe('usage', () => {
  test.each([
    [[], 'Usage'], [['plann', 'x'], 'plan'], [['plan'], 'FILE'], [['plan', 'a', 'b'], 'too many'], [['plan', 'a', '--ouy', 'b'], '--out'], [['--nope'], '--nope'],
    [['sheet', 'a'], '--out'], [['sheet', 'a', '--out', 'b', '--paper', 'a3'], 'letter'], [['sheet', 'a', '--out', 'b', '--date', '2026-02-30'], 'YYYY-MM-DD'],
    [['serve', '--port', '70000'], '65535'], [['serve', '--port', 'x'], '65535'], [['help', 'plann'], 'plan'],
  ])('%j is refused with a hint', async (args, hint) => {
    const { code, out, err } = await run(args)
    expect({ code, out }).toEqual({ code: 2, out: '' })
    expect(err).toContain(hint)
  })

  test.each([[], ...faceNames.map((name) => [name])])('%s --help and --version', async (...names) => {
    const help = await run([...names, '--help'])
    expect(help).toMatchObject({ code: 0, err: '' })
    expect(help.out).toContain('Usage: latchwright')
    const version = await run([...names, '--version'])
    expect(version).toMatchObject({ code: 0, err: '' })
    expect(version.out).toMatch(/^\d+\.\d+\.\d+\n$/)
  })

  test('a file that is not there, and a folder', async () => {
    expect(await run(['plan', join(folder, 'none')])).toMatchObject({ code: 3, out: '', err: expect.stringContaining('none') as string })
    expect(await run(['sheet', folder, '--out', join(folder, 's.pdf')])).toMatchObject({ code: 3, out: '' })
  })

  test('a broken plan: how many problems, then one a line, nothing on standard output', async () => {
    const { code, out, err } = await run(['plan', '-'], '{"schema":"latchwright.plan/1","converter":{"architecture":"flash","resolution_bits":99}}')
    expect({ code, out }).toEqual({ code: 2, out: '' })
    expect(err.split('\n')).toEqual([
      'latchwright: 2 problems in the plan', expect.stringMatching(/^converter\.resolution_bits: got 99 /), expect.stringMatching(/^converter\.sample_rate_hz /), '',
    ])
  })
})
