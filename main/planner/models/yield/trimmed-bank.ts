import { dnlLoss } from './dnl'
import type { InlLine } from './sigma-limits'
import { terminalInlLoss } from './terminal-inl'
import { errorOutside } from './threshold-error'

/**
 * A flash bank after trimming. The residual of every comparator is uniform within ± step/2; its ladder tap adds a Gaussian
 * of variance Δ²σ_R²·k(M − k)/M, of which one element's Δ²σ_R² counts between neighbours. The taps are taken as independent:
 * an approximation where the ladder matters (the trials draw the ladder itself).
 */
export interface TrimmedBank {
  /** M, number of codes [1], integer ≥ 2. */
  readonly codes: number
  /** Δ [V], > 0. */
  readonly deltaV: number
  /** Trim step [V], ≥ 0. */
  readonly stepV: number
  /** σ_R, relative standard deviation of one ladder element [1], ≥ 0. */
  readonly ladderSigma: number
}

/**
 * Fraction of trimmed banks that fail their INL.
 *
 * @param line    line that INL is measured against
 * @param bank    the bank
 * @param inlLsb  limit [LSB], > 0
 * @returns       1 − yield
 */
export function trimmedInlLoss(line: InlLine, bank: TrimmedBank, inlLsb: number): number {
  const { codes, ladderSigma } = bank
  const halfWidth = 0.5 * bank.stepV / bank.deltaV
  const sigmaAt = (k: number) => ladderSigma * Math.sqrt(k * (codes - k) / codes)
  if (line === 'terminal') return terminalInlLoss({ count: codes - 1, halfWidth, sigmaAt }, inlLsb)
  let logYield = 0
  for (let k = 1; k < codes; k++) logYield += Math.log1p(-errorOutside({ halfWidth, sigma: sigmaAt(k) }, inlLsb))
  return -Math.expm1(logYield)
}

/**
 * Fraction of trimmed banks that fail their DNL; each threshold carries half of one ladder element's variance.
 *
 * @param bank    the bank
 * @param dnlLsb  limit [LSB], > 0
 * @returns       1 − yield
 */
export function trimmedDnlLoss(bank: TrimmedBank, dnlLsb: number): number {
  const error = { halfWidth: 0.5 * bank.stepV / bank.deltaV, sigma: bank.ladderSigma * Math.SQRT1_2 }
  return dnlLoss(error, dnlLsb, bank.codes - 1)
}

/** Fraction of trimmed banks that meet their INL; see `trimmedInlLoss`. */
export function trimmedInlYield(line: InlLine, bank: TrimmedBank, inlLsb: number): number {
  return 1 - trimmedInlLoss(line, bank, inlLsb)
}

/** Fraction of trimmed banks that meet their DNL; see `trimmedDnlLoss`. */
export function trimmedDnlYield(bank: TrimmedBank, dnlLsb: number): number {
  return 1 - trimmedDnlLoss(bank, dnlLsb)
}
