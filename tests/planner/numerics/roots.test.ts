import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { findRoot } from '../../../main/planner/numerics/roots'
import { expectExactLaw } from '../../published/tolerance'

/** The search, and how many values it asked for. */
function counted(f: (x: number) => number, from: number, to: number, tolerance = 0): { root: number; values: number } {
  let values = 0
  const root = findRoot((x) => {
    values++
    return f(x)
  }, from, to, { tolerance })
  return { root, values }
}

describe('bracketed root', () => {
  it('finds roots known in closed form, in few values', () => {
    const smooth = counted((x) => Math.exp(x) - 5, 0, 4)
    expectExactLaw(smooth.root, Math.log(5), 'ln 5')
    expect(smooth.values).toBeLessThan(14)
    expectExactLaw(findRoot((x) => x * x * x - 2, 2, 0, { tolerance: 0 }), Math.cbrt(2), 'cube root of 2, ends exchanged')
  })

  it('survives flat stretches, jumps and high multiplicity', () => {
    expectExactLaw(findRoot((x) => (x < 0.7 ? -1 : 1), 0, 1, { tolerance: 1e-14 }), 0.7, 'a jump', 1e-13)
    expectExactLaw(findRoot((x) => (x - 0.3) ** 9, -1, 2, { tolerance: 1e-10 }), 0.3, 'ninefold', 1e-9)
    expect(counted((x) => (x - 0.3) ** 9, -1, 2, 1e-10).values).toBeLessThan(100)
    expect(findRoot((x) => Math.max(0, x - 1) - 1e-12, 0, 3, { tolerance: 1e-15 })).toBeCloseTo(1, 11)
  })

  it('returns an end that is the root', () => {
    expect(findRoot((x) => x, 0, 1, { tolerance: 0 })).toBe(0)
    expect(findRoot((x) => x - 1, 0, 1, { tolerance: 0 })).toBe(1)
  })

  it('closes on the crossing of any monotone cubic', () => {
    const coefficient = fc.double({ min: 0.01, max: 100, noNaN: true })
    fc.assert(fc.property(coefficient, coefficient, fc.double({ min: -5, max: 5, noNaN: true }), (a, b, at) => {
      const f = (x: number) => a * (x ** 3 - at ** 3) + b * (x - at)
      const { root, values } = counted(f, -6, 7, 1e-12)
      expect(Math.abs(root - at)).toBeLessThan(1e-11)
      expect(values).toBeLessThan(60)
    }), { seed: 3 })
  })

  it('says what is wrong', () => {
    expect(() => findRoot((x) => x + 5, 0, 1, { tolerance: 0 })).toThrow(/no change of sign: f\(0\) = 5, f\(1\) = 6/)
    expect(() => findRoot((x) => Math.sqrt(x), -1, 1, { tolerance: 0 })).toThrow(/f\(-1\) is not a number/)
    expect(() => findRoot((x) => (x < 1 / 3 ? -1 : 1), 0, 1, { tolerance: 0, evaluations: 10 })).toThrow(/not closed after 10 values/)
  })
})
