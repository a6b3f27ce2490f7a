import { erfc, normalTailInverse } from '../../numerics/statistics'

/**
 * Absolute INL yield (against the ideal ladder) of equal, independent Gaussian thresholds: [erf(INL·Δ/(√2·σ))]^count.
 *
 * @param count           M − 1, number of thresholds [1], integer ≥ 1
 * @param limitOverSigma  INL·Δ/σ [1], > 0
 * @returns               yield [1], 0 … 1
 */
export function absoluteInlYield(count: number, limitOverSigma: number): number {
  return Math.exp(count * Math.log1p(-erfc(limitOverSigma * Math.SQRT1_2)))
}

/**
 * How many sigmas either way hold all of `count` independent Gaussian values with a given probability: the z with
 * erf(z/√2)^count = yieldEach. Largest σ for the absolute INL is limit/z; the trim range is ± z·σ_os.
 *
 * @param count      number of values [1], integer ≥ 1
 * @param yieldEach  probability that all are inside [1], 0 < yieldEach < 1
 * @returns          z [1], > 0
 * @throws RangeError outside these ranges
 */
export function sigmasHoldingAll(count: number, yieldEach: number): number {
  if (!(count >= 1)) throw new RangeError(`sigmasHoldingAll: count ${count} is below 1`)
  if (!(yieldEach > 0 && yieldEach < 1)) throw new RangeError(`sigmasHoldingAll: yield ${yieldEach} is not between 0 and 1`)
  return normalTailInverse(-0.5 * Math.expm1(Math.log(yieldEach) / count))
}
