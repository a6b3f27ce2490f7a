import { boltzmann } from '../../constants'

/**
 * First-order delay of a latch-type comparator [s]:
 *
 * t = 2·C·V_T/I_tail + (C/g_m)·ln( (V_DD/2)/v · √(I_tail/β)/V_T )
 *
 * The outputs fall by V_T at half the tail current, then the cross-coupled pairs regenerate what the input pair, in square
 * law with β = I_tail/V_ov², has left by then. After B. Wicht, T. Nirschl, D. Schmitt-Landsiedel, IEEE JSSC 39(7), 2004 (form from memory).
 *
 * @param capacitance C of an output node [F];  @param threshold V_T that it falls by [V];  @param tail I_tail [A]
 * @param transconductance g_m of the regenerating pairs [S];  @param effective √(I_tail/β), the input pair's overdrive voltage [V]
 */
export function handDelay(
  capacitance: number, threshold: number, tail: number, transconductance: number, supply: number, overdrive: number, effective: number,
): number {
  return (2 * capacitance * threshold) / tail + (capacitance / transconductance) * Math.log((supply / (2 * overdrive)) * (effective / threshold))
}

/**
 * Noise of an integrating input pair: √(4kTγ/(g_m·t)) [V]; square law, white noise averaged over t; common practice.
 * @param transconductance g_m of an input device [S];  @param time t, integration time [s]
 */
export const handNoise = (temperature: number, gamma: number, transconductance: number, time: number): number =>
  Math.sqrt((4 * boltzmann * temperature * gamma) / (transconductance * time))
