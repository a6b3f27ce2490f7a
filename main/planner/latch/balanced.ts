import { integrateStiff } from '../numerics/rosenbrock'
import type { Circuit } from './circuit'
import { differentialMode, type DifferentialMode } from './differential'
import { dominantMode, type Mode } from './modes'
import { clockSlope, network, nodeDerivatives, nodeRates, setClock, type Network } from './network'

/**
 * The balanced trajectory with what the differential mode needs at both ends and the middle of every step.
 * Moment 2i belongs to the start of step i, 2i + 1 to its middle, 2i + 2 to its end.
 */
export interface Trajectory {
  readonly mode: DifferentialMode
  readonly times: readonly number[]
  readonly moments: Float64Array
  /** Dominant differential mode at the equilibrium, λ > 0. */
  readonly equilibrium: Mode
  /** Half-circuit voltages there [V]. */
  readonly resting: Float64Array
}

/** Why a trajectory gives no latch: it settles without regenerating, or has not got there in the steps allowed. */
export type LatchFailure = 'no_regeneration' | 'too_slow'

const relative = 5e-6
const absolute = 2e-6
const settled = 2e-5
const maxSteps = 8000
/** Longest step in units of the dominant growth or decay time: keeps the quadratures along the trajectory below 1e-4. */
const stepReach = 1.4

/** The fast mode may pass this many times within a step, but is not followed into steps this much shorter than the slow one's. */
const fastReach = 3
const shortest = 0.004

function longestStep(a: Float64Array, at: number, slow: number): number {
  const norm = Math.max(Math.abs(a[at]) + Math.abs(a[at + 1]), Math.abs(a[at + 2]) + Math.abs(a[at + 3]))
  return Math.min(stepReach / slow, Math.max(fastReach / norm, shortest / slow))
}

interface Recorder { times: number[]; moments: Float64Array; count: number }

function room(recorder: Recorder, stride: number): number {
  const need = (recorder.count + 1) * stride
  if (need > recorder.moments.length) {
    const larger = new Float64Array(2 * need)
    larger.set(recorder.moments)
    recorder.moments = larger
  }
  return recorder.count++ * stride
}

/** Largest node slope of the first `size` entries [V/s]. */
function fastest(rates: Float64Array, size: number): number {
  let worst = 0
  for (let i = 0; i < size; i++) worst = Math.max(worst, Math.abs(rates[i]))
  return worst
}

/** Puts the states at time t into the network and writes their slopes. */
function moveTo(net: Network, circuit: Circuit, t: number, y: Float64Array, slopes: Float64Array): void {
  setClock(net, t, circuit.clockRise, 'rising')
  net.voltage.set(y)
  nodeRates(net, slopes)
}

/**
 * Integrates the balanced half circuit from reset, clock low, until it sits in its metastable equilibrium.
 * @param giveUpAfter time after the clock edge past which the latch counts as too slow [s]
 */
export function balancedTrajectory(circuit: Circuit, giveUpAfter: number): Trajectory | LatchFailure {
  const net = network(circuit, 'half')
  const mode = differentialMode(circuit, net)
  const recorder: Recorder = { times: [], moments: new Float64Array(mode.stride * 400), count: 0 }
  const slopes = new Float64Array(net.size)
  const middle = new Float64Array(net.size)
  const record = (t: number, y: Float64Array): number => {
    const at = room(recorder, mode.stride)
    moveTo(net, circuit, t, y, slopes)
    mode.fill(net, slopes, recorder.moments, at)
    return at
  }
  const from = -circuit.clockRise / 2
  recorder.times.push(from)
  let last = record(from, net.start)
  let equilibrium: Mode | null = null
  let failure: LatchFailure | null = null
  const run = integrateStiff({
    rates: (t, y, into) => moveTo(net, circuit, t, y, into),
    derivatives: (t, y, jacobian, inTime) => {
      setClock(net, t, circuit.clockRise, 'rising')
      net.voltage.set(y)
      nodeDerivatives(net, clockSlope(net, t, circuit.clockRise, 'rising'), net.size, jacobian, inTime)
    },
  }, {
    from, to: giveUpAfter, start: net.start, relative, absolute, maxSteps,
    firstStep: circuit.clockRise / 20, breaks: [circuit.clockRise / 2],
    longestStep: () => longestStep(recorder.moments, last, Math.abs(dominantMode(recorder.moments, last, circuit.output).growth)),
    onStep: ({ t0, t1, y0, y1, f0, f1 }) => {
      const h = t1 - t0
      for (let i = 0; i < net.size; i++) middle[i] = (y0[i] + y1[i]) / 2 + (h / 8) * (f0[i] - f1[i])
      record(t0 + h / 2, middle)
      last = record(t1, y1)
      recorder.times.push(t1)
      if (t1 < circuit.clockRise / 2) return false
      const found = dominantMode(recorder.moments, last, circuit.output)
      const speed = fastest(slopes, net.size)
      if (found.growth > 0 && speed < settled * circuit.supply * found.growth) equilibrium = found
      else if (found.growth <= 0 && t1 - from > giveUpAfter / 100 && speed * (t1 - from) < 1e-4 * circuit.supply) failure = 'no_regeneration'
      return equilibrium !== null || failure !== null
    },
  })
  if (failure !== null) return failure
  if (run.end !== 'stopped' || equilibrium === null) return 'too_slow'
  return { mode, times: recorder.times, moments: recorder.moments, equilibrium, resting: run.y.slice(0, net.size) }
}
