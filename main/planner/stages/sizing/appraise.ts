import type { Condition } from '../../latch/condition'
import { trimCapacitanceChange } from '../../models/offset/trim'
import { trimSigmas } from '../offset-limits'
import { designInputCap, type LatchDesign } from '../design'
import { latchFigures, patienceOf, type LatchFigures } from '../latch-figures'
import type { Demand } from '../positions'
import type { Situation } from '../situation'
import { attained, attenuationOf, limitKeys, linearDelay, pairsOf } from '../uses'

/** How a design stands at one condition and common mode. */
export interface Appraisal {
  readonly condition: Condition
  readonly demand: Demand
  readonly figures: LatchFigures | null
  /** reached ÷ limit in the order of `limitKeys`, then the trim range; NaN-free, large where there is no latch. */
  readonly uses: readonly number[]
}

/** Use that stands for a latch that does not decide at all. */
const hopeless = 1e4

/** Part of the trim's units that the range needs; 0 without trim. */
export function rangeUse(s: Situation, design: LatchDesign, figures: LatchFigures): number {
  if (design.trim === null) return 0
  const { circuit, analysis } = figures
  const range = trimSigmas(s) * figures.offset
  const change = trimCapacitanceChange(circuit.sideCapacitance[circuit.inner], range, analysis.capacitanceWeight[circuit.inner])
  return change / (2 ** design.trim.bits * design.trim.unit)
}

/**
 * Uses against limits that can be met at all; a limit of 0 or less cannot steer the sizing. Memory counts with the
 * magnitudes of its parts: a design whose leftovers happen to cancel would not survive its own spread.
 */
function usesOf(s: Situation, design: LatchDesign, condition: Condition, demand: Demand, figures: LatchFigures, neighbour?: Neighbour): number[] {
  const memory = figures.leftover.atMost / attenuationOf(s, designInputCap(s, design))
  const quick = neighbour === undefined ? undefined : linearDelay(s, design, condition, figures, demand.limits.overdrive_v)
  const delay = quick === undefined ? undefined : quick * neighbour!.stretch
  const reached = { ...attained(s, design, condition, figures, demand.limits.overdrive_v, delay), memory }
  return [...pairsOf(demand.limits, reached).map(([value, limit]) => (limit > 0 ? value / limit : 0)), rangeUse(s, design, figures)]
}

/** What a fully integrated neighbour tells about a design at the same spot. */
export interface Neighbour {
  /** δ/τ of its decisions. */
  readonly departure: number
  /** Its delay by the full circuit over that of t_0 and τ, at least 1: above where large overdrives decide early. */
  readonly stretch: number
}

/** Used where no neighbour is known: the departure of most latches, decided from their equilibrium. */
export const usualNeighbour: Neighbour = { departure: 0.1, stretch: 1 }

/** Engine figures and uses of a design at one condition and demand; with a neighbour, its large-signal figures stand in. */
export function appraise(s: Situation, design: LatchDesign, condition: Condition, demand: Demand, neighbour?: Neighbour): Appraisal {
  const patience = Math.min(patienceOf(s, demand.limits.window_s), 3000 * s.card.logic.fo4_s)
  const figures = latchFigures(s, design, condition, demand.commonMode, patience, { departure: neighbour?.departure })
  if (typeof figures === 'string') return { condition, demand, figures: null, uses: [hopeless, ...limitKeys.map(() => 0)] }
  return { condition, demand, figures, uses: usesOf(s, design, condition, demand, figures, neighbour) }
}
