import type { Circuit } from './circuit'
import { decisionWatch, fullStart, runPhase, type FullState } from './transient'

/** Slopes below this many supplies per regeneration time constant count as settled. */
const stillness = 1e-4
/** Longest phase that is waited for, in time constants. */
const patience = 3000

/** State after a finished decision with a positive input: the plus output low, the minus output at the supply, the rest low. */
export function decidedState(circuit: Circuit): FullState {
  const nodes = new Float64Array(2 * circuit.sideNodes.length + circuit.sharedNodes.length)
  nodes[circuit.sideNodes.length + circuit.output] = circuit.supply
  nodes.set(circuit.sharedDecided, 2 * circuit.sideNodes.length)
  return { nodes, charge: 0 }
}

/**
 * Evaluates at an overdrive until every node stands still.
 * @param tau regeneration time constant, the measure of stillness [s]
 */
export function evaluateFully(circuit: Circuit, overdrive: number, tau: number): { state: FullState; decision: number | null } {
  const decision = decisionWatch(circuit)
  const run = runPhase(circuit, fullStart(circuit), {
    edge: 'rising', overdrive, until: patience * tau, slopeFloor: (stillness * circuit.supply) / tau,
    watch: (step) => { decision.watch(step); return false },
  })
  return { state: run.state, decision: decision.time() }
}

/**
 * Energy of one decision and the reset after it [J], with the supply charge Q [C]: E = V_DD·Q + C_ck·V_DD², Q the supply charge of the full cycle,
 * evaluate and reset each until settled.
 */
export function cycleEnergy(circuit: Circuit, evaluated: FullState, tau: number): { energy: number; charge: number } {
  const reset = runPhase(circuit, evaluated, {
    edge: 'falling', overdrive: 0, until: patience * tau, slopeFloor: (stillness * circuit.supply) / tau,
  })
  const { charge } = reset.state
  return { charge, energy: circuit.supply * charge + circuit.clockGates * circuit.supply ** 2 }
}

/**
 * Differences of the side nodes before the next decision, what they weigh at the input together, and at most: the parts of
 * X and O often cancel, and a design must not live from that [V].
 */
export interface Leftover { readonly differences: readonly number[]; readonly atInput: number; readonly atMost: number }

/**
 * What a decision leaves at the input of the next one [V]: differences of the side nodes half a clock rise before the
 * next 50 % crossing, referred to the input with the weights of the initial differences.
 *
 * @param decided state when the reset starts;  @param resetTime between 50 % crossings [s]
 * @param startWeight volts of input per volt of initial difference of each side node
 */
export function leftoverAtInput(circuit: Circuit, decided: FullState, resetTime: number, startWeight: readonly number[]): Leftover {
  const until = resetTime - circuit.clockRise / 2
  const sides = circuit.sideNodes.length
  const left = (nodes: Float64Array): Leftover => {
    const differences = startWeight.map((_, i) => nodes[i] - nodes[sides + i])
    const parts = differences.map((value, i) => startWeight[i] * value)
    const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)
    return { differences, atInput: Math.abs(sum(parts)), atMost: sum(parts.map(Math.abs)) }
  }
  if (until <= -circuit.clockRise / 2) return left(decided.nodes)
  const gone = 1e-10 * circuit.supply
  const { state } = runPhase(circuit, decided, {
    edge: 'falling', overdrive: 0, until, slopeFloor: 0,
    watch: ({ y1 }) => startWeight.every((_, i) => Math.abs(y1[i] - y1[sides + i]) < gone),
  })
  return left(state.nodes)
}
