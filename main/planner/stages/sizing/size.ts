import type { Widths } from '../../../contract/plan'
import { remembering } from '../../numerics/memo'
import type { LatchDesign } from '../design'
import type { Demand } from '../positions'
import type { Situation } from '../situation'
import type { Appraisal } from './appraise'
import { appraiseLike, calibrate, costOf, nearestDesign, searchDesign, spotName, type Calibration, type Spot } from './search'
import { settleTrim, smallestTrim } from './settle-trim'
import { startDesign } from './start'
import { unknownSpace, widthUnknowns } from './unknowns'

/** Safety below every limit while searching: covers what the search takes from a neighbour. */
const margin = 0.003
const passes = 6
const roughPasses = 3
const nearPasses = 2
/** Gain that a step of the search must promise, while the number of bits is open and after. */
const roughGain = 1e-3
const fineGain = 2e-4
/** Cost after a pass over that before it, above which another pass is not worth its time. */
const worthwhile = 0.995
const neighbour = 0.1
/** A whole number of bits that costs no more than this against the relaxed one needs no other tried. */
const asGood = 1.01
const repeats = 3
/** Sizes of the first designs tried, in units of the usual one. */
const startSizes = [1, 6]
const usualBits = 5
/** Worst use after the relaxed search above which whole bits will not help, and above which another start will not. */
const outOfReach = 1.05
const hopeless = 1.6
const sizesKept = 24

export interface Sized {
  readonly design: LatchDesign
  readonly trimConverged: boolean
}

/** Drawn dimensions have four digits, so that the printed ones give the same result when they are entered by hand. */
function drawn(s: Situation, widths: Widths): Widths {
  const round = (value: number) => Number(value.toPrecision(4))
  const least = (key: string) => (key === 'input_length_m' ? s.card.l_min_m : s.card.w_min_m)
  const entries = widthUnknowns(s).map((key) => [key, Math.max(least(key), round(widths[key]!))])
  return { ...(Object.fromEntries(entries) as unknown as Widths), extra_cap_f: round(widths.extra_cap_f) }
}

export const worstUse = (appraisals: readonly Appraisal[]): number => Math.max(...appraisals.flatMap((a) => a.uses))

export function spotsOf(s: Situation, demands: readonly Demand[]): Spot[] {
  return s.conditions.flatMap((condition) => demands.map((demand) => ({ condition, demand })))
}

/** The spots that are worst in any of the uses: those that can bind. */
function bindingSpots(appraisals: readonly Appraisal[], energySpot: Spot): Spot[] {
  const chosen = new Set<Spot>([energySpot])
  appraisals[0].uses.forEach((_, i) => {
    const worst = appraisals.reduce((a, b) => (b.uses[i] > a.uses[i] ? b : a))
    if (worst.uses[i] > 0.3) chosen.add(worst)
  })
  return appraisals.filter((a) => chosen.has(a) || spotName(a) === spotName(energySpot))
}

interface Candidate { design: LatchDesign; appraisals: Appraisal[]; calibration: Calibration }
type Built = Candidate & { trimConverged: boolean }

const costOfCandidate = (s: Situation, c: Candidate): number => costOf(s, c.design, c.appraisals, c.calibration)

const missed = (candidate: Candidate): boolean => worstUse(candidate.appraisals) > 1

/**
 * Searches on the spots that can bind, looks at all, adds what was missed, until nothing is and another pass gains nothing.
 * @param longest how many passes at most
 */
function refine(s: Situation, spots: readonly Spot[], from: Candidate, trim: false | number | 'free', radius: number, longest: number): Candidate {
  let candidate = from
  let working = bindingSpots(candidate.appraisals, candidate.calibration.energySpot)
  for (let pass = 0; pass < longest; pass++) {
    const before = missed(candidate) ? Infinity : costOfCandidate(s, candidate)
    const options = { trim, margin, iterations: 40, radius: pass === 0 ? radius : 0.3, gain: trim === 'free' ? roughGain : fineGain }
    const { design, settled } = searchDesign(s, working, candidate.calibration, candidate.design, options)
    const { appraisals, calibration } = calibrate(s, design, spots)
    if (calibration === null) return candidate
    candidate = { design, appraisals, calibration }
    const known = new Set(working.map(spotName))
    if (worstUse(appraisals.filter((a) => known.has(spotName(a)))) > hopeless) break
    const added = appraisals.filter((a) => a.uses.some((use) => use > 1) && !known.has(spotName(a)))
    working = [...working, ...added]
    if (added.length === 0 && !missed(candidate) && (settled || costOfCandidate(s, candidate) > worthwhile * before)) break
  }
  return candidate
}

