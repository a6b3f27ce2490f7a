import { boltzmann } from '../../constants'
import { references } from '../../references'
import type { Working } from '../../../contract/result'
import type { Bank } from '../bank'
import { heldCapacitance, offsetOnlyShifts } from '../situation'
import { numbers, working } from './working'

/** What follows from the brief by definition. */
function quantityWorkings({ s }: Bank): Working[] {
  const rate = s.plan.converter.sample_rate_hz
  const perSample = s.decisionRate / rate
  return [
    working('quantities.lsb_v', 'Least significant bit', 'Δ = V_FS / 2^N', numbers`${s.fullScale} / 2^${s.bits}`, s.lsb, 'V', references.definition),
    working('quantities.lane_period_s', 'Lane period', 'T_lane = lanes / f_s', numbers`${s.lanes} / ${rate}`, s.laneTime, 's', references.definition),
    working('quantities.comparator_count', 'Comparators', s.kind.architecture === 'flash' ? 'lanes · (2^N − 1)' : 'lanes · comparators of a lane',
      s.kind.architecture === 'flash' ? numbers`${s.lanes} * (2^${s.bits} - 1)` : numbers`${s.lanes} * ${s.kind.perLane}`,
      s.comparatorCount, '', references.definition),
    working('quantities.decision_rate_hz', 'Decisions of the bank', 'decisions per sample · f_s', numbers`${perSample} * ${rate}`, s.decisionRate, 'Hz', references.definition),
    working('quantities.error_power_allowed_v2', 'Error power allowed', 'P_allow = V_FS² / (12 · 4^ENOB)',
      numbers`${s.fullScale}^2 / (12 * 4^${s.plan.converter.enob_bits})`, s.fullScale ** 2 / (12 * 4 ** s.plan.converter.enob_bits), 'V²', references.ieee1241),
  ]
}

/** Where the error power goes. */
function budgetWorkings({ s, budget: b }: Bank): Working[] {
  const flash = s.kind.architecture === 'flash'
  const cap = heldCapacitance(s)
  const sigma = s.kind.architecture === 'flash' ? s.kind.flash.ladder_sigma : s.kind.sar.unit_cap_sigma
  const { jitter_s } = s.plan.converter
  return [
    working('budget.quantisation', 'Quantisation', 'Δ² / 12', numbers`${s.lsb}^2 / 12`, b.quantisation, 'V²', references.bennett),
    working('budget.jitter', 'Aperture jitter', '(2π f_in σ_j)² · V_FS² / 8', numbers`(2 * pi * ${s.inputFrequency} * ${jitter_s})^2 * ${s.fullScale}^2 / 8`, b.jitter, 'V²', references.practice),
    working('budget.sampling_noise', flash ? 'Sampler noise' : 'DAC sampling noise', cap === null ? 'none: nothing is held' : '2 k T / C_s',
      cap === null ? '0' : numbers`2 * ${boltzmann} * ${s.hottest} / ${cap}`, b.sampling, 'V²', references.nyquist),
    working('budget.reference', flash ? 'Ladder elements, mean over taps' : 'DAC elements, mean over codes', 'Δ² σ² (M + 1) / 6',
      numbers`${s.lsb}^2 * ${sigma}^2 * (${s.codes} + 1) / 6`, b.reference, 'V²', 'mean of the variance k(M−k)/M of a string with fixed ends'),
    working('budget.remainder', 'Left for noise and spread', 'R = P_allow − ΣP', numbers`${b.allowed} - ${b.quantisation} - ${b.jitter} - ${b.sampling} - ${b.reference}`, b.remainder, 'V²', references.definition),
    working('budget.comparator_noise', 'Share of comparator noise', 'ρ R', numbers`max(0, ${b.noiseShare} * ${b.remainder})`, b.noisePower, 'V²',
      offsetOnlyShifts(s) ? 'offset costs no error power with one comparator: ρ = 1' : 'noise share of the brief'),
    working('budget.threshold_spread', 'Share of threshold spread', '(1 − ρ) R', numbers`max(0, (1 - ${b.noiseShare}) * ${b.remainder})`, b.spreadPower, 'V²', 'noise share of the brief'),
  ]
}

export const briefWorkings = (bank: Bank): Working[] => [...quantityWorkings(bank), ...budgetWorkings(bank)]
