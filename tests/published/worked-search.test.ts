import { describe, expect, it } from 'vitest'
import { decisionDelay } from '../../main/planner/models/timing/metastability'
import { searchCycles, searchWeights } from '../../main/planner/models/timing/search'
import { logTail } from '../../main/planner/models/timing/self-timed'
import rows from './rows.json'
import { expectExactLaw } from './tolerance'
import worked from './worked-cases.json'

interface Given { bits: number; budget: number; redundant: number }

const tails = worked.cases.flatMap(({ what, expect: wanted }): [string, Given, number][] => {
  const match = /^self-timed tail: N (\d+), V_FS 1 V, V_DD 1 V, t_0 0, tau 1 s, budget B (\d+) s, (\d+) redundant/.exec(what)
  if (match === null) return []
  const [bits, budget, redundant] = match.slice(1).map(Number)
  return [[what, { bits, budget, redundant }, (wanted as unknown as { p: number }).p]]
})

describe('worked self-timed tails (computed independently, not published)', () => {
  it('there are two', () => expect(tails).toHaveLength(2))

  it.each(tails)('%s', (_, { bits, budget, redundant }, wanted) => {
    const shape = { weights: searchWeights(bits, redundant), lsb: 2 ** -bits, fullScale: 1 }
    const tail = Math.exp(logTail(shape, { integration: 0, tau: 1 }, 1, budget))
    expect(Math.abs(tail / wanted - 1)).toBeLessThanOrEqual(1e-4)
  })
})

describe('worked redundant weights (computed independently, not published)', () => {
  const { expect: wanted } = worked.cases.find(({ what }) => what === 'redundant weights, N 10') as unknown as { expect: Record<string, number[]> }

  it.each(Object.entries(wanted))('10 bit, %s redundant cycles', (redundant, weights) => {
    expect(searchWeights(10, Number(redundant))).toEqual(weights)
  })
})

describe(`time of a synchronous search over that of a self-timed one (derived): ${rows.selfTimed.source}`, () => {
  it.each(rows.selfTimed.bits)('%d bit: 2N/(N+1)', (bits) => {
    const cycles = searchCycles(searchWeights(bits, 0), 1, 2 ** -bits, 0, 2 ** -bits)
    const delay = (residue: number) => decisionDelay(0, 1, 2, residue)
    const residues = cycles.map(({ step }) => step)
    const synchronous = bits * delay(Math.min(...residues))
    expectExactLaw(synchronous / residues.reduce((sum, residue) => sum + delay(residue), 0), (2 * bits) / (bits + 1), 'each residue V_FS/2^i')
  })
})
