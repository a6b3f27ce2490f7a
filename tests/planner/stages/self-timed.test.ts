import { describe, expect, it } from 'vitest'
import { searchWeights } from '../../../main/planner/models/timing/search'
import {
  conversionDelay, conversionDelayByCycle, logTail, selfTimedTauLimit, type CycleLatch, type SearchShape,
} from '../../../main/planner/models/timing/self-timed'
import { uniform } from './look'

const shapeOf = (bits: number, redundant: number): SearchShape => ({ weights: searchWeights(bits, redundant), lsb: 2 ** -bits, fullScale: 1 })
const latch: CycleLatch = { integration: 0.7, tau: 1 }

/** Time that one search of an input takes, decision by decision: t_0 + τ·ln(V_DD/(2|v|)). */
function searchTime({ weights, lsb }: SearchShape, latches: readonly CycleLatch[], input: number): number {
  let residue = input
  let time = 0
  weights.forEach((weight, i) => {
    time += latches[i].integration + latches[i].tau * Math.log(0.5 / Math.abs(residue))
    residue -= (Math.sign(residue) * weight * lsb) / 2
  })
  return time
}

/** Part of uniform random inputs whose search takes longer than the budget. */
function tooLate(shape: SearchShape, latches: readonly CycleLatch[], budget: number, inputs: number): number {
  const random = uniform(9)
  let late = 0
  for (let i = 0; i < inputs; i++) if (searchTime(shape, latches, random() - 0.5) > budget) late++
  return late / inputs
}

const same = (shape: SearchShape): CycleLatch[] => shape.weights.map(() => latch)

describe('tail of a self-timed search', () => {
  const searches = [[6, 0, 0.02, 0.05], [9, 0, 0.01, 0.05], [7, 1, 1e-3, 0.09]]

  it.each(searches)('%d bit, %d redundant, P = %d: 2 million random inputs', (bits, redundant, target, room) => {
    const shape = shapeOf(bits, redundant)
    const budget = conversionDelay(shape, latch, 1, target)
    expect(Math.exp(logTail(shape, latch, 1, budget)) / target).toBeCloseTo(1, 8)
    const late = tooLate(shape, same(shape), budget, 2_000_000)
    expect(Math.abs(late / target - 1)).toBeLessThan(room)
  })

  it('is the same when every cycle has the same latch, whichever way it is summed', () => {
    for (const shape of [shapeOf(6, 0), shapeOf(9, 2)]) {
      for (const rate of [1e-3, 1e-12]) {
        expect(conversionDelayByCycle(shape, same(shape), 1, rate) / conversionDelay(shape, latch, 1, rate)).toBeCloseTo(1, 7)
      }
    }
  })

  it('with a slower latch cycle by cycle holds against random inputs', () => {
    const shape = shapeOf(7, 0)
    const latches = shape.weights.map((_, i): CycleLatch => ({ integration: 0.5 + 0.1 * i, tau: 1 + 0.08 * i }))
    const budget = conversionDelayByCycle(shape, latches, 1, 0.01)
    expect(Math.abs(tooLate(shape, latches, budget, 1_000_000) / 0.01 - 1)).toBeLessThan(0.06)
  })

  it('allows just the τ that meets the error rate, and none without time', () => {
    const shape = shapeOf(8, 0)
    const tau = selfTimedTauLimit(shape, 0.2, 1, 30, 1e-9)
    expect(conversionDelay(shape, { integration: 0.2, tau }, 1, 1e-9)).toBeCloseTo(30, 8)
    expect(selfTimedTauLimit(shape, 4, 1, 30, 1e-9)).toBe(0)
    expect(selfTimedTauLimit(shape, 0, 1, -1, 1e-9)).toBe(0)
  })
})
