/** One decision of a successive approximation: weight in Δ, what it must see settle, and its residue range. */
export interface SearchCycle {
  readonly cycle: number
  /** Weight w_i [LSB]. */
  readonly weight: number
  /** step_i: the residue before this decision is uniform over ± this [V]. */
  readonly step: number
  /** r_i: error of this decision that the later cycles make good, ± [V]; 0 without redundancy. */
  readonly forgives: number
  /** What the DAC may still be off when this decision is taken [V]. */
  readonly tolerance: number
  /** t_dac,i before this decision [s]. */
  readonly settle: number
}

/** Binary weights M/2, M/4 … 1 [LSB]. */
export const binaryWeights = (bits: number): number[] => Array.from({ length: bits }, (_, i) => 2 ** (bits - 1 - i))

/**
 * Weights with redundant cycles: a copy inserted after each of the first R_c groups of ⌊N/(R_c + 1)⌋ binary ones [LSB];
 * N = 10, R_c = 1: 512 256 128 64 32 32 16 … 1.
 */
export function searchWeights(bits: number, redundant: number): number[] {
  const group = Math.floor(bits / (redundant + 1))
  return binaryWeights(bits).flatMap((weight, i) => ((i + 1) % group === 0 && (i + 1) / group <= redundant ? [weight, weight] : [weight]))
}

/**
 * Settling time of one DAC step: τ·ln(step/tolerance), 0 where the step is inside the tolerance [s].
 * @param tau single-pole settling of the array [s]
 */
export const settlingTime = (tau: number, step: number, tolerance: number): number => (step > tolerance ? tau * Math.log(step / tolerance) : 0)

/**
 * The cycles of a search over weights: step_1 = V_FS/2, step_i = w_{i−1}Δ/2; the first needs no settling. A cycle forgives
 * r_i = ½(1 + Σ_{j>i} w_j − w_i)·Δ, so that its DAC may still be off by max(tolerance, r_i/2).
 */
export function searchCycles(weights: readonly number[], fullScale: number, lsb: number, tau: number, tolerance: number): SearchCycle[] {
  return weights.map((weight, i) => {
    const later = weights.slice(i + 1).reduce((sum, w) => sum + w, 0)
    const forgives = (Math.max(0, 1 + later - weight) / 2) * lsb
    const step = i === 0 ? fullScale / 2 : (weights[i - 1] * lsb) / 2
    const allowed = Math.max(tolerance, forgives / 2)
    return { cycle: i + 1, weight, step, forgives, tolerance: allowed, settle: i === 0 ? 0 : settlingTime(tau, step, allowed) }
  })
}

/** Common mode at cycle i of the monotonic scheme: v_cm − (V_FS/4)(1 − 2^(1−i)) [V]; C.-C. Liu et al., JSSC 45(4), 2010. */
export const monotonicCommonMode = (commonMode: number, fullScale: number, cycle: number): number =>
  commonMode - (fullScale / 4) * (1 - 2 ** (1 - cycle))
