import { describe, expect, it } from 'vitest'
import { apart, compareDelays, compareEnergy, compareMemory, compareNodes, compareOffsets, type Compared, type Sides } from './compare'
import { analysed, benches, engineCircuit, settingOfBench, type Bench } from './bench'
import { noiseSigma } from '../../independent/noise'

const same = (bench: Bench): Sides => ({ engine: bench, independent: bench })

function expectTogether(compared: readonly Compared[]): void {
  for (const { what, engine, independent, room } of compared) {
    expect(Math.abs(engine - independent), `${what}: engine ${engine}, independent ${independent}`).toBeLessThanOrEqual(room)
  }
}

describe.each(benches)('the engine and the full circuit agree: $name', (bench) => {
  it('decision delays', () => expectTogether(compareDelays(same(bench))))
  it('mismatch of every pair', () => expectTogether(compareOffsets(same(bench))))
  it('capacitances and start of the nodes', () => expectTogether(compareNodes(same(bench))))
  it('energy of a cycle', () => expectTogether(compareEnergy(same(bench))))
  it('memory of the last decision', () => expectTogether(compareMemory(same(bench))))

  it('noise, 3 % (seeded stochastic runs, 1 % of chance in them)', () => {
    const { noise } = analysed(engineCircuit(bench))
    expect(Math.abs(noise / noiseSigma(settingOfBench(bench), 5000, 11) - 1)).toBeLessThan(0.03)
  })
})

describe('the engine and the full circuit agree where the nodes are of very different speed', () => {
  const [plain] = benches

  it.each([5e-14, 2e-13, 1e-12])('outputs loaded with %d F', (load) => {
    const bench: Bench = { ...plain, load, linear: [1e-5, 1e-4] }
    expectTogether([...compareDelays(same(bench)), ...compareOffsets(same(bench)), ...compareNodes(same(bench))])
  })

  it('100 fF on the drains of the input pair (regeneration and formula apart: the equilibrium comes late)', () => {
    const bench: Bench = { ...plain, widths: { ...plain.widths, extra_cap_f: 1e-13 }, linear: [] }
    const byTransient = compareDelays(same(bench)).filter(({ what }) => what.startsWith('delay'))
    expect(byTransient).toHaveLength(4)
    expectTogether([...byTransient, ...compareOffsets(same(bench)), ...compareNodes(same(bench))])
  })
})

describe('the comparison can tell', () => {
  const [bench] = benches
  const stronger = (kind: 'n' | 'p', by: number): Sides => {
    const { card } = bench
    return { engine: { ...bench, card: { ...card, [kind]: { ...card[kind], kp_a_v2: card[kind].kp_a_v2 * by } } }, independent: bench }
  }
  const worst = (compared: readonly Compared[]) => Math.max(...compared.map(apart))

  it('5 % more k_p of the n devices in the engine alone breaks delays and offsets', () => {
    for (const compare of [compareDelays, compareOffsets]) {
      expect(worst(compare(same(bench))), compare.name).toBeLessThan(1)
      expect(worst(compare(stronger('n', 1.05))), compare.name).toBeGreaterThan(1)
    }
  })

  it('5 % more k_p of the p devices in the engine alone breaks memory', () => {
    expect(worst(compareMemory(stronger('p', 1.05)))).toBeGreaterThan(1)
  })
})
