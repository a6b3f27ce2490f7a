import { describe, expect, test } from 'vitest'
import type { Problem } from '../../main/contract/errors'
import { builtInCards } from '../../main/documents/cards'
import { demos } from '../../main/documents/demos'
import { readPlan, validatePlan, type ReadPlan } from '../../main/documents/read-plan'
import { smallest, smallestSar } from './samples'

function read(value: unknown): ReadPlan {
  const reply = validatePlan(value)
  if (!reply.ok) throw new Error(JSON.stringify(reply.error.problems))
  return reply.value
}

function problemsOf(input: unknown): readonly Problem[] {
  const reply = typeof input === 'string' || input instanceof Uint8Array ? readPlan(input) : validatePlan(input)
  if (reply.ok) throw new Error('the document was taken')
  expect(reply.error.code).toBe('bad_document')
  expect(JSON.stringify(reply.error)).not.toMatch(/NaN|Infinity|undefined/)
  return reply.error.problems ?? []
}

const withConverter = (more: object): object => ({ ...smallest, converter: { ...smallest.converter, ...more } })

describe('defaults', () => {
  test('those of the card and the architecture', () => {
    const { plan, card } = read(smallest)
    expect(card.id).toBe('generic-28')
    expect(plan.converter.full_scale_v).toBeCloseTo((2 / 3) * card.vdd_v, 15)
    expect(plan.converter.common_mode_v).toBeCloseTo(0.6 * card.vdd_v, 15)
    expect(plan.converter.enob_bits).toBe(5.4)
    expect(plan.converter.flash).toEqual({
      input_style: 'differential', front_sampler: true, sampling_cap_f: 5e-13, evaluate_fraction: 0.5, capture_latches: 1,
      bank_share: 0.5, ladder_ohm: 200, ladder_sigma: 0.005, encoder: 'ones_counter',
    })
    expect(plan.converter).not.toHaveProperty('sar')
    expect(plan.comparator).not.toHaveProperty('widths')
    expect(plan.converter.input_frequency_hz).toBeNull()
    expect(plan.comparator.trim_bits).toBeNull()
    expect(plan.budget.clock_uncertainty_s).toBeNull()
    expect(plan.overrides).toEqual([])
    expect(plan.corners).toEqual(['typical'])
  })

  test('a SAR gets its own block, and keeps the other one only when it was there', () => {
    expect(read(smallestSar).plan.converter).not.toHaveProperty('flash')
    expect(read(smallestSar).plan.converter.sar?.unit_cap_f).toBe(1e-15)
    const both = read({ ...smallestSar, converter: { ...smallestSar.converter, flash: { ladder_ohm: 300 } } })
    expect(both.plan.converter.flash?.ladder_ohm).toBe(300)
  })

  test('corners are expanded in their order, each once', () => {
    expect(read({ ...smallest, corners: ['all'] }).plan.corners).toEqual(['typical', 'slow', 'fast'])
    expect(read({ ...smallest, corners: ['fast', 'slow', 'fast'] }).plan.corners).toEqual(['slow', 'fast'])
  })

  test('manual widths get the shortest length of the card', () => {
    const widths = { input_m: 4e-6, cross_n_m: 2e-6, cross_p_m: 2e-6, tail_m: 4e-6, reset_m: 1e-6 }
    const { plan, card } = read({ ...smallest, comparator: { sizing: 'manual', widths } })
    expect(plan.comparator.widths).toEqual({ ...widths, input_length_m: card.l_min_m, extra_cap_f: 0 })
  })

  test('a completed plan is a plan, and completing it again changes nothing', () => {
    const { plan } = read(smallest)
    expect(read(plan).plan).toEqual(plan)
  })

  test('a whole card in place', () => {
    const own = { ...builtInCards[0], id: 'mine', vdd_v: 3 }
    const { plan, card } = read({ ...smallest, process: { card: own } })
    expect(card).toEqual(own)
    expect(plan.converter.full_scale_v).toBe(2)
  })

  test('every card and every demo plan of the program can be read', () => {
    expect(builtInCards.map((card) => card.id)).toContain('generic-28')
    for (const card of builtInCards) expect(read({ ...smallest, process: { card: card.id } }).card).toBe(card)
    for (const demo of demos) expect(read(demo.document).changes, demo.id).toEqual([])
  })
})

