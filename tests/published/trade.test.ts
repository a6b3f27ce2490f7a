import { describe, expect, it } from 'vitest'
import type { Circuit } from '../../main/planner/latch/circuit'
import { network, nodeRates, setClock } from '../../main/planner/latch/network'
import { fullStart, runPhase } from '../../main/planner/latch/transient'
import { analysed, benches, engineCircuit, type Bench } from '../planner/latch/bench'
import { changed, flashOf, plainWidths, planned, sounder, type Changes } from '../planner/plans'
import { expectExactLaw } from './tolerance'

/*
 * What the trade knows of the strong-arm latch (common practice, no source): no static supply current in any phase, outputs
 * that swing from rail to rail, an input offset set almost wholly by the input pair and not at all by the reset devices,
 * power in proportion to the clock, a regeneration time that stops improving with size, and an input that is a gate.
 */

const [bench] = benches

/** Node voltages at rest and the supply current then, after evaluation and after reset. */
function atRest(circuit: Circuit) {
  const { tau } = analysed(circuit)
  const long = { overdrive: 5e-3, until: 1000 * tau, slopeFloor: 0 }
  const { state } = runPhase(circuit, fullStart(circuit), { edge: 'rising', ...long })
  const reset = runPhase(circuit, state, { edge: 'falling', ...long })
  const drawn = (nodes: Float64Array, edge: 'rising' | 'falling') => {
    const net = network(circuit, 'full')
    setClock(net, 1, circuit.clockRise, edge)
    net.voltage.set(nodes)
    return nodeRates(net, new Float64Array(net.size))
  }
  return {
    evaluated: { nodes: state.nodes, current: drawn(state.nodes, 'rising') },
    reset: { nodes: reset.state.nodes, current: drawn(reset.state.nodes, 'falling') },
    average: reset.state.charge / (60 * tau),
  }
}

describe.each(benches)('strong-arm latch, common practice: $name', (one: Bench) => {
  const circuit = engineCircuit(one)
  const rest = atRest(circuit)
  const sides = circuit.sideNodes.length
  const output = (nodes: Float64Array) => [nodes[circuit.output], nodes[sides + circuit.output]]

  it('draws no static current: what is left at rest is below a thousandth of what a busy clock draws, and leakage', () => {
    for (const { current } of [rest.evaluated, rest.reset]) expect(Math.abs(current)).toBeLessThan(1e-3 * rest.average)
    const { card } = one
    const raised = { ...card, n: { ...card.n, vt_v: card.n.vt_v + 0.1 }, p: { ...card.p, vt_v: card.p.vt_v + 0.1 } }
    const tighter = atRest(engineCircuit({ ...one, card: raised, commonMode: one.commonMode + 0.1 }))
    expect(Math.abs(tighter.evaluated.current)).toBeLessThan(0.2 * Math.abs(rest.evaluated.current))
  })

  it('swings from rail to rail, and resets to the supply', () => {
    const [low, high] = output(rest.evaluated.nodes)
    expect(low).toBeLessThan(0.005 * circuit.supply)
    expect(high).toBeGreaterThan(0.995 * circuit.supply)
    for (const node of output(rest.reset.nodes)) expect(node).toBeGreaterThan(0.995 * circuit.supply)
  })

  it('takes no current at its input: it drives gates only', () => {
    const inputs = circuit.devices.filter((d) => d.gate.at === 'input')
    expect(inputs.map((d) => d.pair)).toEqual(['input'])
    expect(circuit.devices.filter((d) => d.drain.at === 'input' || d.source.at === 'input')).toEqual([])
  })
})

describe('offset of a strong-arm latch, common practice', () => {
  const plain = flashOf(4, 1e9, { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths, 'converter.common_mode_v': 0.5 })

  it.each([['first demo', sounder], ['a plain latch', plain]])('is almost wholly that of the input pair; the reset devices add none: %s', (_, document) => {
    const parts = planned(document).design.offset_parts_v
    const power = Object.values(parts).reduce((sum: number, part) => sum + part! ** 2, 0)
    expect(parts.input! ** 2 / power).toBeGreaterThan(0.8)
    expect(parts.reset! ** 2 / power).toBeLessThan(0.001)
  })
})

describe('power of a strong-arm latch, common practice', () => {
  it('is in proportion to the clock', () => {
    const manual: Changes = { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths, corners: ['typical'] }
    const at = (rate: number) => planned(changed(sounder, { ...manual, 'converter.sample_rate_hz': rate })).ledger.power
    const [slow, fast] = [at(5e8), at(1e9)]
    for (const item of ['power.comparators', 'power.clock', 'power.capture', 'power.encoder']) {
      const value = (lines: typeof slow) => lines.find((line) => line.item === item)!.value
      expectExactLaw(value(fast), 2 * value(slow), `${item} doubles with the rate`)
    }
  })
})

describe('regeneration of a strong-arm latch, common practice', () => {
  const tauAt = (size: number) => {
    const { widths } = bench
    const { input_length_m, extra_cap_f, ...drawn } = widths
    const scaled = Object.fromEntries(Object.entries(drawn).map(([key, width]) => [key, size * width])) as unknown as typeof drawn
    return analysed(engineCircuit({ ...bench, widths: { ...scaled, input_length_m, extra_cap_f } })).tau
  }

  it('stops improving with size: each doubling gains less than the last, and in the end nothing', () => {
    const taus = [0.25, 0.5, 1, 2, 4, 8, 16, 32, 64, 128].map(tauAt)
    const gains = taus.slice(1).map((tau, i) => 1 - tau / taus[i])
    expect(gains[0]).toBeGreaterThan(0.15)
    for (let i = 1; i < gains.length; i++) expect(gains[i]).toBeLessThan(gains[i - 1])
    expect(gains[gains.length - 1]).toBeGreaterThan(0)
    expect(gains[gains.length - 1]).toBeLessThan(0.003)
  })
})
