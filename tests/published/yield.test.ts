import { describe, it } from 'vitest'
import { absoluteInlYield } from '../../main/planner/models/yield/absolute-inl'
import { dnlYield } from '../../main/planner/models/yield/dnl'
import { dnlSigmaLimit, inlSigmaLimit } from '../../main/planner/models/yield/sigma-limits'
import { terminalInlYield } from '../../main/planner/models/yield/terminal-inl'
import { expectPrinted } from './tolerance'
import published from './yield.json'

describe('largest spread for 99 % yield at 0.5 LSB (derived)', () => {
  const { yieldEach, limitLsb, rows } = published.sigmaLimits
  for (const { count, dnl, absolute, terminal } of rows) {
    it(`${count} thresholds`, () => {
      expectPrinted(limitLsb * dnlSigmaLimit(count, yieldEach), dnl, 'DNL')
      expectPrinted(limitLsb * inlSigmaLimit('absolute', count, yieldEach), absolute, 'absolute INL')
      expectPrinted(limitLsb * inlSigmaLimit('terminal', count, yieldEach), terminal, 'terminal INL')
    })
  }
})

describe('yield of a given spread at 0.5 LSB limits (derived)', () => {
  const { limitLsb, rows } = published.yields
  for (const { bits, sigmaLsb, absolute, terminal, dnl } of rows) {
    it(`${bits} bit, σ ${sigmaLsb} LSB`, () => {
      const count = 2 ** bits - 1
      const ratio = limitLsb / sigmaLsb
      if (absolute) expectPrinted(100 * absoluteInlYield(count, ratio), absolute, 'absolute INL')
      expectPrinted(100 * terminalInlYield(count, ratio), terminal, 'terminal INL')
      expectPrinted(100 * dnlYield(count, ratio), dnl, 'DNL')
    })
  }
})

it('spread limits of the worked flash case (derived)', () => {
  const { count, yieldEach, terminal, dnl } = published.workedCase
  expectPrinted(terminal.limitLsb * inlSigmaLimit('terminal', count, yieldEach), terminal.value, 'terminal INL')
  expectPrinted(dnl.limitLsb * dnlSigmaLimit(count, yieldEach), dnl.value, 'DNL')
})
