import { cycleEnergy, evaluateFully, leftoverAtInput } from '../../../main/planner/latch/cycle'
import { transientDelay } from '../../../main/planner/latch/transient'
import { decisionDelay } from '../../../main/planner/models/timing/metastability'
import { energyPerCycle, resetLeftover } from '../../independent/cycle'
import { delayAt, offsetEquivalent, regenerationTime } from '../../independent/decision'
import { analysed, engineCircuit, pairs, settingOfBench, type Bench } from './bench'

/** One number of the engine beside the independent one; `room` is how far apart they may be. */
export interface Compared { what: string; engine: number; independent: number; room: number }

const relative = (what: string, engine: number, independent: number, share: number): Compared =>
  ({ what, engine, independent, room: share * Math.abs(independent) })

/** The parts a comparison is made of; the engine sees one bench, the independent integration maybe another. */
export interface Sides { engine: Bench; independent: Bench }

const patience = 1e-6

/** Regeneration 0.5 %; delays: 1 % from the transient at any overdrive, 2 % from the differential mode while it is linear. */
export function compareDelays({ engine, independent }: Sides): Compared[] {
  const circuit = engineCircuit(engine)
  const { tau, integration } = analysed(circuit)
  const setting = settingOfBench(independent)
  const byFormula = (v: number) => decisionDelay(integration, tau, circuit.supply, v)
  const linear = engine.linear.map((v) => relative(`delay at ${v} V by the formula`, byFormula(v), delayAt(setting, v), 0.02))
  const full = [1e-4, 1e-3, 1e-2, 5e-2].map((v) =>
    relative(`delay at ${v} V by the transient`, transientDelay(circuit, v, patience) ?? Infinity, delayAt(setting, v), 0.01))
  return [relative('regeneration', tau, regenerationTime(setting), 0.005), ...linear, ...full]
}

/**
 * The independent reading stops when the decision has grown 3000 times, so up to a 3000th of what a mismatch does from
 * there on is missing: its volts/3000 for a threshold, about (I/g_m)/3000 times its part for a current factor.
 */
const unread = 1 / 3000
const currentOverConductance = 0.15

/** Input that balances a mismatch of each pair (10 mV of V_T, 2 % of k_p; a tenth when starved), within 1 % of the offset or what is unread. */
export function compareOffsets({ engine, independent }: Sides): Compared[] {
  const { thresholdWeight, gainWeight } = analysed(engineCircuit(engine))
  const setting = settingOfBench(independent)
  return pairs.flatMap(([ours, theirs]): Compared[] => {
    const { threshold: volts, gain: part } = engine.mismatch
    const byThreshold = volts * offsetEquivalent(setting, { what: 'vt', pair: theirs, amount: volts })
    const byGain = part * offsetEquivalent(setting, { what: 'kp', pair: theirs, amount: part })
    const room = (offset: number, floor: number) => Math.max(0.01 * Math.abs(offset), floor * unread)
    return [
      { what: `V_T of ${ours}`, engine: volts * thresholdWeight[ours]!, independent: byThreshold, room: room(byThreshold, volts) },
      { what: `k_p of ${ours}`, engine: part * gainWeight[ours]!, independent: byGain, room: room(byGain, part * currentOverConductance) },
    ]
  })
}

/** What 1 % of capacitance and 5 mV of a start difference ask of the input, 1 % of it. */
export function compareNodes({ engine, independent }: Sides): Compared[] {
  const { capacitanceWeight, startWeight } = analysed(engineCircuit(engine))
  const setting = settingOfBench(independent)
  return (['internal', 'output'] as const).flatMap((nodes, i) => [
    relative(`capacitance of ${nodes}`, capacitanceWeight[i], offsetEquivalent(setting, { what: 'capacitance', nodes, amount: 0.01 }), 0.01),
    relative(`start of ${nodes}`, startWeight[i], offsetEquivalent(setting, { what: 'start', nodes, amount: 5e-3 }), 0.01),
  ])
}

const littleOverdrive = 1e-3

/** Energy of a settled cycle within 2 %: the engine stops once nothing moves, the other side after 15 clock rises each. */
export function compareEnergy({ engine, independent }: Sides): Compared[] {
  const circuit = engineCircuit(engine)
  const { tau } = analysed(circuit)
  const setting = settingOfBench(independent)
  const phase = 15 * setting.clock_rise_s + 40 * tau
  const { state } = evaluateFully(circuit, littleOverdrive, tau)
  return [relative('energy', cycleEnergy(circuit, state, tau).energy, energyPerCycle(setting, littleOverdrive, phase, phase), 0.02)]
}

/**
 * Memory within 2 %, above a floor: with the clock falling the input still pulls at the inner nodes in the independent
 * circuit, but not in the engine's reset, which counts only what the last decision left.
 */
export function compareMemory({ engine, independent }: Sides): Compared[] {
  const circuit = engineCircuit(engine)
  const { tau, startWeight } = analysed(circuit)
  const setting = settingOfBench(independent)
  const { state } = evaluateFully(circuit, littleOverdrive, tau)
  return [1.5, 2, 3].map((rises) => {
    const resetTime = rises * setting.clock_rise_s
    const left = resetLeftover(setting, resetTime, littleOverdrive)
    const expected = Math.abs(startWeight[0] * left.internal_v + startWeight[1] * left.output_v)
    return relative(`memory after ${rises} clock rises`, leftoverAtInput(circuit, state, resetTime, startWeight).atInput, expected, 0.02)
  })
}

export const apart = ({ engine, independent, room }: Compared): number => Math.abs(engine - independent) / room
