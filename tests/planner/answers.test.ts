import fc from 'fast-check'
import { describe, it } from 'vitest'
import { expectAnswer } from './answers'
import { wellFormed } from './arbitrary'

/** Whatever is well formed gets a full result; shrunk to the fewest values that break it. */
describe('every well-formed plan is answered', () => {
  it('with widths as given, a few values anywhere in their ranges', () => {
    fc.assert(fc.property(wellFormed('manual', 3, { flash: 5, sar: 10 }), expectAnswer), { numRuns: 120, seed: 1 })
  })

  it('with many values far out', () => {
    fc.assert(fc.property(wellFormed('manual', 14, { flash: 4, sar: 8 }), expectAnswer), { numRuns: 80, seed: 2 })
  })

  it('sized', () => {
    fc.assert(fc.property(wellFormed('auto', 2, { flash: 4, sar: 8 }), expectAnswer), { numRuns: 6, seed: 3 })
  })
})
