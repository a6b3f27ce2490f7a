import { boltzmann } from '../../constants'

/**
 * Error power that leaves an effective resolution: P = V_FS²/(12·4^ENOB) [V²].
 * IEEE Std 1241, definition of ENOB from noise and distortion, written for a full-scale sine.
 */
export const allowedErrorPower = (fullScale: number, enob: number): number => fullScale ** 2 / (12 * 4 ** enob)

/** Quantisation error power Δ²/12 [V²]; W. R. Bennett, Bell Syst. Tech. J. 27, 1948. @param lsb Δ [V] */
export const quantisationPower = (lsb: number): number => lsb ** 2 / 12

/** Aperture jitter on a full-scale sine: (2π f_in σ_j)²·V_FS²/8 [V²]. @param jitter σ_j, rms [s] */
export const jitterPower = (inputFrequency: number, jitter: number, fullScale: number): number =>
  (2 * Math.PI * inputFrequency * jitter) ** 2 * (fullScale ** 2 / 8)

/** Sampled noise of two sides: 2kT/C [V²]. @param capacitance per side [F] */
export const samplingPower = (temperature: number, capacitance: number): number => (2 * boltzmann * temperature) / capacitance

/**
 * Mean over k = 1 … M−1 of Δ²σ²·k(M−k)/M = Δ²σ²(M+1)/6 [V²]: a string (or array) of M equal elements with its ends fixed.
 * @param sigma relative standard deviation of one element
 */
export const referencePower = (lsb: number, sigma: number, codes: number): number => (lsb ** 2 * sigma ** 2 * (codes + 1)) / 6

/** Effective bits left by a total error power: ½·log2(V_FS²/(12·ΣP)). */
export const effectiveBits = (fullScale: number, errorPower: number): number => 0.5 * Math.log2(fullScale ** 2 / (12 * errorPower))

/** Signal-to-noise-and-distortion of a full-scale sine [dB]: 10·log10((V_FS²/8)/ΣP). */
export const sndr = (fullScale: number, errorPower: number): number => 10 * Math.log10(fullScale ** 2 / 8 / errorPower)
