import { beforeAll, describe, expect, it } from 'vitest'
import { resultSchema, type ComparatorEntry, type Result, type Working } from '../../main/contract/result'
import { schemaAt } from '../../main/documents/plan-schema'
import { cases, hopeless } from './cases'
import { valueOf } from './evaluate'
import { planned, read } from './plans'

/** Numbers of comparators are printed to seven digits. */
const printed = 1e-6
const sums = 1e-9

function numbersIn(value: unknown, path = 'result'): [string, number][] {
  if (typeof value === 'number') return [[path, value]]
  return typeof value === 'object' && value !== null ? Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`)) : []
}

function expectClose(actual: number | null | undefined, expected: number, share: number, what: string): void {
  expect(Math.abs(actual! - expected), `${what}: ${actual} instead of ${expected}`).toBeLessThanOrEqual(share * Math.abs(expected))
}

const total = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0)

function limitOf({ limits }: ComparatorEntry, key: keyof ComparatorEntry['use']): number {
  const offset = limits.trim_step_v ?? limits.offset_v
  const { window_s: time, noise_v: noise, kickback_v: kickback, memory_v: memory, input_cap_f: input } = limits
  return { time, noise, offset, kickback, memory, input }[key]
}

function reachedBy({ reached, limits }: ComparatorEntry, key: keyof ComparatorEntry['use']): number | null {
  const offset = limits.trim_step_v === null ? reached.residual_v : reached.trim_step_v
  const { delay_s: time, noise_v: noise, kickback_v: kickback, memory_v: memory, input_cap_f: input } = reached
  return { time, noise, offset, kickback, memory, input }[key]
}

/** Whether a latch comes about at all; else what depends on it is null. */
const latchFails = (result: Result): boolean => result.findings.some((f) => f.code === 'latch_too_slow' || f.code === 'latch_no_regeneration')

function expectWorkings(workings: readonly Working[]): void {
  for (const { id, numbers, value } of workings) {
    if (value === null) continue
    const evaluated = valueOf(numbers)
    expect(Math.abs(evaluated - value), `${id}: ${numbers} gives ${evaluated}, printed ${value}`).toBeLessThanOrEqual(1e-6 * Math.abs(value))
  }
}

function expectUses(entry: ComparatorEntry): void {
  const keys = Object.keys(entry.use) as (keyof ComparatorEntry['use'])[]
  for (const key of keys) {
    const [limit, reached, use] = [limitOf(entry, key), reachedBy(entry, key), entry.use[key]]
    if (reached === null || limit <= 0) expect(use, `${entry.index} ${key}`).toBeNull()
    else expectClose(use, reached / limit, 3 * printed, `use of ${key} at ${entry.index}`)
  }
  const unmet = keys.filter((key) => entry.use[key] === null)
  if (unmet.length > 0) expect(unmet).toContain(entry.tightest)
  else expect(entry.use[entry.tightest!]).toBe(Math.max(...keys.map((key) => entry.use[key]!)))
}

/** Every number of an entry, the totals and the budget, by the id of its working. */
function shownNumbers(result: Result, entry: ComparatorEntry): [string, number | null][] {
  const { ledger, predicted, quantities } = result
  const group = (name: string, values: Readonly<Record<string, number | null>>): [string, number | null][] =>
    Object.entries(values).map(([key, value]) => [`${name}.${key}`, value])
  return [
    ...group('quantities', quantities), ...group('limits', entry.limits), ...group('reached', entry.reached), ...group('predicted', predicted),
    ...result.budget.map(({ item, allowed_v2 }): [string, number] => [`budget.${item}`, allowed_v2]),
    ...[...ledger.power, ...ledger.area].map(({ item, value }): [string, number] => [item, value]),
    ['ledger.power_w', ledger.power_w], ['ledger.area_m2', ledger.area_m2],
  ]
}

const all = { ...cases, ...hopeless }

describe.each(Object.keys(all))('%s', (name) => {
  const document = all[name]
  let result: Result
  let tightest: ComparatorEntry
  beforeAll(() => {
    result = planned(document)
    const rank = (e: ComparatorEntry) => e.use[e.tightest!] ?? Infinity
    tightest = result.comparators.reduce((a, b) => (rank(b) > rank(a) ? b : a))
  })

  it('is a valid result without NaN or Infinity, and survives JSON', () => {
    expect(numbersIn(result).filter(([, value]) => !Number.isFinite(value))).toEqual([])
    const copy: unknown = JSON.parse(JSON.stringify(result))
    expect(copy).toEqual(result)
    expect(resultSchema.safeParse(copy).error?.issues ?? []).toEqual([])
  })

  it('has null exactly where the contract says so', () => {
    const { converter, comparator } = result.plan
    const fails = latchFails(result)
    const flash = converter.architecture === 'flash'
    for (const { limits, reached, threshold_v, cycle } of result.comparators) {
      expect([threshold_v === null, cycle === null]).toEqual([!flash, flash])
      expect([limits.overdrive_v === null, limits.trim_step_v === null, limits.skew_s === null])
        .toEqual([!flash && converter.sar!.timing === 'self_timed', comparator.offset_method !== 'trim', converter.lanes === 1 && !(flash && !converter.flash!.front_sampler)])
      const { trim_step_v, area_m2, ...engine } = reached
      expect(area_m2).toBeGreaterThan(0)
      if (comparator.offset_method !== 'trim') expect(trim_step_v).toBeNull()
      const expected = Object.entries(comparator.offset_method === 'trim' ? { ...engine, trim_step_v } : engine)
      if (!fails) expect(expected.filter(([, value]) => value === null)).toEqual([])
    }
    expect(result.ledger.area_m2).not.toBeNull()
    const powered = !fails || result.ledger.power.some((line) => line.item === 'power.comparators')
    const { ledger, predicted } = result
    expect([ledger.power_w === null, predicted.enob_bits === null, predicted.walden_j === null]).toEqual([!powered, fails, fails])
    expect(result.design.trim_bits === null).toBe(comparator.offset_method !== 'trim')
  })

  it('shows numbers in every working that give its value', () => expectWorkings(result.workings))

  it('opens every number by a working of its id', () => {
    const byId = new Map(result.workings.map((w) => [w.id, w]))
    expect(byId.size).toBe(result.workings.length)
    for (const [id, value] of shownNumbers(result, tightest)) {
      if (value === null && !id.startsWith('limits.')) continue
      expect(byId.has(id), id).toBe(true)
      if (value === null) expect(byId.get(id)!.value).toBeNull()
      else expectClose(byId.get(id)!.value, value, printed, id)
    }
  })

  it('adds up: ledger, budget, uses', () => {
    const { ledger, budget, quantities, predicted } = result
    const [power, area] = [ledger.power, ledger.area].map((lines) => total(lines.map((line) => line.value)))
    if (ledger.power_w !== null) expectClose(ledger.power_w, power, sums, 'power')
    expectClose(ledger.area_m2, area, sums, 'area')
    const allowed = total(budget.map((line) => line.allowed_v2))
    const fixed = total(budget.slice(0, 4).map((line) => line.allowed_v2))
    expectClose(allowed, Math.max(fixed, quantities.error_power_allowed_v2), sums, 'budget')
    if (predicted.enob_bits !== null) {
      const used = total(budget.map((line) => line.used_v2!))
      expectClose(2 ** (-2 * predicted.enob_bits), (12 * used) / result.plan.converter.full_scale_v ** 2, sums, 'effective bits')
    }
    result.comparators.forEach(expectUses)
  })

  it('lists its corners and shows the worst of them', () => {
    const { corners, comparators, ledger } = result
    const perCorner = { typical: 1, slow: 2, fast: 2 }
    expect(corners).toHaveLength(total(result.plan.corners.map((corner) => perCorner[corner])))
    expect(new Set(corners.map((corner) => corner.name)).size).toBe(corners.length)
    expect(corners.map((corner) => corner.name)).toContain(result.design.corner)
    if (latchFails(result)) {
      expect(corners.some((corner) => corner.delay_s === null && !corner.meets)).toBe(true)
      return
    }
    for (const key of ['delay_s', 'noise_v', 'offset_v'] as const) {
      expectClose(Math.max(...comparators.map((c) => c.reached[key]!)), Math.max(...corners.map((c) => c[key]!)), printed, key)
    }
    expect(ledger.power_w).toBe(Math.max(...corners.map((c) => c.power_w!)))
    const over = comparators.some((c) => Object.values(c.use).some((use) => use === null || use > 1))
    expect(corners.every((c) => c.meets)).toBe(!over)
  })

  it('reaches nothing below zero; only t_0, an extrapolation, may be', () => {
    const negative = result.comparators.flatMap(({ index, reached: { integration_s: _, ...rest } }) =>
      Object.entries(rest).filter(([, value]) => value !== null && value < 0).map(([key, value]) => `${index} ${key} ${value}`))
    expect(negative.slice(0, 3)).toEqual([])
  })

  it('points into the plan where something is wrong', () => {
    for (const { path, severity, remedy, remedies } of result.findings) {
      if (path !== null) expect(schemaAt(path.split('.').map((step) => (/^\d+$/.test(step) ? Number(step) : step))), path).not.toBeNull()
      expect(path === null ? severity : 'placed').not.toBe('stop')
      expect(remedy).toBe(remedies[0]?.text ?? null)
    }
  })

  it('writes out the plan that it was given', () => expect(result.plan).toEqual(read(document).plan))
})

describe('workings of another comparator', () => {
  it.each([['first demo', 1], ['first demo', 40], ['two lanes', 100], ['third demo', 1], ['SAR, monotonic', 5]])('%s, %d', (name, index) => {
    const result = planned(cases[name], { remedies: false, workingsFor: index })
    expectWorkings(result.workings)
    const byId = new Map(result.workings.map((w) => [w.id, w.value]))
    for (const [id, value] of shownNumbers(result, result.comparators[index - 1])) {
      if (value === null) expect(byId.get(id) ?? null, id).toBeNull()
      else expectClose(byId.get(id), value, printed, id)
    }
  })
})
