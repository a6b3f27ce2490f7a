import type { ComparatorEntry, Limits, Reached, Use } from '../contract/result'

/** One thing a comparator is held to, or that is handed on, as the sheet shows it. */
export interface Measure {
  readonly limit: keyof Limits | null
  readonly reached: keyof Reached | null
  readonly label: string
  readonly symbol: string
  readonly unit: string
  readonly asks: string
}

const m = (limit: Measure['limit'], reached: Measure['reached'], label: string, symbol: string, unit: string, asks: string): Measure =>
  ({ limit, reached, label, symbol, unit, asks })

/** Every limit of a comparator, in the order in which they are shown. */
export const measures: readonly Measure[] = [
  m('window_s', 'delay_s', 'Decision', 't_win', 's', 'Made by then, from the 50 % crossing of the clock edge.'),
  m('overdrive_v', null, 'Smallest overdrive', 'v_need', 'V', 'Still resolved within the window at the allowed error rate.'),
  m('integration_s', 'integration_s', 'Integration', 't_0', 's', 'Limit: a start for a design still to come. Reached: counts through the decision.'),
  m('tau_s', 'tau_s', 'Regeneration', 'τ', 's', 'Limit: a start for a design still to come. Reached: counts through the decision.'),
  m('noise_v', 'noise_v', 'Noise', 'σ_n', 'V', 'Input-referred, of one decision, rms.'),
  m('offset_v', 'residual_v', 'Offset', 'σ_os', 'V', 'One standard deviation, after the offset plan.'),
  m('trim_step_v', 'trim_step_v', 'Trim step', '', 'V', 'Largest step of the trim, referred to the input.'),
  m('skew_s', null, 'Skew', '', 's', 'Handed on to the layout, rms.'),
  m('kickback_v', 'kickback_v', 'Kickback', 'v_kick', 'V', 'What a decision may leave on its own input.'),
  m('memory_v', 'memory_v', 'Memory', 'v_mem', 'V', 'What the last decision may leave after reset.'),
  m('input_cap_f', 'input_cap_f', 'Input load', 'C_in', 'F', 'Of one comparator, per side.'),
]

/** What is reached without a limit of its own. */
export const handedOn: readonly Measure[] = [
  m(null, 'offset_v', 'Raw offset', 'σ_raw', 'V', 'One standard deviation, before the offset plan.'),
  m(null, 'aperture_s', 'Aperture', '', 's', 'Width of the input aperture, 10 to 90 %.'),
  m(null, 'energy_j', 'Energy', 'E', 'J', 'Of one decision and reset, its clocked gates included.'),
  m(null, 'area_m2', 'Area', '', 'm²', 'Of one comparator, without its trim.'),
]

/** One of the six uses: what is reached against which limit. */
export interface UseMeasure {
  readonly use: keyof Use
  readonly reached: keyof Reached
  readonly limit: keyof Limits
  readonly label: string
  readonly unit: string
}

const fixed: readonly UseMeasure[] = [
  { use: 'time', reached: 'delay_s', limit: 'window_s', label: 'Decision', unit: 's' },
  { use: 'noise', reached: 'noise_v', limit: 'noise_v', label: 'Noise', unit: 'V' },
  { use: 'offset', reached: 'residual_v', limit: 'offset_v', label: 'Offset', unit: 'V' },
  { use: 'kickback', reached: 'kickback_v', limit: 'kickback_v', label: 'Kickback', unit: 'V' },
  { use: 'memory', reached: 'memory_v', limit: 'memory_v', label: 'Memory', unit: 'V' },
  { use: 'input', reached: 'input_cap_f', limit: 'input_cap_f', label: 'Input load', unit: 'F' },
]

/** The six uses of a bank; a trimmed one is held to its trim step, an autozeroed one to what is left. */
export function useMeasures(comparators: readonly ComparatorEntry[]): readonly UseMeasure[] {
  if (!comparators.some((entry) => entry.limits.trim_step_v !== null)) return fixed
  return fixed.map((one) => (one.use === 'offset' ? { ...one, reached: 'trim_step_v', limit: 'trim_step_v', label: 'Trim step' } : one))
}

/** Why a limit is not there, in the words of the sheet. */
export const absent: Partial<Record<keyof Limits, string>> = {
  overdrive_v: 'None: self-timed, so the sum of all decisions has to fit.',
  trim_step_v: 'None: offsets are not trimmed.',
  skew_s: 'None: the input is held, so skew costs nothing.',
}
/** Why something reached is not there. */
export const notReached = 'The latch could not be evaluated: see the findings.'
/** Why a use is not there though limit and reached are. */
export const noUse = 'The limit is zero or below, so nothing can be held against it.'
