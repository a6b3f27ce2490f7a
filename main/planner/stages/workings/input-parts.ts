import type { ComparatorEntry, Working } from '../../../contract/result'
import { references } from '../../references'
import type { Bank } from '../bank'
import { numbers, working } from './working'

/** Workings of the input load limit. */
export function capacitanceParts({ s }: Bank, entry: ComparatorEntry): Working[] {
  if (s.kind.architecture === 'sar') {
    return [working('limits.input_cap_f', 'Input capacitance per side', 'd · C_DAC', numbers`${s.plan.budget.dac_load_share} * ${s.kind.arrayCap}`, entry.limits.input_cap_f, 'F', 'DAC load share of the brief')]
  }
  const { flash } = s.kind
  if (!flash.front_sampler) {
    const { input_attenuation_db: decibel, source_ohm } = s.plan.converter
    const source = numbers`sqrt(10^(${decibel} / 10) - 1) / (2 * pi * ${s.inputFrequency} * ${source_ohm})`
    const ladder = numbers`2^(-${s.bits}) / (pi / 4 * ${s.inputFrequency} * ${flash.ladder_ohm})`
    return [working('limits.input_cap_f', 'Input capacitance per side',
      'min(√(10^(dB/10) − 1) / (2π f_in R_s), 2^−N / ((π/4) f_in R_L)) / ((M − 1) lanes)',
      `min(${source}, ${ladder}) / ${numbers`((${s.codes} - 1) * ${s.lanes})`}`, entry.limits.input_cap_f, 'F',
      `droop of the source at f_in; ladder feedthrough: ${references.plassche}`)]
  }
  return [working('limits.input_cap_f', 'Input capacitance per side', 'min(b · C_s, 2^−N / ((π/4) f_in R_L)) / (M − 1)',
    numbers`min(${flash.bank_share} * ${flash.sampling_cap_f}, 2^(-${s.bits}) / (pi / 4 * ${s.inputFrequency} * ${flash.ladder_ohm})) / (${s.codes} - 1)`,
    entry.limits.input_cap_f, 'F', `bank share of the brief; ladder feedthrough: ${references.plassche}`)]
}
