import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import type { Waves } from '../contract/waves'
import { bankOf } from './bank-of'
import type { Circuit } from './latch/circuit'
import { setClock, network } from './latch/network'
import { decisionWatch, fullStart, runPhase, type FullState, type PhaseOptions } from './latch/transient'
import type { OdeStep } from './numerics/rosenbrock'
import type { Bank } from './stages/bank'
import { circuitOf } from './stages/latch-figures'
import { attainedAt, type Evaluated } from './stages/reached'

export interface WavesOptions {
  /** Index of the comparator, from 1. */
  readonly index: number
  /** Differential overdrive [V]; null: half an LSB. */
  readonly overdrive_v: number | null
}

const evaluatePoints = 320
const resetPoints = 160

type Trace = readonly { readonly t: number; readonly nodes: Float64Array }[]

/** A phase sampled on an even grid by the cubic through value and slope at both ends of every step. */
function tracePhase(circuit: Circuit, from: FullState, options: PhaseOptions, points: number): { trace: Trace; state: FullState } {
  const size = from.nodes.length
  const first = -circuit.clockRise / 2
  const spacing = (options.until - first) / points
  const trace: { t: number; nodes: Float64Array }[] = [{ t: first, nodes: Float64Array.from(from.nodes) }]
  const watch = (step: OdeStep): boolean => {
    const h = step.t1 - step.t0
    for (let t = first + trace.length * spacing; t <= step.t1 + 1e-9 * spacing && trace.length <= points; t = first + trace.length * spacing) {
      const x = Math.min(1, (t - step.t0) / h)
      const [a, b, c, d] = [(1 + 2 * x) * (1 - x) ** 2, x * (1 - x) ** 2 * h, x * x * (3 - 2 * x), -x * x * (1 - x) * h]
      trace.push({ t, nodes: Float64Array.from({ length: size }, (_, i) => a * step.y0[i] + b * step.f0[i] + c * step.y1[i] + d * step.f1[i]) })
    }
    options.watch?.(step)
    return false
  }
  return { trace, state: runPhase(circuit, from, { ...options, watch }).state }
}

/** Where a decision takes longest: the corner that waves are most worth looking at. */
function slowest(bank: Bank, points: readonly Evaluated[], overdrive: number | null): Evaluated {
  const delay = (p: Evaluated) => attainedAt(bank.s, bank.design, p, overdrive)?.delay ?? Infinity
  return points.reduce((a, b) => (delay(b) > delay(a) ? b : a))
}

/** Lengths of the two clock phases between 50 % crossings [s]. */
function phaseLengths({ s, positions }: Bank, index: number): { evaluate: number; reset: number } {
  const least = 4 * s.plan.comparator.clock_rise_s
  const window = positions[index - 1].limits.window_s
  const share = s.kind.architecture === 'sar' && s.kind.sar.timing === 'self_timed' ? window / s.kind.cycles.length : window
  const evaluate = s.kind.architecture === 'flash' ? s.kind.evaluateTime : share
  return { evaluate: Math.max(evaluate, least), reset: Math.max(s.kind.resetTime, least) }
}

/** First time at which the inner nodes together have fallen by an n threshold: from there the cross-coupled n pair conducts. */
function takeOver(circuit: Circuit, trace: Trace, threshold: number): number {
  const sides = circuit.sideNodes.length
  const found = trace.find(({ nodes }) => (nodes[circuit.inner] + nodes[sides + circuit.inner]) / 2 < circuit.supply - threshold)
  return found === undefined ? trace[trace.length - 1].t : found.t
}

function phasesOf(circuit: Circuit, evaluate: Trace, lengths: { evaluate: number; reset: number }, decision: number | null, threshold: number): Waves['phases'] {
  const start = -circuit.clockRise / 2
  const regenerate = Math.min(takeOver(circuit, evaluate, threshold), decision ?? Infinity, lengths.evaluate)
  const decided = Math.min(decision ?? lengths.evaluate, lengths.evaluate)
  const phases: Waves['phases'] = [
    { name: 'reset', from_s: start, to_s: 0 },
    { name: 'integrate', from_s: 0, to_s: Math.max(0, regenerate) },
    { name: 'regenerate', from_s: Math.max(0, regenerate), to_s: decided },
    { name: 'decided', from_s: decided, to_s: lengths.evaluate },
    { name: 'reset', from_s: lengths.evaluate, to_s: lengths.evaluate + lengths.reset },
  ]
  return phases.filter((phase) => phase.to_s > phase.from_s)
}

function rowsOf(circuit: Circuit, trace: Trace, edge: 'rising' | 'falling', shift: number): number[][] {
  const net = network(circuit, 'full')
  const sides = circuit.sideNodes.length
  return trace.map(({ t, nodes }) => {
    setClock(net, t, circuit.clockRise, edge)
    const pairs = circuit.sideNodes.flatMap((_, i) => [nodes[i], nodes[sides + i]])
    return [t + shift, net.voltage[net.at.clock], ...pairs, ...nodes.subarray(2 * sides)].map((value) => Number(value.toPrecision(7)))
  })
}

/**
 * Transient of one comparator of the planned bank through evaluation and reset, at the corner where it decides slowest.
 * @throws RangeError when the bank has no comparator of that index
 */
export function waves(document: Plan, card: Card, options: WavesOptions): Waves {
  const bank = bankOf(document, card)
  const position = bank.positions[options.index - 1]
  if (position === undefined) throw new RangeError(`there is no comparator ${options.index}: the bank has ${bank.positions.length}`)
  const points = bank.evaluated.filter((e) => e.commonMode === position.commonMode)
  const { condition } = slowest(bank, points, position.limits.overdrive_v)
  const circuit = circuitOf(bank.s, bank.design, condition, position.commonMode)
  const overdrive = options.overdrive_v ?? bank.s.lsb / 2
  const lengths = phaseLengths(bank, options.index)
  const decision = decisionWatch(circuit)
  const evaluate = tracePhase(circuit, fullStart(circuit), {
    edge: 'rising', overdrive, until: lengths.evaluate - circuit.clockRise / 2, slopeFloor: 0,
    watch: (step) => { decision.watch(step); return false },
  }, evaluatePoints)
  const reset = tracePhase(circuit, evaluate.state, { edge: 'falling', overdrive, until: lengths.reset - circuit.clockRise / 2, slopeFloor: 0 }, resetPoints)
  return {
    overdrive_v: overdrive,
    corner: condition.name,
    columns: ['time_s', 'clock_v', ...circuit.sideNodes.flatMap((name) => [`${name}_pos_v`, `${name}_neg_v`]), ...circuit.sharedNodes.map((name) => `${name}_v`)],
    rows: [...rowsOf(circuit, evaluate.trace, 'rising', 0), ...rowsOf(circuit, reset.trace.slice(1), 'falling', lengths.evaluate)],
    phases: phasesOf(circuit, evaluate.trace, lengths, decision.time(), condition.n.threshold),
    decision_s: decision.time(),
  }
}
