import type { Limits } from '../../contract/result'
import { skewBetweenLanes } from '../models/input/load'
import { monotonicCommonMode, type SearchCycle } from '../models/timing/search'
import { selfTimedTauLimit, type SearchShape } from '../models/timing/self-timed'
import { searchOverdrive, tauLimit } from '../models/timing/metastability'
import type { ErrorBudget } from './budget'
import { offsetPart, perBitSigma } from './offset-limits'
import type { Position } from './positions'
import { offsetOnlyShifts, type SarSituation, type Situation } from './situation'

/** Window of one cycle of a synchronous search [s]: cycle time less logic, settling before the decision, and capture set-up. */
export const cycleWindow = (s: Situation, sar: SarSituation, settle: number): number =>
  sar.cycleTime - sar.sar.logic_delay_s - settle - s.captureSetup

/** Smallest overdrive that has to be resolved, one for every cycle [V]. */
export const sarOverdrive = (s: Situation, sar: SarSituation): number => searchOverdrive(s.plan.converter.error_rate, sar.cycles.map((c) => c.step))

/** Common mode that the comparator sees at a cycle [V]. */
export function cycleCommonMode(s: Situation, sar: SarSituation, cycle: number): number {
  const { common_mode_v } = s.plan.converter
  return sar.sar.dac_scheme === 'monotonic' ? monotonicCommonMode(common_mode_v, s.fullScale, cycle) : common_mode_v
}

export const searchShape = (s: Situation, sar: SarSituation): SearchShape =>
  ({ weights: sar.cycles.map((c) => c.weight), lsb: s.lsb, fullScale: s.fullScale })

type Timing = Pick<Limits, 'window_s' | 'overdrive_v' | 'tau_s' | 'integration_s'>

function synchronousTiming(s: Situation, sar: SarSituation, { settle }: SearchCycle): Timing {
  const share = s.plan.budget.integration_share
  const window = cycleWindow(s, sar, settle)
  const overdrive = sarOverdrive(s, sar)
  return { window_s: window, overdrive_v: overdrive, tau_s: tauLimit(window, share, s.card.vdd_v, overdrive), integration_s: share * window }
}

function selfTimedTiming(s: Situation, sar: SarSituation): Timing {
  const integration = (s.plan.budget.integration_share * sar.decisionTime) / sar.cycles.length
  const tau = selfTimedTauLimit(searchShape(s, sar), integration, s.card.vdd_v, sar.decisionTime, s.plan.converter.error_rate)
  return { window_s: sar.decisionTime, overdrive_v: null, tau_s: tau, integration_s: integration }
}

/** Largest spread of the offset [V]: range loss where it only shifts the transfer, else threshold spread. */
export function sarOffsetLimit(s: Situation, sar: SarSituation, budget: ErrorBudget): number {
  if (offsetOnlyShifts(s)) return (sar.sar.range_loss * s.fullScale) / 3
  const spread = Math.sqrt(offsetPart(s) * budget.spreadPower)
  return sar.perLane > 1 ? Math.min(spread, perBitSigma(s)) : spread
}

/** Limits of every cycle of a search, lane by lane. */
export function sarPositions(s: Situation, sar: SarSituation, budget: ErrorBudget): Position[] {
  const { plan, lsb } = s
  const offset = sarOffsetLimit(s, sar, budget)
  const noise = Math.sqrt(budget.noisePower)
  const shared = sar.sar.timing === 'self_timed' ? selfTimedTiming(s, sar) : null
  const common = {
    offset_v: offset,
    trim_step_v: plan.comparator.offset_method === 'trim' ? offset * Math.sqrt(12) : null,
    skew_s: s.lanes > 1 ? skewBetweenLanes(Math.sqrt(budget.spreadPower / 4), s.inputFrequency, s.fullScale) : null,
    kickback_v: plan.budget.kick_share * lsb,
    memory_v: plan.budget.memory_share * lsb,
    input_cap_f: plan.budget.dac_load_share * sar.arrayCap,
  }
  const cycles = sar.cycles.map((cycle) => ({
    cycle: cycle.cycle, threshold: null, commonMode: cycleCommonMode(s, sar, cycle.cycle),
    limits: { ...(shared ?? synchronousTiming(s, sar, cycle)), noise_v: Math.max(noise, cycle.forgives / 12), ...common },
  }))
  return Array.from({ length: s.lanes }, (_, lane) => lane).flatMap((lane) => cycles.map((cycle) => ({ lane, ...cycle })))
}
