import { gatePerWidth } from '../../models/mos/capacitance'
import type { LatchDesign } from '../design'
import type { Demand } from '../positions'
import type { Situation } from '../situation'

/**
 * A plausible first design: the input pair as wide as offset or noise asks for at minimum length, within its load limit;
 * the rest in proportions that are common practice.
 * @param size scales the whole latch
 */
export function startDesign(s: Situation, demands: readonly Demand[], bits: number | null, size: number): LatchDesign {
  const { card } = s
  const cap = Math.min(...demands.map((d) => d.limits.input_cap_f))
  const widestByLoad = cap / gatePerWidth(card, card.l_min_m)
  const width = Math.max(4 * card.w_min_m, Math.min(30 * card.w_min_m * size, 0.9 * widestByLoad))
  return {
    widths: {
      input_m: width, input_length_m: card.l_min_m, cross_n_m: 0.5 * width, cross_p_m: 0.5 * width,
      tail_m: width, reset_m: Math.max(card.w_min_m, 0.25 * width), extra_cap_f: 0.2 * card.cap.wire_f,
      ...(s.plan.comparator.topology === 'double_tail' ? { second_tail_m: 1.3 * width, second_input_m: 0.6 * width } : {}),
    },
    trim: bits === null ? null : { bits, unit: 2 * card.cap.trim_unit_f },
  }
}
