import { offsetPart, sigmaLimits, trimLimit } from './offset-limits'
import { droopCapacitance, feedthroughCapacitance, skewAtLevel, skewBetweenLanes } from '../models/input/load'
import { tapVariance } from '../models/offset/mismatch'
import { metastableOverdrive, neededOverdrive, tauLimit } from '../models/timing/metastability'
import type { ErrorBudget } from './budget'
import type { Position } from './positions'
import type { FlashSituation, Situation } from './situation'

/** Time of the decision window [s]: evaluate fraction of the lane period less clock uncertainty and capture set-up. */
export const flashWindow = (s: Situation, flash: FlashSituation): number => flash.evaluateTime - s.clockUncertainty - s.captureSetup

/** Smallest overdrive the comparator itself must resolve in the window [V]. */
export function flashOverdrive(s: Situation, flash: FlashSituation): number {
  const { converter } = s.plan
  return neededOverdrive(
    metastableOverdrive(converter.error_rate, s.lsb), s.lsb, flash.flash.capture_latches, flash.evaluateTime - s.captureSetup, s.card.logic.fo4_s,
  )
}

/** Bank capacitance allowed on one ladder, by what allows it [F]. */
export function bankCapacitances(s: Situation, { flash }: FlashSituation): { sampler: number; ladder: number; source: number } {
  const { source_ohm, input_attenuation_db } = s.plan.converter
  return {
    sampler: flash.bank_share * flash.sampling_cap_f,
    ladder: feedthroughCapacitance(s.bits, s.inputFrequency, flash.ladder_ohm),
    source: droopCapacitance(input_attenuation_db, s.inputFrequency, source_ohm),
  }
}

/** Comparators that one ladder serves: of its lane with a front sampler, of all lanes without. */
export const bankCount = (s: Situation, { flash }: FlashSituation): number => (s.codes - 1) * (flash.front_sampler ? 1 : s.lanes)

/** Input capacitance that one comparator may have per side [F]. */
function inputCapLimit(s: Situation, kind: FlashSituation): number {
  const caps = bankCapacitances(s, kind)
  return Math.min(kind.flash.front_sampler ? caps.sampler : caps.source, caps.ladder) / bankCount(s, kind)
}

/** Skew to hand on [s]: between lanes, and at each tap where no front sampler holds the signal; null where neither applies. */
function skewLimit(s: Situation, { flash }: FlashSituation, budget: ErrorBudget, level: number): number | null {
  const error = Math.sqrt(budget.spreadPower / 4)
  const lanes = s.lanes > 1 ? skewBetweenLanes(error, s.inputFrequency, s.fullScale) : null
  if (flash.front_sampler) return lanes
  return Math.min(lanes ?? Infinity, skewAtLevel(error, s.inputFrequency, s.fullScale, level))
}

/** Limits of every comparator of a flash, lane by lane, lowest threshold first. */
export function flashPositions(s: Situation, kind: FlashSituation, budget: ErrorBudget): Position[] {
  const { plan, lsb, codes } = s
  const window = flashWindow(s, kind)
  const overdrive = flashOverdrive(s, kind)
  const yields = sigmaLimits(s)
  const spread = offsetPart(s) * budget.spreadPower
  const ladder = kind.flash.ladder_sigma
  const common = {
    window_s: window,
    overdrive_v: overdrive,
    tau_s: tauLimit(window, plan.budget.integration_share, s.card.vdd_v, overdrive),
    integration_s: plan.budget.integration_share * window,
    noise_v: Math.sqrt(budget.noisePower),
    trim_step_v: plan.comparator.offset_method === 'trim' ? trimLimit(s, spread) : null,
    kickback_v: plan.budget.kick_share * lsb,
    memory_v: plan.budget.memory_share * lsb,
    input_cap_f: inputCapLimit(s, kind),
  }
  const taps = Array.from({ length: codes - 1 }, (_, i) => i + 1).map((k) => {
    const threshold = -s.fullScale / 2 + k * lsb
    const variance = Math.min(spread, yields.inl ** 2 - tapVariance(lsb, ladder, codes, k), yields.dnl ** 2 - (lsb * ladder) ** 2 / 2)
    return { threshold, limits: { ...common, offset_v: Math.sqrt(Math.max(0, variance)), skew_s: skewLimit(s, kind, budget, threshold) } }
  })
  return Array.from({ length: s.lanes }, (_, lane) => lane)
    .flatMap((lane) => taps.map((tap) => ({ lane, cycle: null, commonMode: plan.converter.common_mode_v, ...tap })))
}
