import type { Widths } from '../../contract/plan'
import { balancedTrim } from '../models/offset/trim'
import { gatePerWidth } from '../models/mos/capacitance'
import { inputCapacitance } from '../models/input/load'
import type { DrawnDevice } from '../models/ledger/area'
import type { Situation } from './situation'

/** Trim of a design: 2^bits units of `unit` farad that can move from one inner node to the other. */
export interface TrimDesign { readonly bits: number; readonly unit: number }

/** What sizing decides: the widths and the trim of the one latch that the whole bank uses. */
export interface LatchDesign { readonly widths: Widths; readonly trim: TrimDesign | null }

export const trimCapacitanceOf = ({ trim }: LatchDesign): number => (trim === null ? 0 : balancedTrim(trim.bits, trim.unit))

/** C_in of a design, per side [F]. */
export const designInputCap = (s: Situation, { widths }: LatchDesign): number =>
  inputCapacitance(widths.input_m, gatePerWidth(s.card, widths.input_length_m))

/** Every device of one strong-arm comparator as drawn. */
export function drawnDevices(s: Situation, { widths: w }: LatchDesign): DrawnDevice[] {
  const length = s.card.l_min_m
  return [
    { width: w.input_m, length: w.input_length_m, count: 2 },
    { width: w.cross_n_m, length, count: 2 },
    { width: w.cross_p_m, length, count: 2 },
    { width: w.tail_m, length, count: 1 },
    { width: w.reset_m, length, count: 4 },
  ]
}
