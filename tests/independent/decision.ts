import { buildCircuit } from './netlists'
import { outputAt, timeOfLevel } from './run'
import type { Imbalance, Setting } from './setting'

/** An overdrive so small that the circuit stays linear up to a millivolt, yet far above rounding [V]. */
const tiny = 1e-9

/**
 * Decision delay of the full nonlinear circuit: |v_O+ − v_O−| = V_DD/2 after the 50 % crossing of the clock.
 *
 * @param setting    the circuit
 * @param overdrive  v, differential input [V], not 0
 * @returns          t_d [s]
 * @throws RangeError when no decision is reached in 4000 clock rises
 */
export const delayAt = (setting: Setting, overdrive: number): number => timeOfLevel(buildCircuit(setting), overdrive, setting.vdd_v / 2)

/** Regeneration time constant τ [s]: growth of a nanovolt's answer between 10 µV and 1 mV, where only one mode is left. */
export const regenerationTime = (setting: Setting): number => {
  const circuit = buildCircuit(setting)
  return (timeOfLevel(circuit, tiny, 1e-3) - timeOfLevel(circuit, tiny, 1e-5)) / Math.log(100)
}

/**
 * Integration time t_0 [s] of t_d = t_0 + τ·ln(V_DD/(2|v|)), from the full nonlinear delay at 0.1 mV:
 * it holds what the outputs lose where they leave the linear region on their way to V_DD/2.
 */
export const integrationTime = (setting: Setting): number =>
  delayAt(setting, 1e-4) - regenerationTime(setting) * Math.log(setting.vdd_v / 2 / 1e-4)

/** The same t_0 for a circuit that stayed linear up to V_DD/2 [s]: the answer to a nanovolt, continued by the exponential. */
export const linearIntegrationTime = (setting: Setting): number =>
  timeOfLevel(buildCircuit(setting), tiny, 1e-3) - regenerationTime(setting) * Math.log(1e-3 / tiny)

const balanceAt = (setting: Setting, imbalance: Imbalance, time_s: number, guess: number, spread: number): number => {
  const circuit = buildCircuit(setting, [imbalance])
  let [before, now] = [guess - spread, guess + spread]
  let atBefore = outputAt(circuit, before, time_s)
  for (let i = 0; i < 30; i++) {
    const atNow = outputAt(circuit, now, time_s)
    if (atNow === atBefore) return now
    const next = now - (atNow * (now - before)) / (atNow - atBefore)
    before = now
    atBefore = atNow
    now = next
    if (Math.abs(now - before) < 1e-10) return now
  }
  throw new RangeError('no input balances this imbalance')
}

/**
 * Input difference that balances the decision against an imbalance, per unit of it.
 * Sought as the zero of the signed output difference: first where a tiny input has grown 30 times, then 3000 times.
 *
 * @param setting    the circuit
 * @param imbalance  what differs between the sides, and by how much; keep it within the linear region (10 mV)
 * @returns          V of input per unit of imbalance; positive: the positive input has to be the higher one
 * @throws RangeError when no input balances it
 */
export const offsetEquivalent = (setting: Setting, imbalance: Imbalance): number => {
  const balanced = buildCircuit(setting)
  const early = balanceAt(setting, imbalance, timeOfLevel(balanced, tiny, 30 * tiny), 0, 1e-4)
  return balanceAt(setting, imbalance, timeOfLevel(balanced, tiny, 3000 * tiny), early, 1e-6) / imbalance.amount
}
