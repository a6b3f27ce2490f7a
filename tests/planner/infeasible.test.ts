import { describe, expect, it } from 'vitest'
import type { Limits, Result } from '../../main/contract/result'
import { cases, hopeless } from './cases'
import { changed, flashOf, logger, planned, sarOf, sounder, stops, type Changes } from './plans'
import { expectRemedies } from './remedies'

/** How the code of the stop starts that each hopeless plan must have, whatever else stops it. */
const reasons: Readonly<Record<string, string>> = {
  'nothing left of the budget': 'budget_exhausted',
  'nothing left, SAR': 'budget_exhausted',
  'no window, flash': 'window_negative',
  'no window, SAR': 'window_negative',
  'a ladder that eats all': 'ladder_exhausts_offset',
  'a DAC that misses the yield': 'dac_mismatch_yield',
  'a hopeless rate': 'window_negative',
  'no time for a self-timed search': 'window_negative',
  'a common mode of nothing': 'latch_',
  'no common mode, trimmed, all corners': 'latch_',
  'a trim of one bit': 'offset_over_limit',
  'widths below the minimum': 'width_below_minimum',
}

describe('what cannot be built stops, and says why', () => {
  it.each(Object.keys(hopeless))('%s', (name) => {
    const result = planned(hopeless[name])
    expect(stops(result).filter((code) => code.startsWith(reasons[name])), stops(result).join()).not.toEqual([])
    const severities = result.findings.map((f) => f.severity)
    expect(severities).toEqual([...severities].sort((a, b) => ['stop', 'caution', 'note'].indexOf(a) - ['stop', 'caution', 'note'].indexOf(b)))
  })

  it('but a plan that can be built does not', () => expect(stops(planned(cases['offset by size']))).toEqual([]))
})

describe('limits without a positive solution', () => {
  const every = (result: Result, look: (limits: Limits) => boolean) => result.comparators.every((c) => look(c.limits))

  it('R ≤ 0: both spreads are 0, their use is null and one of them is named', () => {
    const result = planned(hopeless['nothing left of the budget'])
    expect(every(result, (l) => l.noise_v === 0 && l.offset_v === 0 && l.trim_step_v === 0)).toBe(true)
    for (const { use, tightest } of result.comparators) {
      expect([use.noise, use.offset]).toEqual([null, null])
      expect(['noise', 'offset']).toContain(tightest)
    }
    const shared = result.budget.filter((line) => ['threshold_spread', 'comparator_noise'].includes(line.item))
    expect(shared.map((line) => line.allowed_v2)).toEqual([0, 0])
  })

  it('a window is shown as computed, even below zero; τ is then 0 and time is named', () => {
    const result = planned(hopeless['a hopeless rate'])
    const { limits, use, tightest } = result.comparators[0]
    expect(limits.window_s).toBeCloseTo(0.5e-12 - 1.5 * 1.1e-11, 15)
    expect([limits.tau_s, use.time, tightest]).toEqual([0, null, 'time'])
    expect(limits.integration_s).toBeLessThan(0)
    expect(limits.overdrive_v).toBeGreaterThan(0)
  })

  it('cycles of a search keep their own windows: the first has one where later ones have none', () => {
    const { comparators } = planned(hopeless['no window, SAR'])
    expect(comparators[0].limits.window_s).toBeGreaterThan(0)
    const negative = comparators.filter((c) => c.limits.window_s <= 0)
    expect(negative.length).toBeGreaterThan(5)
    expect(negative.every((c) => c.limits.tau_s === 0 && c.use.time === null && c.tightest === 'time')).toBe(true)
  })

  it('a ladder that eats all leaves nothing for offset', () => {
    const result = planned(hopeless['a ladder that eats all'])
    expect(every(result, (l) => l.offset_v === 0 && l.trim_step_v === 0 && l.noise_v > 0)).toBe(true)
    expect(result.comparators.every((c) => c.tightest === 'offset')).toBe(true)
  })

  it('an overdrive beyond the supply has no τ: 0', () => {
    const { limits } = planned(cases['an error rate of a half']).comparators[0]
    expect(limits.overdrive_v).toBeGreaterThan(0.45)
    expect(limits.tau_s).toBe(0)
  })

})

const typical: Changes = { corners: ['typical'] }

/** Plans that miss something a person can change. */
const remediable: Readonly<Record<string, unknown>> = {
  'twice the rate': changed(sounder, { ...typical, 'converter.sample_rate_hz': 4e9 }),
  'a poor ladder': changed(sounder, { ...typical, 'converter.flash.ladder_sigma': 0.06 }),
  'a low common mode': changed(logger, { ...typical, 'converter.common_mode_v': 0.3 }),
  'the smallest SAR plan': sarOf(10, 2e7),
}

describe('remedies', () => {
  it.each(Object.keys(remediable))('each was tried and works: %s', (name) => expectRemedies(remediable[name]))

  it('only stops have them', () => {
    const result = planned(changed(sounder, { corners: ['typical'] }), {})
    expect(result.findings.length).toBeGreaterThan(0)
    expect(result.findings.flatMap((f) => f.remedies)).toEqual([])
  })
})

describe('the nearest design', () => {
  it('is shown for each of 1023 comparators in less than a megabyte, with room for remedies', () => {
    for (const changes of [{}, { 'comparator.offset_method': 'trim', corners: ['all'] }]) {
      const result = planned(flashOf(10, 1e9, changes))
      expect(stops(result).length).toBeGreaterThan(0)
      expect(result.comparators).toHaveLength(1023)
      expect(new TextEncoder().encode(JSON.stringify(result)).length).toBeLessThan(980_000)
    }
  })

  it('spreads what it misses: the two hardest limits are missed alike', () => {
    const { comparators } = planned(flashOf(6, 1e9))
    const worst = Math.max(...comparators.map((c) => c.use.offset!))
    expect(worst).toBeGreaterThan(1)
    expect(comparators[31].use.input! / worst).toBeCloseTo(1, 2)
  })
})
