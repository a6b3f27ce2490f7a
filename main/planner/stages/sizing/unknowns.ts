import type { Card } from '../../../contract/cards'
import type { Widths } from '../../../contract/plan'
import { widthsOf, type DrawnWidth } from '../../latch/topologies'
import type { LatchDesign } from '../design'
import type { Situation } from '../situation'

type WidthUnknown = DrawnWidth | 'input_length_m'

/** Dimensions that sizing looks for: the widths of the topology and the length of the input pair. */
export const widthUnknowns = ({ plan }: Situation): WidthUnknown[] =>
  widthsOf(plan.comparator.topology).flatMap((key): WidthUnknown[] => (key === 'input_m' ? [key, 'input_length_m'] : [key]))

const widest = 2e-3
const longest = 50
const largestExtra = 1e-11
const largestUnit = 1e-11
const mostBits = 16

/** Extra capacitance may be 0: its unknown is ln(C_extra + floor), the floor a tenth of a node's wire. */
const extraFloor = (card: Card): number => Math.max(card.cap.wire_f, 1e-16) / 10

export interface UnknownSpace {
  readonly lower: Float64Array
  readonly upper: Float64Array
  readonly toDesign: (x: Float64Array) => LatchDesign
  readonly fromDesign: (design: LatchDesign) => Float64Array
}

/**
 * Bounds and both directions of the change of variables.
 * @param trim false: no trim; a number: that many bits; 'free': bits are relaxed to a real number
 */
export function unknownSpace(s: Situation, trim: false | number | 'free'): UnknownSpace {
  const { card } = s
  const keys = widthUnknowns(s)
  const n = keys.length
  const floor = extraFloor(card)
  const least = keys.map((key) => (key === 'input_length_m' ? card.l_min_m : card.w_min_m))
  const most = keys.map((key) => (key === 'input_length_m' ? card.l_min_m * longest : widest))
  const trimLeast = trim === false ? [] : trim === 'free' ? [card.cap.trim_unit_f, 2] : [card.cap.trim_unit_f]
  const trimMost = trim === false ? [] : trim === 'free' ? [largestUnit, 2 ** mostBits] : [largestUnit]
  return {
    lower: Float64Array.from([...least, floor, ...trimLeast], Math.log),
    upper: Float64Array.from([...most, largestExtra, ...trimMost], Math.log),
    toDesign: (x) => {
      const widths = Object.fromEntries(keys.map((key, i) => [key, Math.exp(x[i])])) as unknown as Widths
      const extra = Math.exp(x[n]) - floor
      const bits = trim === 'free' ? x[n + 2] / Math.LN2 : trim
      return {
        widths: { ...widths, extra_cap_f: extra > 1e-3 * floor ? extra : 0 },
        trim: bits === false ? null : { bits, unit: Math.exp(x[n + 1]) },
      }
    },
    fromDesign: ({ widths, trim: t }) => Float64Array.from([
      ...keys.map((key) => Math.log(widths[key]!)),
      Math.log(widths.extra_cap_f + floor),
      ...(trim === false ? [] : [Math.log(t?.unit ?? card.cap.trim_unit_f)]),
      ...(trim === 'free' ? [(t?.bits ?? 4) * Math.LN2] : []),
    ]),
  }
}