describe('what is refused, all of it at once', () => {
  test('schema and cross-checks together', () => {
    const problems = problemsOf({
      schema: 'latchwright.plan/1', tittle: 'x',
      converter: {
        architecture: 'flash', resolution_bits: 12, sample_rate_hz: '2G', yield: 2, inl_method: 'best-fit', sample_rate: 1,
        flash: { input_style: 'single_ended' },
      },
      comparator: { topology: 'double_tail', sizing: 'manual' }, process: { card: 'generic-23' },
    })
    const said = problems.map((problem) => `${problem.code} ${problem.path}`).sort()
    expect(said).toEqual([
      'missing comparator.widths', 'not_a_choice converter.inl_method', 'not_available_yet converter.flash.input_style',
      'out_of_range converter.resolution_bits', 'out_of_range converter.yield', 'unknown_card process.card', 'unknown_key converter.sample_rate',
      'unknown_key tittle', 'wrong_type converter.sample_rate_hz',
    ])
    const hints = Object.fromEntries(problems.map((problem) => [problem.path, problem.hint]))
    expect(hints['tittle']).toContain('title')
    expect(hints['converter.sample_rate']).toContain('sample_rate_hz')
    expect(hints['converter.sample_rate_hz']).toContain('2000000000')
    expect(hints['converter.inl_method']).toContain('best_fit')
    expect(hints['process.card']).toContain('generic-')
    expect(problems.find((problem) => problem.path === 'converter.resolution_bits')?.allowed).toContain('2 bit to 10 bit with architecture flash')
  })

  test.each([
    ['resolution of a flash', withConverter({ resolution_bits: 11 }), 'out_of_range', 'converter.resolution_bits'],
    ['resolution of a SAR', { ...smallestSar, converter: { ...smallestSar.converter, resolution_bits: 3 } }, 'out_of_range', 'converter.resolution_bits'],
    ['as many redundant cycles as bits', { ...smallestSar, converter: { ...smallestSar.converter, sar: { redundant_cycles: smallestSar.converter.resolution_bits } } },
      'out_of_range', 'converter.sar.redundant_cycles'],
    ['no document', null, 'wrong_type', ''],
    ['a list', [], 'wrong_type', ''],
    ['a number', 5, 'wrong_type', ''],
    ['nothing in it', {}, 'missing', 'schema'],
    ['a later version', { ...smallest, schema: 'latchwright.plan/2', new: 1 }, 'newer_than_program', 'schema'],
    ['a result', { schema: 'latchwright.result/1' }, 'not_a_choice', 'schema'],
    ['null where there is no null', withConverter({ enob_bits: null }), 'wrong_type', 'converter.enob_bits'],
    ['half a bit', withConverter({ resolution_bits: 6.5 }), 'wrong_type', 'converter.resolution_bits'],
    ['a card that is not whole', { ...smallest, process: { card: { ...builtInCards[0], vdd_v: -1 } } }, 'out_of_range', 'process.card.vdd_v'],
    ['an empty card', { ...smallest, process: { card: {} } }, 'missing', 'process.card.id'],
    ['a card of a wrong type', { ...smallest, process: { card: 28 } }, 'wrong_type', 'process.card'],
    ['a key in the wrong place', { ...smallest, sample_rate_hz: 1e9 }, 'unknown_key', 'sample_rate_hz'],
    ['an unknown override', { ...smallest, overrides: [{ item: 'power.encodr', value: 1 }] }, 'not_a_choice', 'overrides.0.item'],
    ['no corner', { ...smallest, corners: [] }, 'out_of_range', 'corners'],
    ['half a character', { ...smallest, title: 'a\ud800' }, 'wrong_type', 'title'],
  ])('%s', (_, document, code, path) => {
    expect(problemsOf(document)).toContainEqual(expect.objectContaining({ code, path }))
  })

  test('options of the block without effect are no obstacle', () => {
    expect(read({ ...smallest, converter: { ...smallest.converter, sar: { timing: 'self_timed', redundant_cycles: 2 } } }).plan.converter.sar?.timing).toBe('self_timed')
    expect(problemsOf({ ...smallest, converter: { ...smallest.converter, sar: { range_loss: 3 } } }))
      .toContainEqual(expect.objectContaining({ code: 'out_of_range', path: 'converter.sar.range_loss' }))
  })
})

