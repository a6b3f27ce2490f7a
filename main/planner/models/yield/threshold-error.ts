import { normalExcess, normalPdf, normalTail } from '../../numerics/statistics'

/**
 * Error of one threshold: uniform within ± halfWidth (a trimmed comparator's residual) plus an independent Gaussian
 * (raw offset, or the ladder's share). halfWidth 0 is a plain Gaussian, sigma 0 a plain uniform error.
 * Both in the same unit (LSB, volt or multiples of σ), ≥ 0.
 */
export interface ThresholdError {
  readonly halfWidth: number
  readonly sigma: number
}

/** Sigmas after which a Gaussian tail is below the rounding error of 1: Q(8.5) = 9e-18. */
export const tailReach = 8.5

/** Below this ratio of halfWidth to sigma the uniform part is a small correction, taken to second order. */
const narrowUniform = 1e-3
/** Below this ratio of sigma to halfWidth the Gaussian part is lost in the rounding of the uniform one. */
const noGaussian = 1e-12

/** The largest size of the error that counts: P(X > reach) < 1e-17. */
export function errorReach({ halfWidth, sigma }: ThresholdError): number {
  return halfWidth + tailReach * sigma
}

/**
 * P(X > y) of a threshold error X. With u = y/σ and η = halfWidth/σ: [E(u − η) − E(u + η)]/(2η), E the mean excess
 * E(x) = φ(x) − x·Q(x); this is the mean of Q over the uniform part.
 *
 * @param error  distribution of the threshold
 * @param y      any real, in the error's unit
 */
export function errorTail({ halfWidth, sigma }: ThresholdError, y: number): number {
  if (sigma <= noGaussian * halfWidth) return uniformTail(halfWidth, y)
  const u = y / sigma
  const eta = halfWidth / sigma
  if (u - eta > tailReach) return 0
  if (u + eta < -tailReach) return 1
  if (eta < narrowUniform) return normalTail(u) + eta * eta / 6 * u * normalPdf(u)
  const far = u + eta > tailReach ? 0 : normalExcess(u + eta)
  return (normalExcess(u - eta) - far) / (2 * eta)
}

function uniformTail(halfWidth: number, y: number): number {
  if (y >= halfWidth) return y > halfWidth || halfWidth > 0 ? 0 : 0.5
  return y <= -halfWidth ? 1 : (halfWidth - y) / (2 * halfWidth)
}

/**
 * Density of a threshold error; not defined for halfWidth = sigma = 0.
 *
 * @param error  distribution of the threshold
 * @param x      any real, in the error's unit
 */
export function errorDensity({ halfWidth, sigma }: ThresholdError, x: number): number {
  if (sigma <= noGaussian * halfWidth) return Math.abs(x) <= halfWidth ? 0.5 / halfWidth : 0
  const u = Math.abs(x) / sigma
  const eta = halfWidth / sigma
  if (eta < narrowUniform) return normalPdf(u) * (1 + eta * eta / 6 * (u * u - 1)) / sigma
  if (u + tailReach < eta) return 0.5 / halfWidth
  const far = u + eta > tailReach ? 0 : normalTail(u + eta)
  return (normalTail(u - eta) - far) / (2 * halfWidth)
}

/** P(|X| > limit), for a limit ≥ 0. */
export function errorOutside(error: ThresholdError, limit: number): number {
  return Math.min(1, 2 * errorTail(error, limit))
}

/** Points within (from, to) where the density changes its course on the scale of sigma, in ascending order. */
export function densityBreaks({ halfWidth, sigma }: ThresholdError, from: number, to: number): number[] {
  if (halfWidth === 0) return []
  const edge = tailReach * sigma
  const marks = edge > 0 ? [halfWidth - edge, halfWidth - 0.35 * edge, halfWidth, halfWidth + 0.35 * edge] : [halfWidth]
  return marks.filter((x) => x > from && x < to)
}
