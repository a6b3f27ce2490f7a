/**
 * Overdrive below which the allowed fraction of decisions falls, flash: v = P_e·Δ/2 [V].
 * Input uniform over full scale, one threshold in reach per Δ, both sides. H. J. M. Veendrick, JSSC 15(2), 1980 (principle).
 */
export const metastableOverdrive = (errorRate: number, lsb: number): number => (errorRate * lsb) / 2

/**
 * The same for a search: cycle i sees a residue uniform over ±step_i, so P_e = v·Σ 1/step_i.
 * @param steps step_i of every cycle [V]
 */
export const searchOverdrive = (errorRate: number, steps: readonly number[]): number =>
  errorRate / steps.reduce((sum, step) => sum + 1 / step, 0)

/** Below this a double loses digits; far below any physical overdrive [V]. */
const leastOverdrive = 1e-290

/**
 * What the comparator itself must resolve when n pipelined latches follow: min(Δ/2, v·exp(n·T_ev/τ_c)) [V].
 * @param evaluate T_ev, time a capture latch has [s]; @param captureTau τ_c of the library latch [s]
 */
export const neededOverdrive = (overdrive: number, lsb: number, latches: number, evaluate: number, captureTau: number): number =>
  Math.min(lsb / 2, Math.max(leastOverdrive, overdrive * Math.exp((latches * evaluate) / captureTau)))

/** Decision delay t_d(v) = t_0 + τ·ln(V_DD/2v) [s]. */
export const decisionDelay = (integration: number, tau: number, supply: number, overdrive: number): number =>
  integration + tau * Math.log(supply / (2 * overdrive))

/**
 * Largest τ that fits: (1 − s_0)·window/ln(V_DD/2v) [s]; 0 where there is no positive solution.
 * @param share s_0, part of the window planned for integration
 */
export function tauLimit(window: number, share: number, supply: number, overdrive: number): number {
  const growth = Math.log(supply / (2 * overdrive))
  return window > 0 && growth > 0 ? ((1 - share) * window) / growth : 0
}
