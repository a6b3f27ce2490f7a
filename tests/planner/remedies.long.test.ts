import { expect, it } from 'vitest'
import { changed, flashOf, logger, mast, planned, sarOf, sounder } from './plans'
import { expectRemedies } from './remedies'

it.each([
  ['eight bits without trim', changed(mast, { 'comparator.offset_method': 'size' })],
  ['twice the rate at all corners', changed(sounder, { 'converter.sample_rate_hz': 4e9 })],
  ['too many effective bits', changed(sounder, { 'converter.enob_bits': 6 })],
  ['a monotonic search', changed(logger, { 'converter.sar.dac_scheme': 'monotonic', corners: ['typical'] })],
  ['the smallest flash plan', flashOf(6, 1e9)],
  ['a fast search', sarOf(8, 4e8)],
])('each remedy was tried and works: %s', (_, document) => expectRemedies(document))

it('an infeasible bank of 1023 comparators with its remedies stays under a megabyte', () => {
  const result = planned(flashOf(10, 1e9), {})
  expect(new TextEncoder().encode(JSON.stringify(result)).length).toBeLessThan(1_000_000)
})
