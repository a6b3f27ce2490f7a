import { beforeAll, describe, expect, it, vi } from 'vitest'
import type { Result } from '../../main/contract/result'
import { demos } from '../../main/documents/demos'
import { plan } from '../../main/planner/plan'
import { changed, logger, mast, planned, plainWidths, read, sounder, stops, type Changes } from './plans'

describe.each(demos)('demo: $title', ({ document }) => {
  let result: Result
  beforeAll(() => { result = planned(document, {}) })

  it('can be built: no stop, every limit met, every corner meets', () => {
    expect(stops(result)).toEqual([])
    const uses = result.comparators.flatMap((c) => Object.values(c.use))
    expect(Math.max(...uses.map((use) => use ?? Infinity))).toBeLessThanOrEqual(1)
    expect(result.corners.every((corner) => corner.meets)).toBe(true)
  })

  it('predicts at least the effective bits asked for', () => {
    expect(result.predicted.enob_bits).toBeGreaterThanOrEqual(result.plan.converter.enob_bits)
  })

  it('is at some limit: nothing is bought that is not needed', () => {
    expect(Math.max(...result.comparators.map((c) => c.use[c.tightest!]!))).toBeGreaterThan(0.98)
  })

  it('has devices that can be drawn', () => {
    const { card } = read(document)
    const { input_length_m, extra_cap_f, ...widths } = result.design.widths
    expect(Math.min(...Object.values(widths))).toBeGreaterThanOrEqual(card.w_min_m)
    expect(input_length_m).toBeGreaterThanOrEqual(card.l_min_m)
    expect(extra_cap_f).toBeGreaterThanOrEqual(0)
  })
})

it('the first demo is evaluated at all five corners, named by what they are', () => {
  expect(planned(sounder).corners.map((corner) => corner.name)).toEqual([
    'typical · 0.9 V · 27 °C', 'slow · 0.81 V · 125 °C', 'slow · 0.81 V · −40 °C', 'fast · 0.99 V · 125 °C', 'fast · 0.99 V · −40 °C',
  ])
})

describe('the same plan gives the same result', () => {
  const asText = (document: unknown) => JSON.stringify(planned(document))

  it('twice', () => expect(planned(logger)).toEqual(planned(logger)))

  it('after enough other plans that nothing is remembered', () => {
    const before = asText(logger)
    const manual: Changes = { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths }
    for (let i = 0; i < 8; i++) planned(changed(sounder, { ...manual, 'comparator.load_f': (2 + i) * 1e-15 }))
    planned(mast)
    expect(asText(logger)).toBe(before)
  })

  it('in a fresh planner, in another order', async () => {
    const first = [mast, logger].map(asText)
    vi.resetModules()
    const fresh = await import('../../main/planner/plan')
    const again = [logger, mast].map((document) => {
      const { plan: complete, card } = read(document)
      return JSON.stringify(fresh.plan(complete, card, { remedies: false }))
    })
    expect(again.reverse()).toEqual(first)
  })

  it('does not depend on words', () => {
    const { plan: _, ...rest } = planned(logger)
    const { plan: __, ...renamed } = planned(changed(logger, { title: 'Another', notes: 'other words', author: 'N. N.' }))
    expect(renamed).toEqual(rest)
  })

  it('leaves the plan it was given as it was', () => {
    const { plan: document, card } = read(logger)
    const frozen = <T>(value: T): T => {
      if (typeof value === 'object' && value !== null) Object.values(value).forEach(frozen)
      return Object.freeze(value)
    }
    expect(plan(frozen(document), frozen(card), {})).toEqual(planned(logger, {}))
  })
})
