import type { choices } from '../../../contract/choices'

/** How the capacitor array of a SAR is switched. */
export type DacScheme = keyof (typeof choices)['converter.sar.dac_scheme']['options']

/**
 * Capacitance of the array of one side in units of C_u: 2^N where the largest weight is tested on the array itself
 * (conventional, split capacitor), 2^(N−1) where the first decision is taken on the sampled input as it stands.
 *
 * @param scheme  switching scheme
 * @param bits    N, resolution [bit], integer ≥ 2
 */
export function arrayUnits(scheme: DacScheme, bits: number): number {
  return scheme === 'conventional' || scheme === 'split_capacitor' ? 2 ** bits : 2 ** (bits - 1)
}