/**
 * A neighbour a tenth smaller in one unknown that is feasible and cheaper by more than the search may leave: a loose end.
 * Null where there is none.
 */
function looseEnd(s: Situation, { design, calibration, appraisals }: Candidate): LatchDesign | null {
  const space = unknownSpace(s, design.trim === null ? false : design.trim.bits)
  const at = space.fromDesign(design)
  const working = bindingSpots(appraisals, calibration.energySpot)
  const limit = worthwhile ** 3 * costOf(s, design, appraisals, calibration)
  for (let i = 0; i < at.length; i++) {
    if (at[i] - neighbour < space.lower[i]) continue
    const moved = space.toDesign(at.map((value, j) => (j === i ? value - neighbour : value)))
    const there = appraiseLike(s, moved, working, calibration)
    if (worstUse(there) <= 1 && costOf(s, moved, there, calibration) < limit) return moved
  }
  return null
}

/** Refines until no loose end is left. */
function finish(s: Situation, spots: readonly Spot[], start: Candidate, bits: number | false): Built {
  let candidate = built(s, spots, refine(s, spots, start, bits, 0.3, passes))
  for (let again = 0; again < repeats && !missed(candidate); again++) {
    const better = looseEnd(s, candidate)
    if (better === null) break
    const { appraisals, calibration } = calibrate(s, better, spots)
    const from = { design: better, appraisals, calibration: calibration ?? candidate.calibration }
    const next = built(s, spots, refine(s, spots, from, bits, 0.3, passes))
    if (missed(next) || costOfCandidate(s, next) >= costOfCandidate(s, candidate)) break
    candidate = next
  }
  return candidate
}

/** Rounds to drawn dimensions and settles the trim; the candidate as it would be built. */
function built(s: Situation, spots: readonly Spot[], candidate: Candidate): Built {
  const widths = drawn(s, candidate.design.widths)
  const { trim } = candidate.design
  const settled = trim === null ? { design: { widths, trim }, converged: true } : settleTrim(s, widths, trim.bits, spots, trim.unit)
  const { appraisals, calibration } = calibrate(s, settled.design, spots)
  return { design: settled.design, appraisals, calibration: calibration ?? candidate.calibration, trimConverged: settled.converged }
}

/** Whole numbers of bits worth trying around a relaxed one. */
function bitChoices(s: Situation, relaxed: LatchDesign): (number | false)[] {
  if (relaxed.trim === null) return [false]
  if (s.plan.comparator.trim_bits !== null) return [s.plan.comparator.trim_bits]
  const below = Math.max(1, Math.floor(relaxed.trim.bits))
  return [below, Math.min(16, below + 1)]
}

/** Cheapest design that meets everything from one start; where none is found, how far the search stayed from one. */
function sizeFrom(s: Situation, spots: readonly Spot[], start: Candidate): { found: Built | null; miss: number } {
  const fixed = s.plan.comparator.trim_bits
  const relaxed = refine(s, spots, start, start.design.trim === null ? false : fixed ?? 'free', 1, roughPasses)
  const miss = worstUse(relaxed.appraisals)
  if (miss > outOfReach) return { found: null, miss }
  let best: Built | null = null
  for (const bits of bitChoices(s, relaxed.design)) {
    const { widths, trim } = relaxed.design
    const whole = bits === false || fixed !== null ? relaxed : { ...relaxed, design: { widths, trim: { bits, unit: trim!.unit } } }
    const candidate = finish(s, spots, whole, bits)
    if (!candidate.trimConverged || missed(candidate)) continue
    if (best === null || costOfCandidate(s, candidate) < costOfCandidate(s, best)) best = candidate
    if (costOfCandidate(s, best) < asGood * costOfCandidate(s, relaxed)) break
  }
  return { found: best, miss }
}

const startBits = ({ plan }: Situation): number | null => (plan.comparator.offset_method === 'trim' ? plan.comparator.trim_bits ?? usualBits : null)

