import type { CornerEntry, Design } from '../../contract/result'
import type { Condition } from '../latch/condition'
import type { Bank } from './bank'
import type { PartName } from './latch-figures'
import type { LedgerDraft } from './ledger'
import { attainedAt, type Evaluated } from './reached'
import { attenuationOf, pairsOf, type Attained } from './uses'
import { designInputCap } from './design'

interface Held { readonly point: Evaluated; readonly reached: Attained; readonly uses: readonly number[] }

/** Every distinct ask of the bank held at one condition; null where the latch could not be evaluated somewhere. */
function heldAt(bank: Bank, condition: Condition): Held[] | null {
  const held = bank.demands.map(({ commonMode, limits }) => {
    const point = bank.evaluated.find((e) => e.condition === condition && e.commonMode === commonMode)!
    const reached = attainedAt(bank.s, bank.design, point, limits.overdrive_v)
    if (reached === null) return null
    return { point, reached, uses: pairsOf(limits, reached).map(([value, limit]) => (limit > 0 ? value / limit : Infinity)) }
  })
  return held.some((h) => h === null) ? null : (held as Held[])
}

const most = (held: readonly Held[], read: (a: Attained) => number): number => Math.max(...held.map((h) => read(h.reached)))

/** One entry per evaluated corner: worst delay, noise and raw offset of the bank there, total power, and whether all limits hold. */
export function cornerEntries(bank: Bank, drafts: readonly LedgerDraft[]): CornerEntry[] {
  return bank.s.conditions.map((condition) => {
    const held = heldAt(bank, condition)
    const power_w = drafts.find((d) => d.condition === condition)!.ledger.power_w
    if (held === null) return { name: condition.name, delay_s: null, noise_v: null, offset_v: null, power_w, meets: false }
    return {
      name: condition.name, power_w,
      delay_s: most(held, (a) => a.delay), noise_v: most(held, (a) => a.noise), offset_v: most(held, (a) => a.offset),
      meets: held.every((h) => h.uses.every((use) => use <= 1)),
    }
  })
}

/** Where the tightest use occurs; the first failing condition where a latch does not come about. */
function tightestCondition(bank: Bank): Condition {
  const failed = bank.evaluated.find((e) => e.figures === null)
  if (failed !== undefined) return failed.condition
  const worst = (c: Condition) => Math.max(...heldAt(bank, c)!.flatMap((h) => h.uses.filter(Number.isFinite)))
  return bank.s.conditions.reduce((a, b) => (worst(b) > worst(a) ? b : a))
}

/** Offset parts where the raw offset is largest, referred to the converter's input [V]. */
function offsetParts(bank: Bank): Design['offset_parts_v'] {
  const points = bank.evaluated.filter((e) => e.figures !== null)
  if (points.length === 0) return { input: null, cross_n: null, cross_p: null, reset: null }
  const { parts } = points.reduce((a, b) => (b.figures!.offset > a.figures!.offset ? b : a)).figures!
  const a = attenuationOf(bank.s, designInputCap(bank.s, bank.design))
  const at = (name: PartName) => parts[name] / a
  return { input: at('input'), cross_n: at('cross_n'), cross_p: at('cross_p'), reset: at('reset') }
}

export function designEntry(bank: Bank): Design {
  return {
    widths: bank.design.widths,
    corner: tightestCondition(bank).name,
    offset_parts_v: offsetParts(bank),
    trim_bits: bank.design.trim?.bits ?? null,
  }
}
