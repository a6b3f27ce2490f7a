/**
 * Standard deviation of the difference of a pair: σ = A/√(WL).
 * M. J. M. Pelgrom, A. C. J. Duinmaijer, A. P. G. Welbers, JSSC 24(5), 1989; A is the coefficient of the difference of a pair.
 * @param coefficient A_VT [V·m] or A_β [m]
 */
export const pairSpread = (coefficient: number, width: number, length: number): number => coefficient / Math.sqrt(width * length)

/** Error variance of tap k of a ladder of M equal elements, ends fixed: Δ²σ_R²·k(M−k)/M [V²]. */
export const tapVariance = (lsb: number, sigma: number, codes: number, tap: number): number =>
  (lsb ** 2 * sigma ** 2 * tap * (codes - tap)) / codes