function startCandidate(s: Situation, spots: readonly Spot[], demands: readonly Demand[], size: number): Candidate | null {
  const design = startDesign(s, demands, startBits(s), size)
  const { appraisals, calibration } = calibrate(s, design, spots)
  return calibration === null ? null : { design, appraisals, calibration }
}

/** The design whose worst use is smallest, on the spots that can bind and those found wanting. */
function lowest(s: Situation, spots: readonly Spot[], start: Candidate, trim: false | number | 'free'): Candidate {
  let candidate = start
  let working = bindingSpots(start.appraisals, start.calibration.energySpot)
  for (let pass = 0; pass < nearPasses; pass++) {
    const options = { trim, margin: 0, iterations: 35, radius: pass === 0 ? 1 : 0.3, gain: roughGain }
    const design = nearestDesign(s, working, candidate.calibration, candidate.design, options)
    const { appraisals, calibration } = calibrate(s, design, spots)
    if (calibration === null) break
    candidate = { design, appraisals, calibration }
    const known = new Set(working.map(spotName))
    const reached = worstUse(appraisals.filter((a) => known.has(spotName(a))))
    const added = appraisals.filter((a) => !known.has(spotName(a)) && a.uses.some((use) => use > 1.01 * reached))
    if (added.length === 0) break
    working = [...working, ...added]
  }
  return candidate
}

/** The design that comes nearest to meeting everything. */
function nearest(s: Situation, spots: readonly Spot[], start: Candidate): Sized {
  const fixed = s.plan.comparator.trim_bits
  const relaxed = lowest(s, spots, start, start.design.trim === null ? false : fixed ?? 'free')
  const finished = bitChoices(s, relaxed.design).map((bits) => {
    if (bits === false || fixed !== null) return built(s, spots, relaxed)
    const whole: LatchDesign = { widths: relaxed.design.widths, trim: { bits, unit: relaxed.design.trim!.unit } }
    return built(s, spots, lowest(s, spots, { ...relaxed, design: whole }, bits))
  })
  const best = finished.reduce((a, c) => (worstUse(c.appraisals) < worstUse(a.appraisals) ? c : a))
  return { design: best.design, trimConverged: best.trimConverged }
}

/** The cheapest design that meets every limit, from the first start that leads to one; else how far the search stayed from one. */
export const sizeFeasible = remembering((s: Situation, demands: readonly Demand[]): { design: LatchDesign | null; miss: number } => {
  const spots = spotsOf(s, demands)
  let nearestMiss = Infinity
  for (const size of startSizes) {
    const start = startCandidate(s, spots, demands, size)
    if (start === null) continue
    const { found, miss } = sizeFrom(s, spots, start)
    if (found !== null) return { design: found.design, miss: 0 }
    nearestMiss = Math.min(nearestMiss, miss)
    if (miss > hopeless) break
  }
  return { design: null, miss: nearestMiss }
}, (s) => JSON.stringify([s.plan.converter, s.plan.comparator, s.plan.budget, s.plan.corners, s.card]), sizesKept)

/**
 * Sizes the latch of the bank so that every limit holds at every chosen corner and common mode, for least energy or area.
 * Deterministic: the same plan gives the same design, whatever was planned before.
 */
export function sizeLatch(s: Situation, demands: readonly Demand[]): Sized {
  const { design } = sizeFeasible(s, demands)
  if (design !== null) return { design, trimConverged: true }
  const spots = spotsOf(s, demands)
  const start = startCandidate(s, spots, demands, startSizes[0]) ?? startCandidate(s, spots, demands, startSizes[1])
  return start === null ? { design: startDesign(s, demands, startBits(s), 1), trimConverged: true } : nearest(s, spots, start)
}

/** Given widths as they stand; only an open number of trim bits is found. */
export function manualLatch(s: Situation, demands: readonly Demand[]): Sized {
  const spots = spotsOf(s, demands)
  const widths = s.plan.comparator.widths!
  if (s.plan.comparator.offset_method !== 'trim') return { design: { widths, trim: null }, trimConverged: true }
  const bits = s.plan.comparator.trim_bits
  const settled = bits === null ? smallestTrim(s, widths, spots) : settleTrim(s, widths, bits, spots)
  return { design: settled.design, trimConverged: settled.converged }
}
