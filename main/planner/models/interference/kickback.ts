/**
 * Disturbance left on a flash threshold by the last decision: V_DD·(W_in c_f/C_in)·exp(−t_reset/τ_1) [V]; common practice.
 * @param slowest τ_1 of the ladder loaded by the bank [s]
 */
export const ladderKick = (supply: number, edge: number, inputCap: number, resetTime: number, slowest: number): number =>
  ((supply * edge) / inputCap) * Math.exp(-resetTime / slowest)

/** Slowest mode of a uniformly loaded ladder with fixed ends: τ_1 = R·C/π² [s]; diffusion on a line. */
export const ladderTime = (ladder: number, bankCap: number): number => (ladder * bankCap) / Math.PI ** 2

/** What `count` kicks leave as a difference on a capacitor pair: imbalance·V_DD·count·edge/C [V]; common practice. */
export const capacitorKick = (imbalance: number, supply: number, count: number, edge: number, capacitance: number): number =>
  (imbalance * supply * count * edge) / capacitance
