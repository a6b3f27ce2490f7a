import type { Card } from '../../contract/cards'
import type { FlashBrief, Plan, SarBrief } from '../../contract/plan'
import { conditionsOf, type Condition } from '../latch/condition'
import { arrayUnits } from '../models/dac/scheme'
import { searchCycles, searchWeights, type SearchCycle } from '../models/timing/search'

/** What follows from the brief by definition alone; every later stage reads it. SI units. */
export interface Situation {
  readonly plan: Plan
  readonly card: Card
  readonly conditions: readonly Condition[]
  readonly bits: number
  /** M = 2^N. */
  readonly codes: number
  /** Δ [V]. */
  readonly lsb: number
  readonly fullScale: number
  readonly lanes: number
  /** T_lane = lanes/f_s [s]. */
  readonly laneTime: number
  readonly inputFrequency: number
  /** Of the chosen corners [K]. */
  readonly hottest: number
  readonly captureSetup: number
  readonly clockUncertainty: number
  /** Physical comparators of the whole bank. */
  readonly comparatorCount: number
  /** Decisions per second of the whole bank. */
  readonly decisionRate: number
  /** Required yield of INL and of DNL, each, of one lane. */
  readonly laneYield: number
  /** The same of the whole chip. */
  readonly yieldEach: number
  readonly kind: FlashSituation | SarSituation
}

export interface FlashSituation {
  readonly architecture: 'flash'
  readonly flash: FlashBrief
  /** Between 50 % crossings of the clock [s]. */
  readonly evaluateTime: number
  readonly resetTime: number
}

export interface SarSituation {
  readonly architecture: 'sar'
  readonly sar: SarBrief
  readonly cycles: readonly SearchCycle[]
  readonly cycleTime: number
  /** B: what is left of the lane period for all decisions of a self-timed search [s]. */
  readonly decisionTime: number
  /** Physical comparators of one lane. */
  readonly perLane: number
  /** Array capacitance of one side [F]. */
  readonly arrayCap: number
  readonly resetTime: number
}

function flashSituation(plan: Plan, laneTime: number): FlashSituation {
  const flash = plan.converter.flash!
  return { architecture: 'flash', flash, evaluateTime: flash.evaluate_fraction * laneTime, resetTime: (1 - flash.evaluate_fraction) * laneTime }
}

function sarSituation(plan: Plan, lsb: number, laneTime: number): SarSituation {
  const sar = plan.converter.sar!
  const bits = plan.converter.resolution_bits
  const cycles = searchCycles(searchWeights(bits, sar.redundant_cycles), plan.converter.full_scale_v, lsb, sar.dac_tau_s, sar.settle_lsb * lsb)
  return {
    architecture: 'sar', sar, cycles,
    cycleTime: (laneTime * (1 - sar.sample_fraction)) / cycles.length,
    decisionTime: laneTime * (1 - sar.sample_fraction) - cycles.reduce((sum, c) => sum + sar.logic_delay_s + c.settle, 0),
    perLane: sar.comparators === 'one' ? 1 : cycles.length,
    arrayCap: arrayUnits(sar.dac_scheme, bits) * sar.unit_cap_f,
    resetTime: Math.min(...cycles.slice(1).map((c) => sar.logic_delay_s + c.settle)),
  }
}

/** Reads the brief; the plan has every default written out and its own architecture's block. */
export function situationOf(plan: Plan, card: Card): Situation {
  const { converter, budget } = plan
  const codes = 2 ** converter.resolution_bits
  const lsb = converter.full_scale_v / codes
  const laneTime = converter.lanes / converter.sample_rate_hz
  const conditions = conditionsOf(card, plan.corners)
  const kind = converter.architecture === 'flash' ? flashSituation(plan, laneTime) : sarSituation(plan, lsb, laneTime)
  const yieldEach = 1 - (1 - converter.yield) / 2
  const perSample = kind.architecture === 'flash' ? codes - 1 : kind.cycles.length
  return {
    plan, card, conditions, codes, lsb, laneTime, kind, yieldEach,
    bits: converter.resolution_bits,
    fullScale: converter.full_scale_v,
    lanes: converter.lanes,
    inputFrequency: converter.input_frequency_hz ?? converter.sample_rate_hz / 2,
    hottest: Math.max(...conditions.map((c) => c.temperature)),
    captureSetup: budget.capture_setup_s ?? card.logic.fo4_s,
    clockUncertainty: budget.clock_uncertainty_s ?? card.logic.fo4_s / 2,
    comparatorCount: converter.lanes * (kind.architecture === 'flash' ? codes - 1 : kind.perLane),
    decisionRate: perSample * converter.sample_rate_hz,
    laneYield: yieldEach ** (1 / converter.lanes),
  }
}

/** Whether one comparator's offset only shifts the transfer: a SAR of one lane with one comparator. */
export const offsetOnlyShifts = ({ kind, lanes }: Situation): boolean => kind.architecture === 'sar' && kind.perLane === 1 && lanes === 1

/** Capacitance per side that a sample is held on [F]; null in a flash without front sampler. */
export const heldCapacitance = ({ kind }: Situation): number | null =>
  (kind.architecture === 'sar' ? kind.arrayCap : kind.flash.front_sampler ? kind.flash.sampling_cap_f : null)
