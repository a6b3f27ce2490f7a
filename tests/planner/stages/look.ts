import type { Widths } from '../../../main/contract/plan'
import { bankOf } from '../../../main/planner/bank-of'
import type { Bank } from '../../../main/planner/stages/bank'
import type { LatchDesign } from '../../../main/planner/stages/design'
import { circuitOf } from '../../../main/planner/stages/latch-figures'
import { appraise, usualNeighbour, type Appraisal } from '../../../main/planner/stages/sizing/appraise'
import { comparatorArea, integratedEnergy, roughEnergy, trimArea } from '../../../main/planner/stages/sizing/cost'
import type { Spot } from '../../../main/planner/stages/sizing/search'
import { settleTrim } from '../../../main/planner/stages/sizing/settle-trim'
import { read } from '../plans'

export const widthKeys = ['input_m', 'input_length_m', 'cross_n_m', 'cross_p_m', 'tail_m', 'reset_m'] as const

/** A sized bank and what it takes to judge any other design of it. */
export interface Bench {
  bank: Bank
  spots: readonly Spot[]
  bits: number | null
  least: (key: (typeof widthKeys)[number]) => number
  wire: number
}

export function benchOf(document: unknown): Bench {
  const { plan, card } = read(document)
  const bank = bankOf(plan, card)
  const spots = bank.s.conditions.flatMap((condition) => bank.demands.map((demand) => ({ condition, demand })))
  const least: Bench['least'] = (key) => (key === 'input_length_m' ? card.l_min_m : card.w_min_m)
  return { bank, spots, bits: bank.design.trim?.bits ?? null, wire: card.cap.wire_f, least }
}

const worstOf = (appraisals: readonly Appraisal[]): number => Math.max(...appraisals.flatMap((a) => a.uses))

/** Energy of a cycle by the full transient where it is largest, or area: what the plan asks to be small. */
function costOf({ bank: { s } }: Bench, design: LatchDesign, appraisals: readonly Appraisal[]): number {
  if (s.plan.comparator.objective === 'area') return comparatorArea(s, design) + trimArea(s, design)
  return Math.max(...appraisals.map((a) => (a.figures === null ? Infinity : integratedEnergy(s, a.figures))))
}

export interface Judged { use: number; cost: number; design: LatchDesign }

/** Settles the trim of given widths and evaluates them at every corner; null where the trim does not settle. */
export function judge(bench: Bench, widths: Widths, bits: number | null): Judged | null {
  const { s, design: known } = bench.bank
  const settled = bits === null ? { design: { widths, trim: null }, converged: true } : settleTrim(s, widths, bits, bench.spots, known.trim?.unit)
  if (!settled.converged) return null
  const appraisals = bench.spots.map(({ condition, demand }) => appraise(s, settled.design, condition, demand))
  const use = worstOf(appraisals)
  return { use, cost: use <= 1 ? costOf(bench, settled.design, appraisals) : Infinity, design: settled.design }
}

/** What the sizing found, judged the same way. */
export function found(bench: Bench): Judged {
  const judged = judge(bench, bench.bank.design.widths, bench.bits)
  if (judged === null) throw new RangeError('the trim of the sized design does not settle')
  return judged
}

/** One unknown a tenth up or down; where it is 0, a tenth of a node’s wire up; never below what can be drawn. */
export function steps({ bank, bits, least, wire }: Bench): { name: string; widths: Widths; bits: number | null }[] {
  const { widths } = bank.design
  const step = (key: keyof Widths, value: number) => ({ name: `${key} ${value}`, widths: { ...widths, [key]: value } })
  const moved = widthKeys.flatMap((key) => [1.1, 0.9].map((f) => step(key, Math.max(least(key), f * widths[key]))))
  const extra = [1.1, 0.9].map((f) => step('extra_cap_f', widths.extra_cap_f > 0 ? f * widths.extra_cap_f : Math.max(0, f - 1) * wire))
  const all = [{ name: 'as found', widths }, ...moved, ...extra]
  const choices = bits === null ? [null] : bank.s.plan.comparator.trim_bits === null ? [bits, bits + 1, bits - 1].filter((b) => b >= 1) : [bits]
  return all.flatMap((one) => choices.map((choice) => ({ ...one, name: `${one.name}, ${choice} bits`, bits: choice })))
}

/** Uniform numbers from 0 to 1 (mulberry32, T. Ettinger, public domain). */
export function uniform(seed: number): () => number {
  let state = seed
  return () => {
    state = (state + 0x6d2b79f5) | 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32
  }
}

/** A design anywhere in a wide box (60 minimum widths), or within three times the one found. */
function drawDesign({ bank, bits, least }: Bench, random: () => number): { widths: Widths; bits: number | null } {
  const between = (from: number, to: number) => from * (to / from) ** random()
  const wide = random() < 0.5
  const { widths } = bank.design
  const width = (key: (typeof widthKeys)[number]) =>
    (wide ? between(least(key), 60 * least(key)) : Math.max(least(key), widths[key] * between(1 / 3, 3)))
  const entries = widthKeys.map((key) => [key, key === 'input_length_m' ? least(key) * (random() < 0.5 ? 1 : between(1, 4)) : width(key)])
  const extra_cap_f = random() < 0.4 ? 0 : between(5e-17, 5e-15)
  const choice = bits === null || bank.s.plan.comparator.trim_bits !== null ? bits : Math.max(1, bits + Math.floor(4 * random()) - 2)
  return { widths: { ...(Object.fromEntries(entries) as unknown as Widths), extra_cap_f }, bits: choice }
}

/** Part of the cost below which a design is worth evaluating; its closed form is good to a few percent. */
const promising = 0.95

/**
 * Random designs whose closed form promises less than the found energy; those that a first look at their time, noise, kickback
 * and input load rules out are not settled. Ends with as many of them as wanted, or a hundred times as many drawn: a design
 * near the smallest that can be drawn leaves little room below. Returns how many were drawn, looked cheaper, and the best feasible one.
 */
export function searchAtRandom(bench: Bench, wanted: number, seed: number): { drawn: number; looked: number; best: Judged | null } {
  const { bank: { s, design, evaluated }, spots } = bench
  const random = uniform(seed)
  const top = evaluated.reduce((a, b) => (b.energy! > a.energy! ? b : a))
  const rough = (d: LatchDesign) => roughEnergy(circuitOf(s, d, top.condition, top.commonMode))
  let best: Judged | null = null
  let [drawn, looked] = [0, 0]
  while (looked < wanted && drawn < 100 * wanted) {
    drawn++
    const { widths, bits } = drawDesign(bench, random)
    const bare: LatchDesign = { widths, trim: bits === null ? null : { bits, unit: s.card.cap.trim_unit_f } }
    if (rough(bare) > promising * rough(design)) continue
    looked++
    if (spots.some(({ condition, demand }) => fallsShort(appraise(s, bare, condition, demand, usualNeighbour), bits !== null))) continue
    const judged = judge(bench, widths, bits)
    if (judged !== null && judged.cost < (best?.cost ?? Infinity)) best = judged
  }
  return { drawn, looked, best }
}

/** With the smallest trim a latch is faster and noisier than with the one it needs: only clear misses count then. */
function fallsShort({ figures, uses: [time, noise, offset, kickback, memory, input] }: Appraisal, trimmed: boolean): boolean {
  if (figures === null) return true
  const settled = trimmed ? [0.9 * time, 0.8 * noise, 0.5 * memory] : [0.98 * time, noise, offset, 0.98 * memory]
  return Math.max(kickback, input, ...settled) > 1
}
