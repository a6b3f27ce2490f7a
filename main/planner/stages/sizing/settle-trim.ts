import { trimSigmas } from '../offset-limits'
import type { LatchDesign } from '../design'
import type { Situation } from '../situation'
import { appraise, usualNeighbour } from './appraise'
import type { Spot } from './search'
import { trimCapacitanceChange } from '../../models/offset/trim'
import { attenuationOf, trimStepOf } from '../uses'
import { designInputCap } from '../design'

const rounds = 60
const close = 1e-7

export interface SettledTrim {
  readonly design: LatchDesign
  /** False where the loop runs away: the range asks for more capacitance than moving it can give. */
  readonly converged: boolean
}

/** Largest ΔC over the spots that the range ±z·σ_os asks for [F]; null where no latch comes about. */
function neededChange(s: Situation, design: LatchDesign, spots: readonly Spot[]): number | null {
  let most = 0
  for (const { condition, demand } of spots) {
    const { figures } = appraise(s, design, condition, demand, usualNeighbour)
    if (figures === null) return null
    const { circuit, analysis } = figures
    const range = trimSigmas(s) * figures.offset
    most = Math.max(most, trimCapacitanceChange(circuit.sideCapacitance[circuit.inner], range, analysis.capacitanceWeight[circuit.inner]))
  }
  return most
}

/**
 * Trim of given bits for given widths: unit = max(smallest unit, ΔC/2^b), ΔC by the engine's own weight at the balanced
 * setting, C_trim = 2^b·unit/2 on each side; solved as a fixed point with one secant step a round. One trim serves all
 * conditions, so the hardest range counts.
 */
export function settleTrim(s: Situation, widths: LatchDesign['widths'], bits: number, spots: readonly Spot[], from?: number): SettledTrim {
  const smallest = s.card.cap.trim_unit_f
  const next = (unit: number): number | null => {
    const change = neededChange(s, { widths, trim: { bits, unit } }, spots)
    return change === null ? null : Math.max(smallest, change / 2 ** bits)
  }
  let unit = Math.max(from ?? smallest, smallest)
  let previous: { unit: number; value: number } | null = null
  for (let round = 0; round < rounds; round++) {
    const value = next(unit)
    if (value === null || value > 1e6 * smallest) break
    if (Math.abs(value - unit) <= close * unit) return { design: { widths, trim: { bits, unit: value } }, converged: true }
    const slope = previous === null || unit === previous.unit ? 0 : (value - previous.value) / (unit - previous.unit)
    previous = { unit, value }
    unit = slope < 0.95 ? Math.max(smallest, unit + (value - unit) / (1 - slope)) : value
  }
  return { design: { widths, trim: { bits, unit } }, converged: false }
}

/** Smallest number of bits whose step is fine enough everywhere; the finest that can be drawn where none is. */
export function smallestTrim(s: Situation, widths: LatchDesign['widths'], spots: readonly Spot[]): SettledTrim {
  let best: SettledTrim | null = null
  let bestUse = Infinity
  for (let bits = 1; bits <= 16; bits++) {
    const settled = settleTrim(s, widths, bits, spots, best?.design.trim?.unit)
    const use = settled.converged ? stepUse(s, settled.design, spots) : Infinity
    if (best === null || use < bestUse * 0.999) { best = settled; bestUse = use }
    else if (bits > 2) break
    if (use <= 1) break
  }
  return best!
}

/** Largest step over its limit. */
function stepUse(s: Situation, design: LatchDesign, spots: readonly Spot[]): number {
  const a = attenuationOf(s, designInputCap(s, design))
  return Math.max(...spots.map(({ condition, demand }) => {
    const { figures } = appraise(s, design, condition, demand, usualNeighbour)
    const limit = demand.limits.trim_step_v ?? 0
    return figures === null || !(limit > 0) ? Infinity : trimStepOf(design, figures)! / a / limit
  }))
}
