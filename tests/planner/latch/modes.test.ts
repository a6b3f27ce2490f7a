import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { dominantMode, expm2 } from '../../../main/planner/latch/modes'

type Matrix = readonly [number, number, number, number]

const exponential = ([a, b, c, d]: Matrix): number[] => {
  const into = new Float64Array(4)
  expm2(a, b, c, d, into)
  return [...into]
}

/** V·diag(x, y)·V⁻¹ with V = [[1, p], [q, 1]], pq < 1. */
function withModes(x: number, y: number, p: number, q: number): Matrix {
  const det = 1 - p * q
  return [(x - p * q * y) / det, (p * (y - x)) / det, (q * (x - y)) / det, (y - p * q * x) / det]
}

const tilt = fc.integer({ min: -90, max: 90 }).map((x) => x / 100)
const rate = fc.integer({ min: -3000, max: 300 }).map((x) => x / 100)

function expectNear(actual: readonly number[], expected: readonly number[], room: number): void {
  const scale = Math.max(...expected.map(Math.abs))
  expected.forEach((value, i) => expect(Math.abs(actual[i] - value), `${i}: ${actual[i]} instead of ${value}`).toBeLessThanOrEqual(room * scale))
}

describe('exponential of a 2 × 2 matrix', () => {
  it('is that of its modes', () => {
    fc.assert(fc.property(rate, rate, tilt, tilt, (x, y, p, q) => {
      expectNear(exponential(withModes(x, y, p, q)), withModes(Math.exp(x), Math.exp(y), p, q), 1e-11)
    }))
  })

  it('is that of its modes when one of them is gone at once: a light node beside a heavy load', () => {
    for (const gone of [-500, -800, -2000, -1e6, -1e9]) {
      const [p, q] = [0.02, 1e-4]
      expectNear(exponential(withModes(gone, 1.2, p, q)), withModes(0, Math.exp(1.2), p, q), 1e-3)
    }
  })

  it('turns when its modes are a complex pair, and shears when they are one', () => {
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)].map((x) => x * Math.exp(0.2))
    expectNear(exponential([0.2, -0.7, 0.7, 0.2]), [c, -s, s, c], 1e-14)
    expectNear(exponential([0.5, 3, 0, 0.5]), [Math.exp(0.5), 3 * Math.exp(0.5), 0, Math.exp(0.5)], 1e-14)
    expect(exponential([0, 0, 0, 0])).toEqual([1, 0, 0, 1])
  })
})

describe('the dominant mode', () => {
  it('is the faster growing one, its vectors those of the matrix', () => {
    fc.assert(fc.property(rate, rate, tilt, tilt, (x, y, p, q) => {
      fc.pre(x !== y && p !== 0 && q !== 0)
      const m = withModes(x, y, p, q)
      const { growth, left, right } = dominantMode(Float64Array.from(m), 0, 1)
      expect(growth).toBeCloseTo(Math.max(x, y), 9)
      expect(right[1]).toBe(1)
      expect(left[0] * right[0] + left[1] * right[1]).toBeCloseTo(1, 8)
      const room = 1e-8 * Math.max(...m.map(Math.abs)) * (1 + Math.abs(right[0]))
      expect(Math.abs(m[0] * right[0] + m[1] - growth * right[0])).toBeLessThanOrEqual(room)
      expect(Math.abs(m[2] * right[0] + m[3] - growth)).toBeLessThanOrEqual(room)
    }))
  })
})
