import { minimiseConstrained, type Trial } from '../../numerics/constrained'
import type { Condition } from '../../latch/condition'
import type { LatchDesign } from '../design'
import type { Demand } from '../positions'
import type { Situation } from '../situation'
import { linearDelay } from '../uses'
import { appraise, usualNeighbour, type Appraisal, type Neighbour } from './appraise'
import { comparatorArea, integratedEnergy, roughEnergy, trimArea } from './cost'
import { unknownSpace, type UnknownSpace } from './unknowns'

/** A place at which the search evaluates the latch. */
export interface Spot { readonly condition: Condition; readonly demand: Demand }

/** What the search takes from a fully integrated neighbour. */
export interface Calibration {
  readonly neighbours: ReadonlyMap<string, Neighbour>
  /** Integrated over closed-form energy, and where the energy is largest. */
  readonly energyRatio: number
  readonly energySpot: Spot
}

export const spotName = ({ condition, demand }: Spot): string => `${condition.name}@${demand.commonMode}`

/** Constraint value of a use: linear below the limit, logarithmic above, smooth between; met when ≤ 0. */
const constraintOf = (use: number, margin: number): number => {
  const held = use / (1 - margin)
  return held > 1 ? Math.log(held) : Math.max(held - 1, -2)
}

/** What a fully integrated design tells its neighbours at a spot. */
function neighbourOf(s: Situation, design: LatchDesign, { condition, demand, figures, uses }: Appraisal): Neighbour {
  const linear = linearDelay(s, design, condition, figures!, demand.limits.overdrive_v)
  const full = uses[0] * demand.limits.window_s
  return { departure: figures!.analysis.departure, stretch: linear === undefined || !(linear > 0) || !(full > linear) ? 1 : full / linear }
}

/** Full integration of a design at every spot: what the closed forms of the search are held to. Null where no latch comes about. */
export function calibrate(s: Situation, design: LatchDesign, spots: readonly Spot[]): { appraisals: Appraisal[]; calibration: Calibration | null } {
  const appraisals = spots.map(({ condition, demand }) => appraise(s, design, condition, demand))
  const neighbours = new Map<string, Neighbour>()
  let largest = 0
  let calibration: Calibration | null = null
  for (const appraisal of appraisals) {
    if (appraisal.figures === null) continue
    neighbours.set(spotName(appraisal), neighbourOf(s, design, appraisal))
    const energy = integratedEnergy(s, appraisal.figures)
    if (energy > largest) {
      largest = energy
      calibration = { neighbours, energySpot: appraisal, energyRatio: energy / roughEnergy(appraisal.figures.circuit) }
    }
  }
  return { appraisals, calibration }
}

/** A design at some spots, with the large-signal figures of the calibrated neighbour. */
export function appraiseLike(s: Situation, design: LatchDesign, spots: readonly Spot[], { neighbours }: Calibration): Appraisal[] {
  return spots.map((spot) => appraise(s, design, spot.condition, spot.demand, neighbours.get(spotName(spot)) ?? usualNeighbour))
}

/** Cost that is made small: energy of a decision at the corner where it is largest, or area with trim. */
export function costOf(s: Situation, design: LatchDesign, appraisals: readonly Appraisal[], calibration: Calibration): number {
  if (s.plan.comparator.objective === 'area') return comparatorArea(s, design) + trimArea(s, design)
  const spot = appraisals.find((a) => spotName(a) === spotName(calibration.energySpot))
  return spot?.figures ? calibration.energyRatio * roughEnergy(spot.figures.circuit) : Infinity
}

export interface SearchOptions {
  readonly trim: false | number | 'free'
  readonly margin: number
  readonly iterations: number
  readonly radius: number
  /** Logarithm of the cost that a step must promise to go on. */
  readonly gain: number
}

/** One local search over the unknowns with the engine at every step; the spots are the conditions that may bind. */
export function searchDesign(
  s: Situation, spots: readonly Spot[], calibration: Calibration, from: LatchDesign, options: SearchOptions,
): { design: LatchDesign; settled: boolean } {
  const space = unknownSpace(s, options.trim)
  const evaluate = (x: Float64Array): Trial => {
    const design = space.toDesign(x)
    const appraisals = appraiseLike(s, design, spots, calibration)
    const cost = costOf(s, design, appraisals, calibration)
    return {
      objective: Number.isFinite(cost) ? Math.log(cost) : 0,
      constraints: appraisals.flatMap(({ uses }) => uses.map((use) => constraintOf(use, options.margin))),
    }
  }
  const found = minimiseConstrained({
    evaluate, lower: space.lower, upper: space.upper, difference: 0.02, price: 12,
    firstRadius: options.radius, smallestRadius: 1e-3, smallestGain: options.gain, iterations: options.iterations,
  }, space.fromDesign(from))
  return { design: space.toDesign(found.x), settled: found.settled }
}

/** The design whose worst use is smallest: one more unknown, the bound on every constraint, is made small. */
export function nearestDesign(
  s: Situation, spots: readonly Spot[], calibration: Calibration, from: LatchDesign, options: SearchOptions,
): LatchDesign {
  const space: UnknownSpace = unknownSpace(s, options.trim)
  const n = space.lower.length
  let last: { x: Float64Array; values: number[] } | null = null
  const valuesAt = (x: Float64Array): number[] => {
    const widths = x.subarray(0, n)
    if (last !== null && last.x.every((value, i) => value === widths[i])) return last.values
    const design = space.toDesign(widths)
    const values = appraiseLike(s, design, spots, calibration).flatMap(({ uses }) => uses)
      .map((use) => constraintOf(use, 0))
    last = { x: Float64Array.from(widths), values }
    return values
  }
  const evaluate = (x: Float64Array): Trial => ({ objective: x[n], constraints: valuesAt(x).map((value) => value - x[n]) })
  const start = space.fromDesign(from)
  const worst = Math.max(...valuesAt(start))
  const found = minimiseConstrained({
    evaluate, lower: Float64Array.from([...space.lower, -2]), upper: Float64Array.from([...space.upper, 20]), difference: 0.02, price: 12,
    firstRadius: options.radius, smallestRadius: 1e-3, smallestGain: options.gain, iterations: options.iterations,
  }, Float64Array.from([...start, worst]))
  return space.toDesign(found.x.subarray(0, n))
}
