import { builtInCard } from '../../../main/documents/cards'
import type { Card } from '../../../main/contract/cards'
import type { CornerName } from '../../../main/contract/choices'
import { analyseLatch, type LatchAnalysis } from '../../../main/planner/latch/analysis'
import type { Circuit, PairName } from '../../../main/planner/latch/circuit'
import { conditionsOf } from '../../../main/planner/latch/condition'
import { strongArm } from '../../../main/planner/latch/strong-arm'
import type { Pair, Setting, Widths } from '../../independent/setting'

/** One strong-arm latch, described once for the engine and once for the independent integration. */
export interface Bench {
  name: string
  card: Card
  corner: CornerName
  /** hot corners are the first of their kind, cold ones the second */
  cold: boolean
  commonMode: number
  widths: Widths
  load: number
  clockRise: number
  /** overdrives at which the formula has to hold [V]; from which on it leaves the linear region differs from corner to corner */
  linear: readonly number[]
  /** V_T and k_p differences that are still small for this latch [V, 1] */
  mismatch: { threshold: number; gain: number }
}

export function cardNamed(id: string): Card {
  const card = builtInCard(id)
  if (card === null) throw new RangeError(`no card ${id}`)
  return card
}

/** The program's circuit of a bench. */
export function engineCircuit({ card, corner, cold, commonMode, widths, load, clockRise }: Bench): Circuit {
  const conditions = conditionsOf(card, [corner])
  const condition = conditions[cold ? conditions.length - 1 : 0]
  return strongArm({ card, condition, widths, commonMode, load, clockRise, trimCapacitance: 0 })
}

export function analysed(circuit: Circuit): LatchAnalysis {
  const analysis = analyseLatch(circuit, 1e-6)
  if (typeof analysis === 'string') throw new RangeError(analysis)
  return analysis
}

/** Corners by their definition: slow loses a tenth of the supply, gains the card's shift of V_T and loses its part of k_p. */
function shifted(card: Card, corner: CornerName): { card: Card; supply: number } {
  const sign = corner === 'slow' ? 1 : corner === 'fast' ? -1 : 0
  const device = (d: Card['n']) => ({ ...d, vt_v: d.vt_v + sign * card.corner.vt_shift_v, kp_a_v2: d.kp_a_v2 * (1 - sign * card.corner.kp_ratio) })
  return { card: { ...card, n: device(card.n), p: device(card.p) }, supply: card.vdd_v * (1 - 0.1 * sign) }
}

/** The independent integration's setting of the same bench. */
export function settingOfBench({ card, corner, cold, commonMode, widths, load, clockRise }: Bench): Setting {
  const { card: atCorner, supply } = shifted(card, corner)
  const temperature_k = corner === 'typical' ? 300 : cold ? 233 : 398
  return { card: atCorner, vdd_v: supply, temperature_k, widths, load_f: load, clock_rise_s: clockRise, common_mode_v: commonMode, trim_cap_f: 0 }
}

/** The pairs of a strong-arm latch, by the name that each side gives them. */
export const pairs: readonly (readonly [PairName, Pair])[] = [
  ['input', 'input'], ['cross_n', 'cross_n'], ['cross_p', 'cross_p'], ['reset_x', 'reset_internal'], ['reset_o', 'reset_output'],
]

const of28: Widths = { input_m: 4e-6, input_length_m: 3e-8, cross_n_m: 2e-6, cross_p_m: 2e-6, tail_m: 4e-6, reset_m: 1e-6, extra_cap_f: 0 }
const of65: Widths = { input_m: 6e-6, input_length_m: 9e-8, cross_n_m: 2.5e-6, cross_p_m: 3e-6, tail_m: 5e-6, reset_m: 1.5e-6, extra_cap_f: 1e-15 }

const typicalBench = (id: string, commonMode: number, widths: Widths, load: number, clockRise: number): Bench =>
  ({
    name: `${id}, typical, common mode ${commonMode} V`, card: cardNamed(id), corner: 'typical', cold: false, commonMode, widths, load, clockRise,
    linear: [1e-4, 1e-3], mismatch: { threshold: 10e-3, gain: 0.02 },
  })

/** The same latch starved: regeneration is fast at first and slow at the equilibrium, so the linear region ends early. */
const starved = (bench: Bench): Bench =>
  ({
    ...bench, name: `${bench.card.id}, slow and cold, common mode ${bench.commonMode} V`, corner: 'slow', cold: true,
    linear: [1e-5, 1e-4], mismatch: { threshold: 1e-3, gain: 0.002 },
  })

/** Two cards, each at a low and a high common mode, and the cold slow corner of one. */
export const benches: readonly Bench[] = [
  typicalBench('generic-28', 0.5, of28, 2e-15, 2e-11),
  typicalBench('generic-28', 0.7, of28, 2e-15, 2e-11),
  typicalBench('generic-65', 0.55, of65, 3e-15, 3e-11),
  typicalBench('generic-65', 0.85, of65, 3e-15, 3e-11),
  starved(typicalBench('generic-28', 0.55, of28, 2e-15, 2e-11)),
]
