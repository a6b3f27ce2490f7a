import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Limits } from '../../main/contract/result'
import { pairSpread } from '../../main/planner/models/offset/mismatch'
import { changed, flashOf, plainWidths, planned, sarOf, sounder, type Changes } from './plans'

const runs = { numRuns: 12, seed: 20 }
const manual: Changes = { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths, 'comparator.offset_method': 'size', corners: ['typical'] }
const room = 1 + 1e-6

const flashLimits = (changes: Changes, bits = 4): Limits[] => planned(flashOf(bits, 1e9, { ...manual, ...changes })).comparators.map((c) => c.limits)
const sarLimits = (changes: Changes): Limits[] => planned(sarOf(8, 2e7, { ...manual, ...changes })).comparators.map((c) => c.limits)

/** No entry of the second list is above that of the first. */
function expectNoHigher(before: readonly Limits[], after: readonly Limits[], key: keyof Limits): void {
  expect(after).toHaveLength(before.length)
  before.forEach((limits, i) => expect(after[i][key]!, `${key} of ${i + 1}`).toBeLessThanOrEqual(limits[key]! * room + 1e-30))
}

const exponent = (from: number, to: number) => fc.double({ min: from, max: to, noNaN: true }).map((x) => 10 ** x)
const factor = fc.double({ min: 1.01, max: 20, noNaN: true })

describe('asking for more never gives more room', () => {
  it('a tighter error rate never lengthens the regeneration limit or raises the overdrive', () => {
    fc.assert(fc.property(exponent(-20, -4), factor, (rate, by) => {
      for (const limits of [flashLimits, sarLimits]) {
        const [loose, tight] = [limits({ 'converter.error_rate': rate }), limits({ 'converter.error_rate': rate / by })]
        expectNoHigher(loose, tight, 'tau_s')
        expectNoHigher(loose, tight, 'overdrive_v')
      }
    }), runs)
  })

  it('more lanes never shorten a window, nor does a lower rate', () => {
    fc.assert(fc.property(exponent(7, 9.5), fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 4 }), factor, (rate, lanes, more, by) => {
      const at = (changes: Changes) => flashLimits({ 'converter.sample_rate_hz': rate, 'converter.lanes': lanes, ...changes })
      const window = at({})[0].window_s
      expect(at({ 'converter.lanes': lanes + more })[0].window_s).toBeGreaterThanOrEqual(window)
      expect(at({ 'converter.sample_rate_hz': rate / by })[0].window_s).toBeGreaterThanOrEqual(window)
    }), runs)
  })

  it('a slower DAC or logic, or finer settling, never lengthens a cycle’s window', () => {
    fc.assert(fc.property(fc.constantFrom('converter.sar.dac_tau_s', 'converter.sar.logic_delay_s'), exponent(-12, -9), factor, (path, time, by) => {
      expectNoHigher(sarLimits({ [path]: time }), sarLimits({ [path]: time * by }), 'window_s')
    }), runs)
    expectNoHigher(sarLimits({ 'converter.sar.settle_lsb': 0.5 }), sarLimits({ 'converter.sar.settle_lsb': 0.125 }), 'window_s')
  })

  it('more jitter, effective bits or heat never leaves more noise', () => {
    fc.assert(fc.property(exponent(-14, -12), factor, fc.double({ min: 2, max: 3.9, noNaN: true }), (jitter, by, enob) => {
      const plain = flashLimits({ 'converter.jitter_s': jitter, 'converter.enob_bits': enob })
      expectNoHigher(plain, flashLimits({ 'converter.jitter_s': jitter * by, 'converter.enob_bits': enob }), 'noise_v')
      expectNoHigher(plain, flashLimits({ 'converter.jitter_s': jitter, 'converter.enob_bits': enob + 0.05 }), 'noise_v')
      expectNoHigher(plain, flashLimits({ 'converter.jitter_s': jitter, 'converter.enob_bits': enob, corners: ['typical', 'slow'] }), 'noise_v')
    }), runs)
  })

  it('a higher yield, a tighter INL or DNL, or a poorer ladder never leaves more offset', () => {
    fc.assert(fc.property(fc.double({ min: 0.5, max: 0.9, noNaN: true }), fc.double({ min: 0.2, max: 1, noNaN: true }), (given, lsb) => {
      const base: Changes = { 'converter.yield': given, 'converter.inl_lsb': lsb, 'converter.dnl_lsb': lsb, 'converter.flash.ladder_sigma': 0.01 }
      const plain = flashLimits(base)
      const harder: Changes[] = [
        { 'converter.yield': (1 + given) / 2 }, { 'converter.inl_lsb': 0.8 * lsb }, { 'converter.dnl_lsb': 0.8 * lsb },
        { 'converter.flash.ladder_sigma': 0.02 },
      ]
      for (const change of harder) expectNoHigher(plain, flashLimits({ ...base, ...change }), 'offset_v')
    }), runs)
  })

  it('one more capture latch never asks for a smaller overdrive', () => {
    const overdrives = [0, 1, 2, 3].map((latches) => flashLimits({ 'converter.flash.capture_latches': latches })[0].overdrive_v!)
    for (let i = 1; i < 4; i++) expect(overdrives[i]).toBeGreaterThanOrEqual(overdrives[i - 1])
  })
})

