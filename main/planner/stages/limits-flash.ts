import { sigmaLimits, trimLimit } from './offset-limits'
import { droopCapacitance, feedthroughCapacitance, skewBetweenLanes } from '../models/input/load'
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

/** The part of the spread share that offsets may use: all of it, ¾ where skew has a quarter. */
export const offsetPart = (lanes: number): number => (lanes > 1 ? 0.75 : 1)

/** Limits of every comparator of a flash with a front sampler, lane by lane, lowest threshold first. */
export function flashPositions(s: Situation, flash: FlashSituation, budget: ErrorBudget): Position[] {
  const { plan, lsb, codes } = s
  const window = flashWindow(s, flash)
  const overdrive = flashOverdrive(s, flash)
  const yields = sigmaLimits(s)
  const spread = offsetPart(s.lanes) * budget.spreadPower
  const ladder = flash.flash.ladder_sigma
  const caps = bankCapacitances(s, flash)
  const common = {
    window_s: window,
    overdrive_v: overdrive,
    tau_s: tauLimit(window, plan.budget.integration_share, s.card.vdd_v, overdrive),
    integration_s: plan.budget.integration_share * window,
    noise_v: Math.sqrt(budget.noisePower),
    trim_step_v: plan.comparator.offset_method === 'trim' ? trimLimit(s, spread) : null,
    skew_s: s.lanes > 1 ? skewBetweenLanes(Math.sqrt(budget.spreadPower / 4), s.inputFrequency, s.fullScale) : null,
    kickback_v: plan.budget.kick_share * lsb,
    memory_v: plan.budget.memory_share * lsb,
    input_cap_f: Math.min(caps.sampler, caps.ladder) / (codes - 1),
  }
  const taps = Array.from({ length: codes - 1 }, (_, i) => i + 1).map((k) => {
    const variance = Math.min(spread, yields.inl ** 2 - tapVariance(lsb, ladder, codes, k), yields.dnl ** 2 - (lsb * ladder) ** 2 / 2)
    return { threshold: -s.fullScale / 2 + k * lsb, limits: { ...common, offset_v: Math.sqrt(Math.max(0, variance)) } }
  })
  return Array.from({ length: s.lanes }, (_, lane) => lane)
    .flatMap((lane) => taps.map((tap) => ({ lane, cycle: null, commonMode: plan.converter.common_mode_v, ...tap })))
}
