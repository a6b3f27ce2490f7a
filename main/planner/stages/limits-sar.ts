import { monotonicCommonMode } from '../models/timing/search'
import { searchOverdrive, tauLimit } from '../models/timing/metastability'
import type { ErrorBudget } from './budget'
import type { Position } from './positions'
import type { SarSituation, Situation } from './situation'

/** Window of one cycle [s]: cycle time less logic, settling before the decision, and capture set-up. */
export const cycleWindow = (s: Situation, sar: SarSituation, settle: number): number =>
  sar.cycleTime - sar.sar.logic_delay_s - settle - s.captureSetup

/** Smallest overdrive that has to be resolved, one for every cycle [V]. */
export const sarOverdrive = (s: Situation, sar: SarSituation): number => searchOverdrive(s.plan.converter.error_rate, sar.cycles.map((c) => c.step))

/** Common mode that the comparator sees at a cycle [V]. */
export function cycleCommonMode(s: Situation, sar: SarSituation, cycle: number): number {
  const { common_mode_v } = s.plan.converter
  return sar.sar.dac_scheme === 'monotonic' ? monotonicCommonMode(common_mode_v, s.fullScale, cycle) : common_mode_v
}

/** Limits of every cycle of a synchronous search with one comparator. */
export function sarPositions(s: Situation, sar: SarSituation, budget: ErrorBudget): Position[] {
  const { plan, lsb } = s
  const overdrive = sarOverdrive(s, sar)
  const offset = (sar.sar.range_loss * s.fullScale) / 3
  return sar.cycles.map(({ cycle, settle }) => {
    const window = cycleWindow(s, sar, settle)
    return {
      lane: 0, cycle, threshold: null, commonMode: cycleCommonMode(s, sar, cycle),
      limits: {
        window_s: window,
        overdrive_v: overdrive,
        tau_s: tauLimit(window, plan.budget.integration_share, s.card.vdd_v, overdrive),
        integration_s: plan.budget.integration_share * window,
        noise_v: Math.sqrt(budget.noisePower),
        offset_v: offset,
        trim_step_v: plan.comparator.offset_method === 'trim' ? offset * Math.sqrt(12) : null,
        skew_s: null,
        kickback_v: plan.budget.kick_share * lsb,
        memory_v: plan.budget.memory_share * lsb,
        input_cap_f: plan.budget.dac_load_share * sar.arrayCap,
      },
    }
  })
}
