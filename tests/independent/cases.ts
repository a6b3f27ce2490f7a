import processCards from '../../assets/cards/generic.json'
import doubleTailCase from '../published/double-tail-case.json'
import workedCases from '../published/worked-cases.json'
import type { Setting, Widths } from './setting'

interface Latch {
  card: string
  common_mode_v: number
  widths: Widths
  load_f: number
  clock_rise_s: number
}

export interface WorkedLatch extends Latch {
  expect: {
    capacitance_f: { X: number; O: number; tail: number; clock_gates: number }
    tau_s: number
    integration_s: number
    delay_s: Record<string, number>
    offset_weight_vt: { input: number; cross_n: number; cross_p: number }
    offset_weight_kp_v: { input: number; cross_n: number }
    noise_v: number
    energy_j: number
  }
}

const isLatch = (entry: object): entry is WorkedLatch => 'widths' in entry && 'expect' in entry

/** The strong-arm cases among the worked cases: computed independently of this project, not published values. */
export const workedLatches = (): WorkedLatch[] => (workedCases.cases as object[]).filter(isLatch)

/** The setting of a case: typical, 300 K, supply and devices of its card (cards are read as data). */
export const settingOf = (latch: Latch): Setting => {
  const card = processCards.cards.find((candidate) => candidate.id === latch.card)
  if (!card) throw new RangeError(`no card ${latch.card}`)
  const { widths, load_f, clock_rise_s, common_mode_v } = latch
  return { card, vdd_v: card.vdd_v, temperature_k: 300, widths, load_f, clock_rise_s, common_mode_v, trim_cap_f: 0 }
}

export const doubleTail = { setting: { ...settingOf(doubleTailCase), topology: 'double_tail' } satisfies Setting, expect: doubleTailCase.expect }
