import type { Card } from '../contract/cards'
import { cornerNames } from '../contract/choices'
import { flashSchema, sarSchema, type ComparatorBrief, type ConverterBrief, type ParsedPlan, type Plan } from '../contract/plan'
import { canonicalPlan } from './write-plan'

const effectiveBitsBelow = 0.6
const commonModeShare = 0.6

function converter(parsed: ParsedPlan['converter'], card: Card): ConverterBrief {
  const { flash, sar, full_scale_v, common_mode_v, enob_bits, ...rest } = parsed
  const flashBlock = rest.architecture === 'flash' ? flash ?? flashSchema.parse({}) : flash
  const sarBlock = rest.architecture === 'sar' ? sar ?? sarSchema.parse({}) : sar
  return {
    ...rest,
    full_scale_v: full_scale_v ?? (2 * card.vdd_v) / 3,
    common_mode_v: common_mode_v ?? commonModeShare * card.vdd_v,
    enob_bits: enob_bits ?? rest.resolution_bits - effectiveBitsBelow,
    ...(flashBlock && { flash: flashBlock }),
    ...(sarBlock && { sar: sarBlock }),
  }
}

function comparator(parsed: ParsedPlan['comparator'], card: Card): ComparatorBrief {
  const { widths, ...rest } = parsed
  return widths ? { ...rest, widths: { ...widths, input_length_m: widths.input_length_m ?? card.l_min_m } } : rest
}

function corners(named: ParsedPlan['corners']): Plan['corners'] {
  return cornerNames.filter((name) => named.includes(name) || named.includes('all'))
}

/**
 * Writes out the defaults that depend on the card and the architecture:
 * V_FS = ⅔ V_DD, v_cm = 0.6 V_DD, ENOB = N − 0.6, L_in = the card's minimum, the block of the plan's own
 * architecture, `all` corners as their names in the order typical, slow, fast. null stays null.
 */
export function completePlan(parsed: ParsedPlan, card: Card): Plan {
  const plan: Plan = {
    ...parsed,
    converter: converter(parsed.converter, card),
    comparator: comparator(parsed.comparator, card),
    corners: corners(parsed.corners),
  }
  return canonicalPlan(plan) as Plan
}
