import type { LimitName } from '../../contract/choices'
import type { Limits } from '../../contract/result'
import type { Condition } from '../latch/condition'
import { capacitorKick, ladderKick, ladderTime } from '../models/interference/kickback'
import { arrayAttenuation } from '../models/input/load'
import { overlapPerWidth } from '../models/mos/capacitance'
import { trimStep, uniformSpread } from '../models/offset/trim'
import { decisionDelay } from '../models/timing/metastability'
import { designInputCap, type LatchDesign } from './design'
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
  const count = s.codes - 1
  const bank = count * inputCap
  return ladderKick(condition.supply, edge, inputCap, resetTime, ladderTime(flash.ladder_ohm, bank))
    + capacitorKick(kick_imbalance, condition.supply, count, edge, flash.sampling_cap_f + bank)
}

/** Step of the trim at the latch's input [V]; null without trim. */
export function trimStepOf(design: LatchDesign, { circuit, analysis }: LatchFigures): number | null {
  if (design.trim === null) return null
  return trimStep(design.trim.unit, analysis.capacitanceWeight[circuit.inner], circuit.sideCapacitance[circuit.inner])
}

/** Everything reached at a condition for an overdrive [V] that must be resolved at the converter's input. */
export function attained(s: Situation, design: LatchDesign, condition: Condition, figures: LatchFigures, overdrive: number): Attained {
  const inputCap = designInputCap(s, design)
  const a = attenuationOf(s, inputCap)
  const raw = trimStepOf(design, figures)
  const step = raw === null ? null : raw / a
  return {
    delay: decisionDelay(figures.analysis.integration, figures.analysis.tau, condition.supply, a * overdrive),
    noise: figures.analysis.noise / a,
    offset: figures.offset / a,
    residual: step === null ? figures.offset / a : uniformSpread(step),
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
