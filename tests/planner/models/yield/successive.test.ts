import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { comparatorPerBitLoss, comparatorPerBitSigmaLimit, sarDacSigmaLimit } from '../../../../main/planner/models/yield/successive'
import { erf, normalCdfInverse } from '../../../../main/planner/numerics/statistics'
import { expectCrossCheck, expectExactLaw } from '../../../published/tolerance'
import { countingRoom, seededNormal, seededUniform } from './chips'

/** Thresholds of a binary search whose cycles have comparators of their own: follow every code edge, one offset a cycle. */
function thresholds(bits: number, offsets: number[]): number[] {
  const convert = (input: number) => {
    let code = 0
    for (let i = 0; i < bits; i++) {
      const trial = code + 2 ** (bits - 1 - i)
      if (input > trial + offsets[i]) code = trial
    }
    return code
  }
  return Array.from({ length: 2 ** bits - 1 }, (_, k) => {
    let low = k - 1
    let high = k + 3
    for (let i = 0; i < 26; i++) {
      const middle = 0.5 * (low + high)
      if (convert(middle) > k) high = middle
      else low = middle
    }
    return 0.5 * (low + high)
  })
}

describe('a comparator per bit', () => {
  it('integral against counted converters, INL and DNL alike', () => {
    const [bits, sigma, limit, chips] = [4, 0.15, 0.4, 4000]
    const normal = seededNormal(seededUniform(9))
    let goodDnl = 0
    let goodInl = 0
    for (let chip = 0; chip < chips; chip++) {
      const edges = thresholds(bits, Array.from({ length: bits }, () => sigma * normal()))
      const slope = (edges[edges.length - 1] - edges[0]) / (edges.length - 1)
      goodDnl += Number(edges.every((edge, k) => k === 0 || Math.abs(edge - edges[k - 1] - 1) < limit))
      goodInl += Number(edges.every((edge, k) => Math.abs(edge - edges[0] - slope * k) < limit))
    }
    const exact = 1 - comparatorPerBitLoss(bits, limit / sigma)
    expect(Math.abs(goodDnl / chips - exact)).toBeLessThan(countingRoom(exact, chips))
    expect(Math.abs(goodInl / chips - exact)).toBeLessThan(countingRoom(exact, chips))
  })

  it('two comparators: one difference, 1 − erf(L/2σ)', () => {
    for (const ratio of [1, 2, 5]) expectCrossCheck(comparatorPerBitLoss(2, ratio), 1 - erf(ratio / 2), 1e-9, 'closed form of one difference')
  })

  it('the limit meets its yield and falls with bits', () => {
    fc.assert(fc.property(fc.integer({ min: 3, max: 18 }), fc.double({ min: 0.505, max: 0.99999999, noNaN: true }), (bits, yieldEach) => {
      const limit = comparatorPerBitSigmaLimit(bits, yieldEach)
      expectCrossCheck(comparatorPerBitLoss(bits, 1 / limit), 1 - yieldEach, 1e-6, 'root of the same integral')
      expect(limit).toBeLessThan(comparatorPerBitSigmaLimit(bits - 1, yieldEach))
    }), { seed: 2, numRuns: 50 })
    expect(() => comparatorPerBitSigmaLimit(1, 0.9)).toThrow(RangeError)
  })
})

it('capacitive DAC: σ_u·√(M − 1) at the limit is DNL over the two-sided quantile', () => {
  for (const [codes, dnl, yieldEach] of [[16, 0.5, 0.995], [1024, 0.3, 0.9], [2 ** 18, 0.5, 0.6]]) {
    expectExactLaw(sarDacSigmaLimit(codes, dnl, yieldEach) * Math.sqrt(codes - 1), dnl / normalCdfInverse(0.5 + 0.5 * yieldEach), 'definition')
  }
})
