import { normalTailInverse } from '../../numerics/statistics'
import { sigmasHoldingAll } from './absolute-inl'
import { dnlLoss } from './dnl'
import { whereLossReaches } from './loss-root'
import { remembering } from '../../numerics/memo'
import { terminalInlLoss } from './terminal-inl'

/** Straight line that INL is measured against and that a yield can be integrated for (best fit is left to the trials). */
export type InlLine = 'absolute' | 'terminal'

const tolerance = 1e-9
const answersKept = 64
/** Where the search for a limit over σ expects failing banks: parts of the absolute INL's, and of the sure bound. */
const failingPart = 0.6
const failingPartOfBound = 0.9
/** Keeps the sure bound on its side where it is exact (a single difference). */
const boundRoom = 1.001

/**
 * Largest spread of equal, independent Gaussian thresholds for which INL holds with a given yield.
 *
 * Absolute: 1/z with erf(z/√2)^count = yieldEach. Terminal: the σ at which the double integral of the yield meets yieldEach.
 *
 * @param line       absolute (against the ideal ladder) or terminal (through first and last threshold)
 * @param count      M − 1, number of thresholds [1], integer ≥ 1; ≥ 3 for terminal
 * @param yieldEach  required yield of the INL alone [1], 0 < yieldEach < 1 (with lanes: its lanes-th root)
 * @returns          σ_max divided by the limit INL·Δ [1]
 * @throws RangeError outside these ranges
 */
export const inlSigmaLimit = remembering((line: InlLine, count: number, yieldEach: number): number => {
  const absolute = 1 / sigmasHoldingAll(count, yieldEach)
  if (line === 'absolute') return absolute
  if (count < 3) throw new RangeError(`inlSigmaLimit: ${count} thresholds have no terminal INL`)
  const loss = (ratio: number) => terminalInlLoss({ count, halfWidth: 0, sigmaAt: () => 1 }, ratio)
  return sigmaOverLimit(loss, count - 2, yieldEach, absolute)
}, (...args) => args.join('/'), answersKept)

/**
 * Largest spread of equal, independent Gaussian thresholds for which DNL holds with a given yield.
 *
 * @param count      M − 1, number of thresholds [1], integer ≥ 2
 * @param yieldEach  required yield of the DNL alone [1], 0 < yieldEach < 1 (with lanes: its lanes-th root)
 * @returns          σ_max divided by the limit DNL·Δ [1]
 * @throws RangeError outside these ranges
 */
export const dnlSigmaLimit = remembering((count: number, yieldEach: number): number => {
  if (count < 2) throw new RangeError(`dnlSigmaLimit: ${count} thresholds have no DNL`)
  const absolute = 1 / sigmasHoldingAll(count, yieldEach)
  const loss = (ratio: number) => dnlLoss({ halfWidth: 0, sigma: 1 }, ratio, count)
  return sigmaOverLimit(loss, count - 1, yieldEach, absolute)
}, (...args) => args.join('/'), answersKept)

/**
 * σ over the limit at which `loss` (of the limit over σ) meets the yield. The union bound holds it surely: each of the
 * failures counted on its own, none with more than twice one error's variance.
 */
function sigmaOverLimit(loss: (ratio: number) => number, failures: number, yieldEach: number, absolute: number): number {
  const sure = boundRoom * Math.SQRT2 * normalTailInverse(0.5 * (1 - yieldEach) / failures)
  const failing = Math.min(failingPart / absolute, failingPartOfBound * sure)
  return 1 / whereLossReaches(loss, 1 - yieldEach, sure, failing, tolerance)
}
