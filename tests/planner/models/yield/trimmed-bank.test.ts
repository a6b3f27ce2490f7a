import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { InlLine } from '../../../../main/planner/models/yield/sigma-limits'
import { dnlSigmaLimit } from '../../../../main/planner/models/yield/sigma-limits'
import { errorDensity, errorOutside, errorTail } from '../../../../main/planner/models/yield/threshold-error'
import { trimStepLimit, type TrimTarget } from '../../../../main/planner/models/yield/trim-step'
import {
  trimmedDnlLoss, trimmedDnlYield, trimmedInlLoss, trimmedInlYield, type TrimmedBank,
} from '../../../../main/planner/models/yield/trimmed-bank'
import { integrate } from '../../../../main/planner/numerics/quadrature'
import { normalInterval, normalPdf } from '../../../../main/planner/numerics/statistics'
import { expectCrossCheck, expectExactLaw } from '../../../published/tolerance'
import { extrapolatedDnlLoss, plainTerminalLoss, type PlainError } from './brute'
import { countingRoom, countYields, seededNormal, seededUniform } from './chips'

const lines: InlLine[] = ['absolute', 'terminal']
const target: TrimTarget = { codes: 64, deltaV: 0.01, inlLsb: 0.5, inlMethod: 'terminal', dnlLsb: 0.5, ladderSigma: 0.005, yieldEach: 0.995 }

/** Uniform within ± half plus a Gaussian, by numerical convolution. */
function plainMix(half: number, sigma: number): PlainError {
  const mean = (f: (centre: number) => number) => integrate(f, -half, half, 20, 4) / (2 * half)
  return {
    density: (x) => mean((u) => normalPdf((x - u) / sigma) / sigma),
    inside: (off, limit) => mean((u) => normalInterval((off - u - limit) / sigma, (off - u + limit) / sigma)),
    reach: half + 8 * sigma,
  }
}

describe('error of one trimmed threshold', () => {
  it('tail and density equal a numerical convolution', () => {
    for (const [half, sigma] of [[0.25, 0.02], [0.25, 0.3], [0.01, 1], [0.0005, 1]]) {
      const error = { halfWidth: half, sigma }
      const plain = plainMix(half, sigma)
      for (const x of [0, 0.1, 0.24, 0.3, 0.45]) {
        expectExactLaw(errorDensity(error, x), plain.density(x), 'density', 1e-9)
        expectExactLaw(1 - errorOutside(error, x), plain.inside(0, x), 'inside', 1e-9)
      }
    }
  })

  it('its limits: a plain uniform and a plain Gaussian', () => {
    const uniform = { halfWidth: 0.5, sigma: 0 }
    expect([-1, -0.5, -0.25, 0, 0.25, 0.5, 1].map((y) => errorTail(uniform, y))).toEqual([1, 1, 0.75, 0.5, 0.25, 0, 0])
    expectExactLaw(errorTail({ halfWidth: 0.5, sigma: 1e-9 }, 0.3), errorTail(uniform, 0.3), 'sigma → 0')
    expectExactLaw(errorTail({ halfWidth: 1e-6, sigma: 1 }, 3), errorTail({ halfWidth: 0, sigma: 1 }, 3), 'half width → 0', 1e-14)
    expect(errorTail({ halfWidth: 0, sigma: 0 }, 1e-9)).toBe(0)
  })
})