describe('mismatch', () => {
  it('a wider or longer pair never spreads more, a quarter of the area spreads twice as much', () => {
    fc.assert(fc.property(exponent(-9, -8), exponent(-7, -4), exponent(-8, -6), factor, (coefficient, width, length, by) => {
      const spread = pairSpread(coefficient, width, length)
      expect(pairSpread(coefficient, width * by, length)).toBeLessThan(spread)
      expect(pairSpread(coefficient, width, length * by)).toBeLessThan(spread)
      expect(pairSpread(coefficient, width / 2, length / 2) / spread).toBeCloseTo(2, 12)
    }))
  })

  it('a wider input pair never has more of the offset', () => {
    fc.assert(fc.property(fc.double({ min: 1e-6, max: 8e-6, noNaN: true }), fc.double({ min: 1.1, max: 3, noNaN: true }), (width, by) => {
      const withInput = (input_m: number) => flashOf(4, 1e9, { ...manual, 'comparator.widths': { ...plainWidths, input_m } })
      const part = (input_m: number) => planned(withInput(input_m)).design.offset_parts_v.input!
      expect(part(width * by)).toBeLessThan(part(width))
    }), runs)
  })
})

describe('the bank', () => {
  it('goes lane by lane, from the lowest threshold to the highest, half an LSB clear of both ends', () => {
    const { comparators, quantities } = planned(flashOf(3, 1e9, { ...manual, 'converter.lanes': 2, 'converter.full_scale_v': 0.8 }))
    expect(comparators.map((c) => c.index)).toEqual(Array.from({ length: 14 }, (_, i) => i + 1))
    expect(comparators.map((c) => c.lane)).toEqual([...Array<number>(7).fill(0), ...Array<number>(7).fill(1)])
    const thresholds = [-0.3, -0.2, -0.1, 0, 0.1, 0.2, 0.3]
    comparators.forEach((c, i) => expect(c.threshold_v).toBeCloseTo(thresholds[i % 7], 12))
    expect(quantities).toMatchObject({ comparator_count: 14, decision_rate_hz: 7e9 })
  })

  it('has limits that mirror at its middle and are hardest there', () => {
    const offsets = flashLimits({ 'converter.flash.ladder_sigma': 0.02, 'converter.inl_lsb': 0.3 }, 5).map((l) => l.offset_v)
    expect([...offsets].reverse()).toEqual(offsets)
    expect(offsets.indexOf(Math.min(...offsets))).toBe(15)
    expect(offsets[0]).toBeGreaterThan(offsets[15])
  })

  it('of a search is one comparator, its cycles one after the other', () => {
    const { comparators, quantities } = planned(sarOf(8, 2e7, manual))
    expect(comparators.map((c) => c.cycle)).toEqual([1, 2, 3, 4, 5, 6, 7, 8])
    expect(quantities).toMatchObject({ comparator_count: 1, decision_rate_hz: 1.6e8 })
  })

  it('sees the common mode fall with a monotonic array, towards a quarter of full scale below', () => {
    const monotonic: Changes = { 'converter.sar.dac_scheme': 'monotonic', 'converter.common_mode_v': 0.7, 'converter.full_scale_v': 0.4 }
    const { comparators } = planned(sarOf(8, 2e7, { ...manual, ...monotonic }))
    const modes = comparators.map((c) => c.common_mode_v)
    expect(modes[0]).toBe(0.7)
    expect(modes[1]).toBeCloseTo(0.65, 9)
    for (let i = 1; i < 8; i++) expect(modes[i]).toBeLessThan(modes[i - 1])
    expect(modes[7]).toBeGreaterThan(0.6)
  })
})

describe('what does not belong together does not touch', () => {
  const plain = planned(flashOf(4, 1e9, manual))

  it('widths change nothing of the limits', () => {
    const wider = planned(flashOf(4, 1e9, { ...manual, 'comparator.widths': { ...plainWidths, input_m: 5e-6, reset_m: 2e-6 } }))
    expect(wider.comparators.map((c) => c.limits)).toEqual(plain.comparators.map((c) => c.limits))
    expect(wider.comparators[0].reached).not.toEqual(plain.comparators[0].reached)
  })

  it('a share moves its own limit in proportion', () => {
    const doubled = flashLimits({ 'budget.kick_share': 0.5, 'budget.memory_share': 0.2 })
    plain.comparators.forEach(({ limits }, i) => {
      expect(doubled[i]).toEqual({ ...limits, kickback_v: 2 * limits.kickback_v, memory_v: 2 * limits.memory_v })
    })
  })

  it('an override changes its line and the total, nothing else', () => {
    const document = changed(sounder, { ...manual, overrides: [] })
    const before = planned(document)
    const after = planned(changed(document, { overrides: [{ item: 'power.ladder', value: 0.5 }] }))
    const line = before.ledger.power.find((l) => l.item === 'power.ladder')!
    expect(after.ledger.power.find((l) => l.item === 'power.ladder')).toMatchObject({ value: 0.5, overridden: true })
    expect(after.ledger.power.filter((l) => l.item !== 'power.ladder')).toEqual(before.ledger.power.filter((l) => l.item !== 'power.ladder'))
    expect(after.ledger.power_w! - before.ledger.power_w!).toBeCloseTo(0.5 - line.value, 12)
    expect(after.comparators).toEqual(before.comparators)
  })

  it('the block of the other architecture has no effect', () => {
    const { plan: _, ...rest } = plain
    const { plan: __, ...besides } = planned(flashOf(4, 1e9, { ...manual, 'converter.sar': { unit_cap_f: 7e-15, dac_scheme: 'monotonic' } }))
    expect(besides).toEqual(rest)
  })
})
