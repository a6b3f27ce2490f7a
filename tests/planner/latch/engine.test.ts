import { describe, expect, it } from 'vitest'
import type { Circuit } from '../../../main/planner/latch/circuit'
import { analyseLatch, type LatchAnalysis } from '../../../main/planner/latch/analysis'
import { cycleEnergy, decidedState, evaluateFully, leftoverAtInput } from '../../../main/planner/latch/cycle'
import { transientDelay } from '../../../main/planner/latch/transient'
import { analysed, benches, engineCircuit, type Bench } from './bench'

const [low, high] = benches

/** Every device and capacitor k times as large: the same voltages at every moment. */
const larger = (circuit: Circuit, k: number): Circuit => ({
  ...circuit,
  sideCapacitance: circuit.sideCapacitance.map((c) => c * k),
  sharedCapacitance: circuit.sharedCapacitance.map((c) => c * k),
  devices: circuit.devices.map((d) => ({ ...d, device: { ...d.device, width: d.device.width * k, scale: d.device.scale * k } })),
})

/** Every capacitor and the clock ramp k times as slow. */
const slower = (circuit: Circuit, k: number): Circuit => ({
  ...circuit,
  sideCapacitance: circuit.sideCapacitance.map((c) => c * k),
  sharedCapacitance: circuit.sharedCapacitance.map((c) => c * k),
  clockRise: circuit.clockRise * k,
})

const weights = (a: LatchAnalysis): number[] => [
  ...Object.values(a.thresholdWeight), ...Object.values(a.gainWeight), ...a.capacitanceWeight, ...a.startWeight,
]

function expectRatio(actual: number, base: number, ratio: number, what: string, room = 1e-6): void {
  expect(Math.abs(actual - ratio * base), `${what}: ${actual / base} instead of ${ratio}`).toBeLessThanOrEqual(room * Math.abs(ratio * base))
}

describe.each([low, high])('laws of the engine: $name', (bench: Bench) => {
  const circuit = engineCircuit(bench)
  const base = analysed(circuit)

  it('a latch k times as large: the same times and weights, noise by 1/√k', () => {
    const big = analysed(larger(circuit, 4))
    expectRatio(big.tau, base.tau, 1, 'τ')
    expectRatio(big.integration, base.integration, 1, 't_0')
    expectRatio(big.noise, base.noise, 0.5, 'noise')
    weights(base).forEach((weight, i) => expectRatio(weights(big)[i], weight, 1, `weight ${i}`))
  })

  it('a latch k times as slow: all times by k, noise by 1/√k', () => {
    const slow = analysed(slower(circuit, 3))
    expectRatio(slow.tau, base.tau, 3, 'τ')
    expectRatio(slow.integration, base.integration, 3, 't_0', 1e-5)
    expectRatio(slow.arrival10 - slow.arrival90, base.arrival10 - base.arrival90, 3, 'aperture', 1e-5)
    expectRatio(slow.noise, base.noise, 1 / Math.sqrt(3), 'noise')
    weights(base).forEach((weight, i) => expectRatio(weights(slow)[i], weight, 1, `weight ${i}`))
  })

  it('the threshold of the input pair weighs one, whatever the circuit', () => {
    expect(base.thresholdWeight.input).toBeCloseTo(1, 12)
  })

  it('a slower start or more capacitance where the input pair has to discharge asks for a higher input', () => {
    expect(base.capacitanceWeight[0]).toBeGreaterThan(0)
    expect(base.startWeight[0]).toBeGreaterThan(0)
  })

  it('decides alike for both signs, later for a smaller input', () => {
    const at = (v: number) => transientDelay(circuit, v, 1e-6)!
    for (const v of [1e-4, 1e-2]) expectRatio(at(-v), at(v), 1, `${v} V`, 1e-4)
    const delays = [0.1, 3e-2, 1e-2, 1e-3, 1e-4, 1e-5].map(at)
    for (let i = 1; i < delays.length; i++) expect(delays[i]).toBeGreaterThan(delays[i - 1])
  })

  it('gives no decision where the time is too short', () => {
    expect(transientDelay(circuit, 1e-3, 5e-12)).toBeNull()
  })

  it('adds only what it knows of the large-signal stretch: taken from a neighbour, t_0 moves by that alone', () => {
    const other = analyseLatch(circuit, 1e-6, base.departure + 0.5)
    expect(typeof other).not.toBe('string')
    expectRatio((other as LatchAnalysis).integration - base.integration, base.tau, 0.5, 'δ', 1e-9)
  })

  it('forgets more the longer it resets, from the ideal decided state as from the real one', () => {
    const { state } = evaluateFully(circuit, 1e-3, base.tau)
    const left = (from: typeof state, rises: number) => leftoverAtInput(circuit, from, rises * circuit.clockRise, base.startWeight).atInput
    const memories = [1, 1.5, 2, 3].map((rises) => left(state, rises))
    for (let i = 1; i < memories.length; i++) expect(memories[i]).toBeLessThan(0.5 * memories[i - 1])
    expectRatio(left(decidedState(circuit), 2), memories[2], 1, 'ideal against real', 0.02)
  })

  it('remembers everything where there is no time at all', () => {
    const { atInput } = leftoverAtInput(circuit, decidedState(circuit), 0, base.startWeight)
    expectRatio(atInput, circuit.supply * Math.abs(base.startWeight[1]), 1, 'whole swing', 1e-9)
  })

  it('pays at least for its clocked gates and one output, and more for a close decision', () => {
    const energyAt = (v: number) => cycleEnergy(circuit, evaluateFully(circuit, v, base.tau).state, base.tau).energy
    expect(energyAt(5e-3)).toBeGreaterThan((circuit.clockGates + circuit.sideCapacitance[circuit.output]) * circuit.supply ** 2)
    expect(energyAt(1e-4)).toBeGreaterThan(energyAt(1e-2))
  })
})

describe('a latch that is none', () => {
  it('on a supply of a few thermal voltages settles where it does not regenerate', () => {
    expect(analyseLatch(engineCircuit({ ...low, card: { ...low.card, vdd_v: 0.04 }, commonMode: 0.04 }), 1e-3)).toBe('no_regeneration')
  })

  it('starved of its common mode does not get there', () => {
    expect(analyseLatch(engineCircuit({ ...low, commonMode: 0 }), 1e-8)).toBe('too_slow')
  })

  it('given too little time is too slow', () => expect(analyseLatch(engineCircuit(low), 2e-11)).toBe('too_slow'))
})