describe('losses against plain quadrature', () => {
  const banks = [[8, 0.5, 0.03, 0.5], [32, 0.46, 0.02, 0.48], [64, 0.4, 0.015, 0.41]]
  it.each(banks)('%d codes, step %d LSB, σ_R %d', (codes, stepV, ladderSigma, dnlLsb) => {
    const bank = { codes, deltaV: 1, stepV, ladderSigma }
    const at = (k: number) => plainMix(0.5 * stepV, ladderSigma * Math.sqrt(k * (codes - k) / codes))
    const fast = (error: PlainError): PlainError => tabulated(error)
    const interior = Array.from({ length: codes - 3 }, (_, i) => fast(at(i + 2)))
    const inl = plainTerminalLoss(at(1), interior, 0.5, 80)
    expectCrossCheck(trimmedInlLoss('terminal', bank, 0.5), inl, 3e-4, 'trapezoids on 81 × 81 points, tabulated')
    const dnl = extrapolatedDnlLoss(plainMix(0.5 * stepV, ladderSigma * Math.SQRT1_2), dnlLsb, codes - 1, 150)
    expectCrossCheck(trimmedDnlLoss(bank, dnlLsb), dnl, 1e-4, 'trapezoids, 300 a window, extrapolated')
  })
})

/** `inside` at the limit 0.5 as a table over the offset, cubic between its points. */
function tabulated(error: PlainError): PlainError {
  const step = 0.002
  const table = Float64Array.from({ length: 501 }, (_, i) => error.inside((i - 1) * step, 0.5))
  return { ...error, inside: (off) => cubic(table, Math.abs(off) / step + 1) }
}

function cubic(table: Float64Array, place: number): number {
  const i = Math.min(Math.max(Math.floor(place), 1), table.length - 3)
  const t = place - i
  const [a, b, c, d] = [table[i - 1], table[i], table[i + 1], table[i + 2]]
  return b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)))
}

describe('yields against counted chips', () => {
  it.each([[16, 0.52, 0, 1], [16, 0.5, 0.03, 2], [64, 0.51, 0.004, 3], [64, 0.4, 0.03, 4], [256, 0.49, 0.01, 5], [256, 0.6, 0.002, 6]])(
    '%d codes, step %d LSB, σ_R %d', (codes, step, ladderSigma, seed) => {
      const chips = 30_000
      const uniform = seededUniform(seed)
      const normal = seededNormal(uniform)
      const limits = { absolute: 0.42, terminal: 0.5, dnl: 0.5 }
      const inl = countYields(chips, codes - 1, limits, (errors) => {
        for (let k = 1; k < codes; k++) errors[k - 1] = step * (uniform() - 0.5) + ladderSigma * Math.sqrt(k * (codes - k) / codes) * normal()
      })
      const dnl = countYields(chips, codes - 1, limits, (errors) => {
        for (let k = 1; k < codes; k++) errors[k - 1] = step * (uniform() - 0.5) + ladderSigma * Math.SQRT1_2 * normal()
      })
      const bank = { codes, deltaV: 0.02, stepV: 0.02 * step, ladderSigma }
      for (const line of lines) {
        const exact = trimmedInlYield(line, bank, limits[line])
        expect(Math.abs(inl[line] - exact), `${line}: ${inl[line]}, ${exact}`).toBeLessThan(countingRoom(exact, chips))
      }
      const exact = trimmedDnlYield(bank, limits.dnl)
      expect(Math.abs(dnl.dnl - exact), `DNL: ${dnl.dnl}, ${exact}`).toBeLessThan(countingRoom(exact, chips))
    })
})

