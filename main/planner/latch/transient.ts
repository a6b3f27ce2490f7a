import { integrateStiff, type OdeStep } from '../numerics/rosenbrock'
import type { Circuit } from './circuit'
import { clockSlope, network, nodeDerivatives, nodeRates, setClock, type ClockEdge } from './network'

/** State of the full circuit: plus side nodes, minus side nodes, shared nodes [V]; then the charge drawn so far [C]. */
export interface FullState { readonly nodes: Float64Array; readonly charge: number }

export interface PhaseRun {
  readonly state: FullState
  readonly endTime: number
  /** True when every node stood still before the time ran out. */
  readonly settled: boolean
}

export interface PhaseOptions {
  /** `high`: time runs from 0. */
  readonly edge: ClockEdge
  /** Differential input, split evenly around the common mode [V]. */
  readonly overdrive: number
  readonly until: number
  /** Settled once every slope stays below this [V/s]; 0 runs to `until`. */
  readonly slopeFloor: number
  readonly watch?: (step: OdeStep) => boolean
}

const relative = 1e-4
const absolute = 1e-5
const maxSteps = 4000

/** The full circuit ready for reset states and runs; both sides, all nodes. */
export function fullStart(circuit: Circuit): FullState {
  return { nodes: network(circuit, 'full').start, charge: 0 }
}

/** Sum of all node capacitances: turns charge into a voltage of the size of the others for the error control. */
function totalCapacitance(circuit: Circuit): number {
  return [...circuit.sideCapacitance, ...circuit.sideCapacitance, ...circuit.sharedCapacitance].reduce((sum, c) => sum + c, 0)
}

/**
 * Runs one clock phase of the full nonlinear circuit from `from`, starting half a clock rise before the 50 % crossing at time 0.
 */
export function runPhase(circuit: Circuit, from: FullState, options: PhaseOptions): PhaseRun {
  const net = network(circuit, 'full')
  const { size } = net
  const reference = totalCapacitance(circuit)
  net.voltage[net.at.input[0]] = circuit.commonMode + options.overdrive / 2
  net.voltage[net.at.input[1]] = circuit.commonMode - options.overdrive / 2
  const start = new Float64Array(size + 1)
  start.set(from.nodes)
  const moveTo = (t: number, y: Float64Array) => {
    setClock(net, t, circuit.clockRise, options.edge)
    for (let i = 0; i < size; i++) net.voltage[i] = y[i]
  }
  let settled = false
  const run = integrateStiff({
    rates: (t, y, into) => {
      moveTo(t, y)
      into[size] = nodeRates(net, into) / reference
    },
    derivatives: (t, y, jacobian, inTime) => {
      moveTo(t, y)
      nodeDerivatives(net, clockSlope(net, t, circuit.clockRise, options.edge), size + 1, jacobian, inTime)
      for (let i = 0; i <= size; i++) jacobian[size * (size + 1) + i] /= reference
      inTime[size] /= reference
    },
  }, {
    from: options.edge === 'high' ? 0 : -circuit.clockRise / 2, to: options.until, start, relative, absolute, maxSteps,
    firstStep: circuit.clockRise / 10, breaks: options.edge === 'high' ? [] : [circuit.clockRise / 2],
    onStep: (step) => {
      let speed = 0
      for (let i = 0; i < size; i++) speed = Math.max(speed, Math.abs(step.f1[i]))
      settled = step.t1 > circuit.clockRise / 2 && speed < options.slopeFloor
      return (options.watch?.(step) ?? false) || settled
    },
  })
  return { state: { nodes: run.y.slice(0, size), charge: from.charge + run.y[size] * reference }, endTime: run.t, settled }
}

/** Root of the cubic through value and slope at both ends of a step: where |difference| reaches `level`. */
function crossing(step: OdeStep, plus: number, minus: number, level: number): number {
  const h = step.t1 - step.t0
  const [v0, v1] = [step.y0[plus] - step.y0[minus], step.y1[plus] - step.y1[minus]]
  const [s0, s1] = [h * (step.f0[plus] - step.f0[minus]), h * (step.f1[plus] - step.f1[minus])]
  let [low, high] = [0, 1]
  for (let pass = 0; pass < 50; pass++) {
    const x = (low + high) / 2
    const value = v0 * (1 + 2 * x) * (1 - x) ** 2 + s0 * x * (1 - x) ** 2 + v1 * x * x * (3 - 2 * x) - s1 * x * x * (1 - x)
    if (Math.abs(value) < level) low = x
    else high = x
  }
  return step.t0 + h * low
}

/** Watches a run for the moment a decision is made, |v_O+ − v_O−| = V_DD/2. */
export function decisionWatch(circuit: Circuit): { watch: (step: OdeStep) => void; time: () => number | null } {
  const plus = circuit.output
  const minus = circuit.sideNodes.length + circuit.output
  const level = circuit.supply / 2
  let found: number | null = null
  return {
    watch: (step) => {
      if (found === null && Math.abs(step.y1[plus] - step.y1[minus]) >= level) found = crossing(step, plus, minus, level)
    },
    time: () => found,
  }
}

/**
 * Decision delay of the full nonlinear circuit from the 50 % crossing of the clock [s]; null when it takes longer than `until`.
 * @param overdrive differential input v [V]
 */
export function transientDelay(circuit: Circuit, overdrive: number, until: number): number | null {
  const decision = decisionWatch(circuit)
  const watch = (step: OdeStep) => { decision.watch(step); return decision.time() !== null }
  runPhase(circuit, fullStart(circuit), { edge: 'rising', overdrive, until, slopeFloor: 0, watch })
  return decision.time()
}
