/** One decision of a successive approximation: weight in Δ, what it must see settle, and its residue range. */
export interface SearchCycle {
  readonly cycle: number
  /** Weight w_i [LSB]. */
  readonly weight: number
  /** step_i: the residue before this decision is uniform over ± this [V]. */
  readonly step: number
  /** t_dac,i before this decision [s]. */
  readonly settle: number
}

/** Binary weights M/2, M/4 … 1 [LSB]. */
export const binaryWeights = (bits: number): number[] => Array.from({ length: bits }, (_, i) => 2 ** (bits - 1 - i))

/**
 * Settling time of one DAC step: τ·ln(step/tolerance), 0 where the step is inside the tolerance [s].
 * @param tau single-pole settling of the array [s]
 */
export const settlingTime = (tau: number, step: number, tolerance: number): number => (step > tolerance ? tau * Math.log(step / tolerance) : 0)

/** The cycles of a search over weights: step_1 = V_FS/2, step_i = w_{i−1}Δ/2; the first needs no settling. */
export function searchCycles(weights: readonly number[], fullScale: number, lsb: number, tau: number, tolerance: number): SearchCycle[] {
  return weights.map((weight, i) => {
    const step = i === 0 ? fullScale / 2 : (weights[i - 1] * lsb) / 2
    return { cycle: i + 1, weight, step, settle: i === 0 ? 0 : settlingTime(tau, step, tolerance) }
  })
}

/** Common mode at cycle i of the monotonic scheme: v_cm − (V_FS/4)(1 − 2^(1−i)) [V]; C.-C. Liu et al., JSSC 45(4), 2010. */
export const monotonicCommonMode = (commonMode: number, fullScale: number, cycle: number): number =>
  commonMode - (fullScale / 4) * (1 - 2 ** (1 - cycle))
