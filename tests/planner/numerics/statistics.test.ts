import fc from 'fast-check'
import { erf as mathjsErf } from 'mathjs'
import { describe, expect, it } from 'vitest'
import {
  erf, erfc, logNormalInterval, logNormalTail, normalCdf, normalCdfInverse, normalExcess, normalInterval, normalPdf, normalTail, normalTailInverse,
} from '../../../main/planner/numerics/statistics'
import { expectCrossCheck, expectExactLaw } from '../../published/tolerance'

const real = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const settings = { seed: 11, numRuns: 300 }

describe('error function', () => {
  it('agrees with mathjs', () => {
    for (let x = -6; x <= 6; x += 0.0625) {
      if (x !== 0) expectCrossCheck(erf(x), mathjsErf(x), 1e-14, 'mathjs 15.2.0, which states about 1e-15')
    }
  })

  it('is odd, and complements erfc', () => {
    fc.assert(fc.property(real(-7, 7), (x) => {
      expectExactLaw(erf(-x), -erf(x), 'odd')
      expectExactLaw(erf(x) + erfc(x), 1, 'complement')
    }), settings)
  })

  it('holds its limits', () => {
    expect([erf(0), erf(30), erf(-30), erfc(-30), erfc(30), erf(Infinity), erfc(Infinity)]).toEqual([0, 1, -1, 2, 0, 1, 0])
    expect(erf(NaN)).toBeNaN()
  })
})

describe('normal distribution', () => {
  it('inverts', () => {
    fc.assert(fc.property(real(-37, 8), (x) => {
      expectExactLaw(normalCdfInverse(normalCdf(x)), x, 'Φ⁻¹(Φ(x))', x > 0 ? 4e-16 / normalPdf(x) : 1e-15)
      expectExactLaw(normalTailInverse(normalTail(-x)), -x, 'Q⁻¹(Q(x))', x > 0 ? 4e-16 / normalPdf(x) : 1e-15)
    }), settings)
    expect(normalCdfInverse(0.5)).toBeCloseTo(0, 15)
  })

  it('refuses probabilities that are none', () => {
    for (const p of [0, 1, -0.1, 1.1, NaN]) {
      expect(() => normalCdfInverse(p)).toThrow(RangeError)
      expect(() => normalTailInverse(p)).toThrow(RangeError)
    }
  })

  it('an interval is the sum of its parts, and its logarithm fits', () => {
    fc.assert(fc.property(real(-9, 9), real(0.001, 4), real(0.1, 0.9), (a, width, part) => {
      const middle = a + part * width
      const whole = normalInterval(a, a + width)
      expectExactLaw(normalInterval(a, middle) + normalInterval(middle, a + width), whole, 'additive', 4e-12 * whole)
      expectExactLaw(logNormalInterval(a, a + width), Math.log(whole), 'logarithm', 1e-13)
    }), settings)
  })

  it('mean excess: its slope is minus the tail, E(−u) = E(u) + u', () => {
    fc.assert(fc.property(real(-6, 6), (u) => {
      const h = 1e-4
      expect((normalExcess(u - h) - normalExcess(u + h)) / (2 * h)).toBeCloseTo(normalTail(u), 8)
      expectExactLaw(normalExcess(-u), normalExcess(u) + u, 'reflection', 1e-14)
    }), settings)
  })

  it('logarithm of the tail goes on where the tail is 0', () => {
    expect(normalTail(45)).toBe(0)
    expect(logNormalTail(45)).toBeCloseTo(-0.5 * 45 * 45 - Math.log(45 * Math.sqrt(2 * Math.PI)), 2)
  })
})
