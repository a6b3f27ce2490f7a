import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { gaussLegendre, gaussSum, integrate } from '../../../main/planner/numerics/quadrature'
import { expectExactLaw } from '../../published/tolerance'

describe('Gauss–Legendre', () => {
  it('integrates every power up to 2·order − 1 exactly', () => {
    for (const order of [1, 2, 3, 8, 16, 21, 40]) {
      const { nodes, weights } = gaussLegendre(order)
      for (let power = 0; power < 2 * order; power++) {
        const value = nodes.reduce((sum, x, i) => sum + weights[i] * x ** power, 0)
        expectExactLaw(value, power % 2 ? 0 : 2 / (power + 1), `x^${power}, order ${order}`, 1e-13)
      }
    }
  })

  it('in panels: ∫ exp over [−1, 3]', () => {
    expectExactLaw(integrate(Math.exp, -1, 3, 8, 4), Math.exp(3) - Math.exp(-1), 'e³ − 1/e')
    expectExactLaw(integrate(Math.exp, 3, -1, 8, 4), Math.exp(-1) - Math.exp(3), 'ends exchanged')
  })

  it('gives the same rule for the same order and refuses others', () => {
    expect(gaussLegendre(12)).toBe(gaussLegendre(12))
    for (const order of [0, -1, 2.5, NaN]) expect(() => gaussLegendre(order)).toThrow(RangeError)
  })
})

describe('Gaussian rule for sums', () => {
  it('sums every power up to 2·order − 1 exactly', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 12 }), fc.integer({ min: 13, max: 1100 }), (order, count) => {
      const { nodes, weights } = gaussSum(count, order)
      const middle = 0.5 * (count - 1)
      for (let power = 0; power < 2 * order; power++) {
        const scaled = (j: number) => ((j - middle) / middle) ** power
        let plain = 0
        for (let j = 0; j < count; j++) plain += scaled(j)
        const value = nodes.reduce((sum, x, i) => sum + weights[i] * scaled(x), 0)
        expectExactLaw(value, plain, `power ${power}, ${order} of ${count}`, 1e-11 * count)
      }
    }), { seed: 5, numRuns: 60 })
  })

  it('is the plain sum where there are no more terms than nodes', () => {
    expect([...gaussSum(4, 9).nodes]).toEqual([0, 1, 2, 3])
    expect([...gaussSum(4, 4).weights]).toEqual([1, 1, 1, 1])
    expect(gaussSum(0, 3).nodes.length).toBe(0)
  })

  it('one node short of the terms, its nodes still lie between the first and the last', () => {
    const { nodes, weights } = gaussSum(12, 11)
    expect(Math.min(...nodes)).toBeGreaterThanOrEqual(0)
    expect(Math.max(...nodes)).toBeLessThanOrEqual(11)
    expect(Math.min(...weights)).toBeGreaterThan(0)
  })

  it('refuses what is not a count', () => {
    for (const count of [-1, 1.5, NaN]) expect(() => gaussSum(count, 3)).toThrow(RangeError)
    expect(() => gaussSum(5, 0)).toThrow(RangeError)
  })
})
