import type { Widths } from '../../contract/plan'
import { topologies, widthsOf } from '../latch/topologies'
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

/** Every device of one comparator as drawn. */
export function drawnDevices(s: Situation, { widths }: LatchDesign): DrawnDevice[] {
  const { topology } = s.plan.comparator
  return widthsOf(topology).map((key) => ({
    width: widths[key]!, length: key === 'input_m' ? widths.input_length_m : s.card.l_min_m, count: topologies[topology].drawn[key]!,
  }))
}
