import { integrate } from '../../numerics/quadrature'
import { normalPdf, normalTail, normalTailInverse } from '../../numerics/statistics'
import { whereLossReaches } from './loss-root'

/** Sigmas that the integral over the last cycle's error runs to, and its panels. */
const reach = 9
const panels = 6
const order = 16
const tolerance = 1e-9

/**
 * Largest relative spread of one unit of a binary-weighted capacitive DAC for which its mid-code DNL holds:
 * σ_u·√(M − 1) ≤ DNL/Φ⁻¹(½ + yieldEach/2). A larger `unit_cap_sigma` is a finding that stops.
 *
 * @param codes      M [1], integer ≥ 2
 * @param dnlLsb     DNL limit [LSB], > 0
 * @param yieldEach  required yield of the DNL [1], 0 < yieldEach < 1
 * @returns          σ_u [1], > 0
 */
export function sarDacSigmaLimit(codes: number, dnlLsb: number, yieldEach: number): number {
  return dnlLsb / (normalTailInverse(0.5 * (1 - yieldEach)) * Math.sqrt(codes - 1))
}

/**
 * Fraction of SAR converters with a comparator per bit that fail INL (terminal) and DNL alike: neighbouring thresholds
 * alternate with the last cycle's comparator, yield = ∫ f(x)·[Φ((x + L)/σ) − Φ((x − L)/σ)]^(N−1) dx, in units of σ.
 *
 * @param bits            N, comparators [1], integer ≥ 1
 * @param limitOverSigma  L/σ, limit in volts over the spread of one comparator [1], > 0
 * @returns               1 − yield
 */
export function comparatorPerBitLoss(bits: number, limitOverSigma: number): number {
  return 2 * integrate((x) => {
    const outside = normalTail(limitOverSigma - x) + normalTail(limitOverSigma + x)
    return normalPdf(x) * -Math.expm1((bits - 1) * Math.log1p(-outside))
  }, 0, reach, order, panels)
}

/**
 * Largest spread of the comparators of a SAR with a comparator per bit for which INL, or DNL, holds.
 *
 * @param bits       N, comparators [1], integer ≥ 2
 * @param yieldEach  required yield [1], 0 < yieldEach < 1
 * @returns          σ_max divided by the limit in volts [1]
 */
export function comparatorPerBitSigmaLimit(bits: number, yieldEach: number): number {
  if (bits < 2) throw new RangeError(`comparatorPerBitSigmaLimit: ${bits} comparators have no difference`)
  const loss = (sigma: number) => comparatorPerBitLoss(bits, 1 / sigma)
  return whereLossReaches(loss, 1 - yieldEach, 0.01, 0.5, tolerance)
}
