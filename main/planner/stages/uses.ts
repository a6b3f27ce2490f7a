import type { LimitName } from '../../contract/choices'
import type { Limits } from '../../contract/result'
import type { Condition } from '../latch/condition'
import { samplingPower } from '../models/budget/error-power'
import { capacitorKick, ladderKick, ladderTime } from '../models/interference/kickback'
import { arrayAttenuation } from '../models/input/load'
import { overlapPerWidth } from '../models/mos/capacitance'
import { trimStep, uniformSpread } from '../models/offset/trim'
import { decisionDelay } from '../models/timing/metastability'
import { conversionDelay } from '../models/timing/self-timed'
import type { LatchAnalysis } from '../latch/analysis'
import type { Circuit } from '../latch/circuit'
import { transientDelay } from '../latch/transient'
import { designInputCap, type LatchDesign } from './design'
import { bankCount } from './limits-flash'
import { searchShape } from './limits-sar'
import type { LatchFigures } from './latch-figures'
import type { Situation } from './situation'

/** What a design reaches at one condition and position, referred to the converter's input. */
export interface Attained {
  readonly delay: number
  readonly noise: number
  /** Raw offset, one standard deviation. */
  readonly offset: number
  /** After the offset plan. */
  readonly residual: number
  readonly trimStep: number | null
  readonly kickback: number
  readonly memory: number
  readonly inputCap: number
}

/** Share of the signal that reaches the latch: below 1 only behind a SAR's array. */
export const attenuationOf = (s: Situation, inputCap: number): number => (s.kind.architecture === 'sar' ? arrayAttenuation(inputCap, s.kind.arrayCap) : 1)

/** Kickback at the converter's input before attenuation is taken out [V]. */
export function kickbackOf(s: Situation, design: LatchDesign, condition: Condition): number {
  const edge = design.widths.input_m * overlapPerWidth(s.card)
  const inputCap = designInputCap(s, design)
  const { kick_imbalance } = s.plan.budget
  if (s.kind.architecture === 'sar') return capacitorKick(kick_imbalance, condition.supply, 1, edge, s.kind.arrayCap)
  const { flash, resetTime } = s.kind
  const bank = bankCount(s, s.kind) * inputCap
  const onLadder = ladderKick(condition.supply, edge, inputCap, resetTime, ladderTime(flash.ladder_ohm, bank))
  return flash.front_sampler ? onLadder + capacitorKick(kick_imbalance, condition.supply, s.codes - 1, edge, flash.sampling_cap_f + bank) : onLadder
}

/** Step of the trim at the latch's input [V]; null without trim. */
export function trimStepOf(design: LatchDesign, { circuit, analysis }: LatchFigures): number | null {
  if (design.trim === null) return null
  return trimStep(design.trim.unit, analysis.capacitanceWeight[circuit.inner], circuit.sideCapacitance[circuit.inner])
}

/** Noise with what an autozero stores on its capacitors: √(σ² + 2kT/C_az) [V]. */
function noiseOf({ plan }: Situation, { noise }: LatchFigures['analysis'], temperature: number): number {
  const { offset_method, autozero_cap_f } = plan.comparator
  return offset_method === 'autozero' ? Math.sqrt(noise ** 2 + samplingPower(temperature, autozero_cap_f)) : noise
}

/** What the offset plan leaves of a raw spread [V]. */
function residualOf({ plan }: Situation, raw: number, step: number | null): number {
  if (step !== null) return uniformSpread(step)
  return plan.comparator.offset_method === 'autozero' ? raw / plan.comparator.autozero_gain : raw
}

/** A decision that ends this many τ before the equilibrium is not yet paced by it. */
const early = 5

/**
 * Time of one decision [s]: t_0 + τ·ln(V_DD/2v), and not less than the full circuit takes where a large overdrive decides
 * well before the balanced equilibrium that t_0 and τ belong to (above all at cold slow corners).
 * @param swing V_DD/a [V]; @param overdrive v at the converter's input [V]
 */
export function singleDelay(circuit: Circuit, analysis: LatchAnalysis, swing: number, overdrive: number): { delay: number; transient: boolean } {
  const linear = decisionDelay(analysis.integration, analysis.tau, swing, overdrive)
  if (linear > analysis.settled - early * analysis.tau) return { delay: linear, transient: false }
  const patience = Math.max(analysis.settled, linear) + 20 * analysis.tau
  const full = transientDelay(circuit, (overdrive * circuit.supply) / swing, patience) ?? patience
  return full > linear ? { delay: full, transient: true } : { delay: linear, transient: false }
}

/** t_0 + τ·ln(V_DD/2av) [s]; undefined in a self-timed search, whose delay is cheap as it stands. */
export function linearDelay(
  s: Situation, design: LatchDesign, { supply }: Condition, { analysis }: LatchFigures, overdrive: number | null,
): number | undefined {
  if (overdrive === null) return undefined
  return decisionDelay(analysis.integration, analysis.tau, supply, attenuationOf(s, designInputCap(s, design)) * overdrive)
}

/** Time of one decision, or of all decisions of a self-timed conversion with this latch in every cycle [s]. */
function delayOf(s: Situation, { analysis, circuit }: LatchFigures, swing: number, overdrive: number | null): number {
  if (overdrive !== null) return singleDelay(circuit, analysis, swing, overdrive).delay
  if (s.kind.architecture !== 'sar') throw new RangeError('only a self-timed search has no overdrive of its own')
  return conversionDelay(searchShape(s, s.kind), analysis, swing, s.plan.converter.error_rate)
}

/**
 * Everything reached at a condition, referred to the converter's input.
 * @param overdrive what must be resolved there [V]; null in a self-timed search, whose delay is that of all decisions
 * @param known the delay where it is known otherwise: latches that differ from cycle to cycle, or a neighbour's word [s]
 */
export function attained(
  s: Situation, design: LatchDesign, condition: Condition, figures: LatchFigures, overdrive: number | null, known?: number,
): Attained {
  const inputCap = designInputCap(s, design)
  const a = attenuationOf(s, inputCap)
  const raw = trimStepOf(design, figures)
  const step = raw === null ? null : raw / a
  return {
    delay: known ?? delayOf(s, figures, condition.supply / a, overdrive),
    noise: noiseOf(s, figures.analysis, condition.temperature) / a,
    offset: figures.offset / a,
    residual: residualOf(s, figures.offset / a, step),
    trimStep: step,
    kickback: kickbackOf(s, design, condition) / a,
    memory: figures.leftover.atInput / a,
    inputCap,
  }
}

export const limitKeys = ['time', 'noise', 'offset', 'kickback', 'memory', 'input'] as const satisfies readonly LimitName[]

/** Reached and limit of each of the six, in the order of `limitKeys`. */
export function pairsOf(limits: Limits, reached: Attained): [number, number][] {
  const offset: [number, number] = limits.trim_step_v !== null && reached.trimStep !== null
    ? [reached.trimStep, limits.trim_step_v] : [reached.residual, limits.offset_v]
  return [
    [reached.delay, limits.window_s], [reached.noise, limits.noise_v], offset,
    [reached.kickback, limits.kickback_v], [reached.memory, limits.memory_v], [reached.inputCap, limits.input_cap_f],
  ]
}

/** reached ÷ limit; null against a limit that nothing can meet. */
export const useOf = ([reached, limit]: [number, number]): number | null => (limit > 0 ? reached / limit : null)
