import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { absoluteInlYield, sigmasHoldingAll } from '../../../../main/planner/models/yield/absolute-inl'
import { dnlLoss, dnlYield } from '../../../../main/planner/models/yield/dnl'
import { dnlSigmaLimit, inlSigmaLimit } from '../../../../main/planner/models/yield/sigma-limits'
import { terminalInlLoss, terminalInlYield } from '../../../../main/planner/models/yield/terminal-inl'
import { erf, normalInterval, normalPdf } from '../../../../main/planner/numerics/statistics'
import { expectCrossCheck, expectExactLaw } from '../../../published/tolerance'
import { extrapolatedDnlLoss, plainTerminalLoss, type PlainError } from './brute'
import { countingRoom, countYields, seededNormal, seededUniform } from './chips'

const gaussian = (sigma: number): PlainError => ({
  density: (x) => normalPdf(x / sigma) / sigma,
  inside: (off, limit) => normalInterval((off - limit) / sigma, (off + limit) / sigma),
  reach: 8.5 * sigma,
})

/** Relative error of σ_max, from plain losses at it and just above it: (loss − target)/(d loss/d ln σ). */
function errorOfLimit(plainLoss: (sigma: number) => number, sigma: number, yieldEach: number): number {
  const loss = plainLoss(sigma)
  return (loss - (1 - yieldEach)) / ((plainLoss(sigma * 1.001) - loss) / 0.001)
}

describe('largest spread against plain quadrature', () => {
  const banks: [number, number][] = [[7, 0.99], [15, 0.505], [63, 0.995], [255, 0.995], [1023, 0.995], [63, 0.99999]]

  it.each(banks)('terminal INL, %d thresholds, yield %d', (count, yieldEach) => {
    const plain = (sigma: number) => plainTerminalLoss(gaussian(sigma), Array.from({ length: count - 2 }, () => gaussian(sigma)), 1, 68)
    expect(Math.abs(errorOfLimit(plain, inlSigmaLimit('terminal', count, yieldEach), yieldEach))).toBeLessThan(1e-6)
  })

  it.each(banks)('DNL, %d thresholds, yield %d', (count, yieldEach) => {
    const plain = (sigma: number) => extrapolatedDnlLoss(gaussian(sigma), 1, count, 200)
    expect(Math.abs(errorOfLimit(plain, dnlSigmaLimit(count, yieldEach), yieldEach))).toBeLessThan(1e-6)
  })
})

describe('yields against counted chips', () => {
  it.each([[15, 0.11, 1], [15, 0.2, 2], [63, 0.12, 3], [255, 0.1, 4], [255, 0.13, 5]])('%d comparators, σ %d LSB', (count, sigma, seed) => {
    const chips = 40_000
    const limits = { absolute: 0.4, terminal: 0.45, dnl: 0.5 }
    const normal = seededNormal(seededUniform(seed))
    const counted = countYields(chips, count, limits, (errors) => {
      for (let k = 0; k < count; k++) errors[k] = sigma * normal()
    })
    const exact = {
      absolute: absoluteInlYield(count, limits.absolute / sigma),
      terminal: terminalInlYield(count, limits.terminal / sigma),
      dnl: dnlYield(count, limits.dnl / sigma),
    }
    for (const key of ['absolute', 'terminal', 'dnl'] as const) {
      const note = `${key}: counted ${counted[key]}, exact ${exact[key]}`
      expect(Math.abs(counted[key] - exact[key]), note).toBeLessThan(countingRoom(exact[key], chips))
    }
  })
})

