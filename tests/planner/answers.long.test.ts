import fc from 'fast-check'
import { describe, it } from 'vitest'
import { expectAnswer } from './answers'
import { wellFormed } from './arbitrary'

describe('every well-formed plan is answered', () => {
  it('with widths as given', () => {
    fc.assert(fc.property(wellFormed('manual', 20, { flash: 6, sar: 12 }), expectAnswer), { numRuns: 3000, seed: 11 })
  })

  it('sized', () => {
    fc.assert(fc.property(wellFormed('auto', 6, { flash: 5, sar: 10 }), expectAnswer), { numRuns: 150, seed: 12 })
  })
})