describe('largest trim step', () => {
  const losses = (t: TrimTarget, stepV: number) => {
    const bank: TrimmedBank = { codes: t.codes, deltaV: t.deltaV, stepV, ladderSigma: t.ladderSigma }
    return [trimmedInlLoss(t.inlMethod, bank, t.inlLsb), trimmedDnlLoss(bank, t.dnlLsb)]
  }

  it('meets both yields, and just misses one a little above', () => {
    for (const inlMethod of lines) for (const codes of [4, 8, 64, 1024]) for (const ladderSigma of [0, 1e-4, 0.003, 0.006]) {
      const t = { ...target, inlMethod, codes, ladderSigma }
      const step = trimStepLimit(t)
      const allowed = 1 - t.yieldEach
      expect(Math.max(...losses(t, step * (1 - 1e-6))), `${codes} codes, σ_R ${ladderSigma}`).toBeLessThanOrEqual(allowed)
      expect(Math.max(...losses(t, step * (1 + 1e-6)))).toBeGreaterThan(allowed)
    }
  })

  it('without a ladder error no step within the limits can fail', () => {
    const bank = { codes: 1024, deltaV: 1, stepV: 0.5, ladderSigma: 0 }
    expect(trimmedDnlYield(bank, 0.5)).toBe(1)
    expect(trimmedInlYield('terminal', bank, 0.5)).toBe(1)
    expect(trimmedInlYield('absolute', { ...bank, stepV: 1 }, 0.5)).toBe(1)
    for (const yieldEach of [0.505, 0.995, 1 - 1e-9]) {
      const step = trimStepLimit({ ...target, deltaV: 1, ladderSigma: 0, yieldEach })
      expect(step).toBeGreaterThan(0.5)
      expect(step).toBeLessThan(0.6)
    }
  })

  it('two neighbours without a ladder error: the triangle law P(|a − b| > D) = (1 − D/step)²', () => {
    for (const step of [0.5, 0.51, 0.6, 1]) {
      const loss = trimmedDnlLoss({ codes: 3, deltaV: 1, stepV: step, ladderSigma: 0 }, 0.5)
      expectExactLaw(loss, (1 - 0.5 / step) ** 2, `step ${step}`, 1e-12)
    }
  })

  it('a ladder that eats all leaves no step', () => {
    expect(trimStepLimit({ ...target, ladderSigma: 0.1 })).toBe(0)
    const justEaten = dnlSigmaLimit(63, 0.995) * 0.5 * Math.SQRT2
    const wide = { ...target, inlLsb: 50 }
    expect(trimStepLimit({ ...wide, ladderSigma: justEaten * 1.0001 })).toBe(0)
    expect(trimStepLimit({ ...wide, ladderSigma: justEaten * 0.999 })).toBeGreaterThan(0)
  })

  it('scales with Δ and with both limits', () => {
    const one = trimStepLimit(target)
    expectExactLaw(trimStepLimit({ ...target, deltaV: 0.03 }), 3 * one, 'Δ')
    const doubled = trimStepLimit({ ...target, inlLsb: 1, dnlLsb: 1, ladderSigma: 0.01 })
    expectCrossCheck(doubled, 2 * one, 1e-7, 'same search on a doubled scale')
  })

  it('falls with the ladder, with the yield and with the number of codes; absolute INL allows no less than terminal', () => {
    const bits = fc.integer({ min: 2, max: 10 })
    const ladder = fc.double({ min: 0, max: 0.02, noNaN: true })
    const wanted = fc.double({ min: 0.51, max: 0.9999, noNaN: true })
    fc.assert(fc.property(bits, ladder, wanted, (n, ladderSigma, yieldEach) => {
      const t = { ...target, codes: 2 ** n, ladderSigma, yieldEach }
      const step = trimStepLimit(t)
      const room = 1 + 1e-5
      expect(trimStepLimit({ ...t, ladderSigma: ladderSigma + 0.002 })).toBeLessThanOrEqual(step * room)
      expect(trimStepLimit({ ...t, yieldEach: 0.5 + 0.5 * yieldEach })).toBeLessThanOrEqual(step * room)
      expect(trimStepLimit({ ...t, codes: 2 ** (n + 1) })).toBeLessThanOrEqual(step * room)
      expect(trimStepLimit({ ...t, inlMethod: 'absolute' })).toBeGreaterThanOrEqual(step / room)
    }), { seed: 23, numRuns: 40 })
  })

  it('refuses what is no bank', () => {
    expect(() => trimStepLimit({ ...target, codes: 2 })).toThrow(RangeError)
    expect(() => trimStepLimit({ ...target, yieldEach: 1 })).toThrow(RangeError)
  })
})