describe('laws', () => {
  const count = fc.integer({ min: 3, max: 1023 })
  const yieldEach = fc.double({ min: 0.505, max: 0.9999999995, noNaN: true })
  const settings = { seed: 17, numRuns: 60 }

  it('absolute INL: closed form and its inverse', () => {
    fc.assert(fc.property(count, yieldEach, (n, y) => {
      const ratio = 1 / inlSigmaLimit('absolute', n, y)
      expectExactLaw(absoluteInlYield(n, ratio), y, 'the limit meets its yield')
      expectExactLaw(erf(sigmasHoldingAll(n, y) * Math.SQRT1_2) ** n, y, 'erf(z/√2)^count', 1e-12)
    }), settings)
  })

  it('limits meet their yield, fall with yield and with count, and keep their order', () => {
    fc.assert(fc.property(count, yieldEach, (n, y) => {
      const terminal = inlSigmaLimit('terminal', n, y)
      const dnl = dnlSigmaLimit(n, y)
      expectCrossCheck(terminalInlLoss({ count: n, halfWidth: 0, sigmaAt: () => terminal }, 1), 1 - y, 1e-6, 'root of the same integral')
      expectCrossCheck(dnlLoss({ halfWidth: 0, sigma: dnl }, 1, n), 1 - y, 1e-6, 'root of the same iteration')
      expect(terminal).toBeLessThan(inlSigmaLimit('terminal', n, 0.98 * y))
      expect(dnl).toBeLessThan(dnlSigmaLimit(n, 0.98 * y))
      if (n > 4) expect(terminal).toBeLessThan(inlSigmaLimit('terminal', n - 2, y))
      expect(dnl).toBeLessThan(dnlSigmaLimit(n - 1, y))
      expect(dnl).toBeLessThan(inlSigmaLimit('absolute', n, y))
    }), settings)
  })

  it('yields grow with the limit and stay between 0 and 1', () => {
    fc.assert(fc.property(count, fc.double({ min: 0.3, max: 9, noNaN: true }), (n, ratio) => {
      for (const yieldOf of [absoluteInlYield, terminalInlYield, dnlYield]) {
        const [low, high] = [yieldOf(n, ratio), yieldOf(n, ratio * 1.05)]
        expect(low).toBeGreaterThanOrEqual(0)
        expect(high).toBeGreaterThanOrEqual(low - 1e-12)
        expect(high).toBeLessThanOrEqual(1)
      }
    }), settings)
  })

  it('two thresholds: DNL is one difference, erf(D/2σ); three: terminal INL is one error of variance 3/2 σ²', () => {
    for (const ratio of [0.8, 2, 4, 6]) {
      expectCrossCheck(dnlYield(2, ratio), erf(ratio / 2), 2e-7, 'closed form of one difference')
      expectCrossCheck(terminalInlYield(3, ratio), erf(ratio / Math.sqrt(3)), 1e-8, 'closed form of one error')
    }
  })

  it('holds at the smallest banks and at poor yields too', () => {
    for (const y of [0.01, 0.3, 0.9, 1 - 1e-11]) {
      expectCrossCheck(erf(0.5 / dnlSigmaLimit(2, y)), y, 1e-6, 'closed form of one difference')
      expectCrossCheck(erf(1 / (Math.sqrt(3) * inlSigmaLimit('terminal', 3, y))), y, 1e-6, 'closed form of one error')
      expectCrossCheck(dnlYield(1023, 1 / dnlSigmaLimit(1023, y)), y, 1e-6, 'root of the same iteration')
    }
  })

  it('one element or none leaves nothing to fail; impossible arguments are refused', () => {
    expect(dnlYield(1, 2)).toBe(1)
    expect(terminalInlYield(2, 2)).toBe(1)
    expect(() => dnlSigmaLimit(1, 0.99)).toThrow(RangeError)
    expect(() => inlSigmaLimit('terminal', 2, 0.99)).toThrow(RangeError)
    expect(() => inlSigmaLimit('absolute', 0, 0.99)).toThrow(RangeError)
    for (const y of [0, 1, NaN]) expect(() => inlSigmaLimit('absolute', 7, y)).toThrow(RangeError)
    expect(() => dnlYield(7, 0)).toThrow(RangeError)
    expect(() => terminalInlYield(7, NaN)).toThrow(RangeError)
  })
})