describe('bytes and text', () => {
  const text = JSON.stringify(smallest)
  const bytes = new TextEncoder().encode(text)

  test('UTF-8 with and without a byte order mark', () => {
    const plain = readPlan(bytes)
    const marked = readPlan(new Uint8Array([0xef, 0xbb, 0xbf, ...bytes]))
    expect(plain).toMatchObject({ ok: true, value: { changes: [] } })
    expect(marked).toMatchObject({ ok: true, value: { changes: [expect.stringContaining('byte order mark')] } })
    expect(readPlan(`\uFEFF${text}`)).toMatchObject({ ok: true })
  })

  test.each([
    ['UTF-16 little', new Uint8Array(Buffer.from(`\uFEFF${text}`, 'utf16le')), 'not_text', 'UTF-16'],
    ['UTF-16 without mark', new Uint8Array(Buffer.from(text, 'utf16le')), 'not_text', 'UTF-16'],
    ['not UTF-8', new Uint8Array([...bytes.slice(0, 10), 0xff, 0xfe, 0xfd]), 'not_text', 'not UTF-8'],
    ['binary', new Uint8Array([0x25, 0x50, 0x44, 0x46, 0x2d, 0, 1, 2]), 'not_text', 'binary'],
  ])('%s', (_, input, code, value) => {
    expect(problemsOf(input)).toEqual([expect.objectContaining({ code, value: expect.stringContaining(value) as string })])
  })

  test.each([
    ['', 'line 1, column 1'], ['{\n  "a": 1,\n}', 'line 3, column 1'], ["{'a': 1}", 'line 1, column 2'], ['{"a": 1 "b": 2}', 'line 1, column 9'],
    ['{"a": NaN}', 'line 1, column 7'], ['{"a": 1} x', 'line 1, column 10'], ['{"a": // b\n1}', 'line 1, column 7'], ['[1, 2', 'line 1, column 6'],
    ['{"a": "b\n"}', 'line 1, column 9'], ['{"a": 01}', 'line 1, column 7'], ['{"a": "\\x"}', 'line 1, column 8'], ['{"a" 1}', 'line 1, column 6'], ['[1,]', 'line 1, column 4'],
    ['{"a": 1]', 'line 1, column 8'], ['{"a": tru}', 'line 1, column 7'], ['nul', 'line 1, column 1'], ['"\\u12"', 'line 1, column 2'],
  ])('broken JSON %j says where', (input, where) => {
    const [problem, ...more] = problemsOf(input)
    expect(more).toEqual([])
    expect(problem).toMatchObject({ code: 'not_json', path: '' })
    expect(problem.value.startsWith(where), problem.value).toBe(true)
    expect(() => JSON.parse(input) as unknown).toThrow()
  })

  test('keys that stand twice, together with the rest', () => {
    const doubled = '{"schema":"latchwright.plan/1","converter":{"architecture":"flash","resolution_bits":6,"resolution_bits":99,"sample_rate_hz":2e9}}'
    expect(problemsOf(doubled).map((problem) => `${problem.code} ${problem.path}`)).toEqual([
      'repeated_key converter.resolution_bits', 'out_of_range converter.resolution_bits',
    ])
  })

  test.each(['__proto__', 'constructor', 'toString', 'hasOwnProperty'])('the key %s is an unknown key', (key) => {
    const problems = problemsOf(text.replace('{', `{"${key}": {"a": 1},`))
    expect(problems).toEqual([expect.objectContaining({ code: 'unknown_key', path: key })])
    expect(Object.prototype).not.toHaveProperty('a')
  })

  test('numbers beyond a double', () => {
    expect(problemsOf(text.replace('2000000000', '1e999'))).toEqual([expect.objectContaining({ code: 'out_of_range', path: 'converter.sample_rate_hz' })])
  })

  test.each([['[', 100_000], ['{"a":', 100_000], ['[', 65]])('deep nesting of %j', (open, levels) => {
    expect(problemsOf(open.repeat(levels))).toEqual([expect.objectContaining({ code: 'too_deep' })])
    let nested: unknown = 1
    for (let i = 0; i < 5000; i += 1) nested = [nested]
    expect(problemsOf({ ...smallest, notes: nested })).toEqual([expect.objectContaining({ code: 'too_deep' })])
  })

  test('a text too large is refused before it is looked at', () => {
    expect(problemsOf('x'.repeat(5_000_001))).toEqual([expect.objectContaining({ code: 'too_large' })])
  })

  test('a key of a megabyte is not told again with every problem under it', () => {
    const repeated = Array.from({ length: 1500 }, (_, i) => `"k${i}":0,"k${i}":"\\ud800"`).join(',')
    const long = 'x'.repeat(1_000_000)
    const refused = readPlan(`{"${long}":{${repeated}}}`)
    expect(JSON.stringify(refused).length).toBeLessThan(100_000)
    expect(problemsOf(`{"${long}":{"a":1,"a":2}}`)).toContainEqual(expect.objectContaining({ code: 'repeated_key', path: `${'x'.repeat(59)}….a` }))
  })

  test('megabytes of trouble end in seconds', () => {
    const started = performance.now()
    const keys = Array.from({ length: 100_000 }, (_, i) => `"k${i}":0`).join(',')
    const many = readPlan(`{${keys}}`)
    expect(JSON.stringify(many).length).toBeLessThan(100_000)
    expect(many).toMatchObject({ ok: false, error: { message: expect.stringMatching(/^More than 100 problems/) as string } })
    expect(problemsOf(`{${keys}}`)).toHaveLength(100)
    expect(problemsOf(`{"title": "${'\\n'.repeat(2_000_000)}"}`)).toContainEqual(expect.objectContaining({ path: 'title' }))
    expect(performance.now() - started).toBeLessThan(60_000)
  })
})
