import { whereLossReaches } from './loss-root'
import { remembering } from '../../numerics/memo'
import type { InlLine } from './sigma-limits'
import { tailReach } from './threshold-error'
import { trimmedDnlLoss, trimmedInlLoss, type TrimmedBank } from './trimmed-bank'

/** What a trimmed bank has to meet. */
export interface TrimTarget {
  /** M, number of codes [1], integer ≥ 4. */
  readonly codes: number
  /** Δ [V], > 0. */
  readonly deltaV: number
  /** INL limit [LSB], > 0, and the line it is measured against. */
  readonly inlLsb: number
  readonly inlMethod: InlLine
  /** DNL limit [LSB], > 0. */
  readonly dnlLsb: number
  /** σ_R, relative standard deviation of one ladder element [1], ≥ 0. */
  readonly ladderSigma: number
  /** Required yield of INL and of DNL, each [1], 0 < yieldEach < 1 (with lanes: its lanes-th root). */
  readonly yieldEach: number
}

const tolerance = 1e-7
const answersKept = 32

/**
 * Largest trim step for which INL and DNL of the trimmed bank each meet their yield; 0 where the ladder alone fails one.
 *
 * @param target  what the bank has to meet
 * @returns       step [V], ≥ 0
 * @throws RangeError for a bank without interior thresholds or a yield outside its range
 */
export function trimStepLimit(target: TrimTarget): number {
  const { codes, inlLsb, inlMethod, dnlLsb, ladderSigma, yieldEach } = target
  if (!(codes >= 4)) throw new RangeError(`trimStepLimit: ${codes} codes have no interior threshold`)
  if (!(yieldEach > 0 && yieldEach < 1)) throw new RangeError(`trimStepLimit: yield ${yieldEach} is not between 0 and 1`)
  return target.deltaV * stepLimitLsb(inlMethod, codes, inlLsb, dnlLsb, ladderSigma, yieldEach)
}

const stepLimitLsb = remembering((line: InlLine, codes: number, inlLsb: number, dnlLsb: number, ladderSigma: number, yieldEach: number): number => {
  const bank = (stepLsb: number): TrimmedBank => ({ codes, deltaV: 1, stepV: stepLsb, ladderSigma })
  // A step that cannot fail: the uniform parts and the reach of the Gaussian ones stay inside the limit together.
  const widest = 0.5 * ladderSigma * Math.sqrt(codes)
  const certainInl = line === 'absolute' ? 2 * (inlLsb - tailReach * widest) : inlLsb - 2 * tailReach * widest
  const certainDnl = dnlLsb - tailReach * Math.SQRT2 * ladderSigma
  const dnlStep = largestStep((step) => trimmedDnlLoss(bank(step), dnlLsb), certainDnl, 1.2 * dnlLsb, yieldEach)
  if (dnlStep === 0) return 0
  const inlLoss = (step: number) => trimmedInlLoss(line, bank(step), inlLsb)
  // The INL integral is the dearer one: no search where the step that DNL allows is good enough.
  if (inlLoss(dnlStep) <= 1 - yieldEach) return dnlStep
  return largestStep(inlLoss, certainInl, dnlStep, yieldEach)
}, (...args) => args.join('/'), answersKept)

/** Largest step [LSB] whose loss is within 1 − yieldEach, sought between a certain one and one that likely fails; 0 where none is. */
function largestStep(loss: (stepLsb: number) => number, certainLsb: number, failingLsb: number, yieldEach: number): number {
  const from = Math.min(Math.max(0, certainLsb), failingLsb)
  const allowed = 1 - yieldEach
  if (from === 0 && loss(0) > allowed) return 0
  return whereLossReaches(loss, allowed, from, failingLsb, tolerance)
}
