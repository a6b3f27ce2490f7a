import { allowedErrorPower, jitterPower, quantisationPower, referencePower, samplingPower } from '../models/budget/error-power'
import { heldCapacitance, offsetOnlyShifts, type Situation } from './situation'

/** The error power, item by item [V²]; `remainder` is what comparator noise and threshold spread share. */
export interface ErrorBudget {
  readonly allowed: number
  readonly quantisation: number
  readonly jitter: number
  readonly sampling: number
  readonly reference: number
  readonly remainder: number
  /** ρ: part of the remainder that is noise's. */
  readonly noiseShare: number
  /** (1 − ρ)R and ρR, not below 0. */
  readonly spreadPower: number
  readonly noisePower: number
}

/** Spends the allowed error power in the order of the budget. */
export function errorBudget(s: Situation): ErrorBudget {
  const { converter, budget } = s.plan
  const allowed = allowedErrorPower(s.fullScale, converter.enob_bits)
  const quantisation = quantisationPower(s.lsb)
  const jitter = jitterPower(s.inputFrequency, converter.jitter_s, s.fullScale)
  const held = heldCapacitance(s)
  const sampling = held === null ? 0 : samplingPower(s.hottest, held)
  const sigma = s.kind.architecture === 'flash' ? s.kind.flash.ladder_sigma : s.kind.sar.unit_cap_sigma
  const reference = referencePower(s.lsb, sigma, s.codes)
  const remainder = allowed - quantisation - jitter - sampling - reference
  const noiseShare = offsetOnlyShifts(s) ? 1 : budget.noise_share
  return {
    allowed, quantisation, jitter, sampling, reference, remainder, noiseShare,
    noisePower: Math.max(0, noiseShare * remainder),
    spreadPower: Math.max(0, (1 - noiseShare) * remainder),
  }
}
