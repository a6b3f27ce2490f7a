import { cardNamed } from './latch/bench'
import { changed, flashOf, logger, mast, plainWidths, sarOf, sounder, type Changes } from './plans'

const manual: Changes = { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths }
const quick: Changes = { ...manual, corners: ['typical'] }
const sarManual: Changes = { ...manual, 'process.card': 'generic-28' }

/** Plans of every kind the planner takes today; most are quick because their widths are given. */
export const cases: Readonly<Record<string, unknown>> = {
  'first demo': sounder,
  'second demo': mast,
  'third demo': logger,
  'two lanes': changed(sounder, { 'converter.lanes': 2, corners: ['typical'] }),
  'offset by size': flashOf(4, 1e9, { 'comparator.offset_method': 'size' }),
  'area as objective': changed(sounder, { 'comparator.objective': 'area', corners: ['typical'] }),
  'manual, all corners': changed(sounder, manual),
  'manual, offset by size': changed(sounder, { ...quick, 'comparator.offset_method': 'size' }),
  'manual, fixed trim bits': changed(sounder, { ...quick, 'comparator.trim_bits': 5 }),
  'absolute INL': changed(sounder, { ...quick, 'converter.inl_method': 'absolute' }),
  'no capture latch': changed(sounder, { ...quick, 'converter.flash.capture_latches': 0 }),
  'a very good ladder': changed(sounder, { ...quick, 'converter.flash.ladder_sigma': 0 }),
  'two bits': flashOf(2, 1e9, quick),
  'three bits, four lanes': flashOf(3, 8e9, { ...manual, 'converter.lanes': 4, corners: ['fast'] }),
  'long input devices': flashOf(5, 5e8, { ...quick, 'comparator.widths': { ...plainWidths, input_length_m: 9e-8, extra_cap_f: 3e-15 } }),
  'a card in place': flashOf(5, 1e9, { ...quick, 'process.card': { ...cardNamed('generic-28'), id: 'own' } }),
  'a budget of its own': changed(sounder, {
    ...quick,
    budget: { noise_share: 0.3, integration_share: 0.5, kick_share: 0.4, memory_share: 0.2, clock_uncertainty_s: 0, capture_setup_s: 5e-12 },
  }),
  'overrides': changed(sounder, {
    ...quick,
    overrides: [
      { item: 'power.encoder', value: 1.2e-3, reason: 'from synthesis' }, { item: 'area.sampler', value: 0 }, { item: 'power.dac', value: 1 },
      { item: 'power.comparators', value: 2e-3 }, { item: 'power.comparators', value: 3e-3, reason: 'second thoughts' },
    ],
  }),
  'SAR, conventional': sarOf(8, 2e7, { ...sarManual, 'converter.sar.dac_scheme': 'conventional' }),
  'SAR, split capacitor': sarOf(8, 2e7, { ...sarManual, 'converter.sar.dac_scheme': 'split_capacitor' }),
  'SAR, monotonic': sarOf(8, 2e7, {
    ...sarManual, 'converter.sar.dac_scheme': 'monotonic', 'converter.common_mode_v': 0.75, 'converter.full_scale_v': 0.6,
  }),
  'SAR, trimmed, all corners': sarOf(9, 2e7, { ...sarManual, 'comparator.offset_method': 'trim', corners: ['all'] }),
  'SAR, four bits': sarOf(4, 1e8, sarManual),
  'SAR, eighteen bits': sarOf(18, 1e4, {
    ...sarManual, 'converter.enob_bits': 16, 'converter.sar.unit_cap_f': 1e-14, 'converter.sar.unit_cap_sigma': 1e-4,
  }),
  'an error rate of a half': flashOf(4, 1e9, {
    ...quick, 'converter.error_rate': 0.5, 'converter.full_scale_v': 20, 'converter.flash.capture_latches': 8,
  }),
  'SAR, self-timed': sarOf(8, 2e7, { ...sarManual, 'converter.sar.timing': 'self_timed' }),
  'SAR, self-timed, monotonic': sarOf(7, 5e7, {
    ...sarManual, 'converter.sar.timing': 'self_timed', 'converter.sar.dac_scheme': 'monotonic', 'converter.common_mode_v': 0.75, corners: ['slow'],
  }),
  'SAR, self-timed, redundant': sarOf(9, 2e7, { ...sarManual, 'converter.sar.timing': 'self_timed', 'converter.sar.redundant_cycles': 2 }),
  'SAR, redundant': sarOf(9, 2e7, { ...sarManual, 'converter.sar.redundant_cycles': 1, 'converter.sar.dac_tau_s': 2e-10 }),
  'SAR, a comparator for each bit': sarOf(7, 5e7, { ...sarManual, 'converter.sar.comparators': 'one_per_bit' }),
  'SAR, a comparator for each bit, trimmed': sarOf(7, 5e7, { ...sarManual, 'converter.sar.comparators': 'one_per_bit', 'comparator.offset_method': 'trim' }),
  'SAR, four lanes': sarOf(7, 2e8, { ...sarManual, 'converter.lanes': 4 }),
  'SAR, four lanes, a comparator for each bit, autozero': sarOf(6, 2e8, {
    ...sarManual, 'converter.lanes': 4, 'converter.sar.comparators': 'one_per_bit', 'comparator.offset_method': 'autozero',
  }),
  'autozero': flashOf(5, 1e9, { ...manual, 'comparator.offset_method': 'autozero' }),
  'autozero, sized': flashOf(5, 1e9, { 'comparator.offset_method': 'autozero' }),
  'no front sampler': flashOf(4, 5e8, { ...quick, 'converter.flash.front_sampler': false }),
  'no front sampler, two lanes': flashOf(4, 5e8, { ...quick, 'converter.flash.front_sampler': false, 'converter.lanes': 2, 'comparator.offset_method': 'trim' }),
  'SAR that settles at once': sarOf(8, 2e7, { ...sarManual, 'converter.sar.dac_tau_s': 0, 'converter.sar.logic_delay_s': 0 }),
}

/** Plans that cannot be built: each for a reason of its own. */
export const hopeless: Readonly<Record<string, unknown>> = {
  'nothing left of the budget': changed(sounder, { ...quick, 'converter.enob_bits': 6 }),
  'nothing left, SAR': sarOf(10, 1e7, { ...sarManual, 'converter.enob_bits': 10.5 }),
  'no window, flash': flashOf(6, 6e10, { ...quick, 'converter.jitter_s': 0 }),
  'no window, SAR': sarOf(10, 1e9, { ...sarManual, 'converter.jitter_s': 0 }),
  'a ladder that eats all': changed(sounder, { ...quick, 'converter.flash.ladder_sigma': 0.2, 'converter.enob_bits': 4 }),
  'a DAC that misses the yield': sarOf(12, 1e6, { ...sarManual, 'converter.sar.unit_cap_sigma': 0.05, 'converter.enob_bits': 6 }),
  'no time for a self-timed search': sarOf(10, 1e9, { ...sarManual, 'converter.jitter_s': 0, 'converter.sar.timing': 'self_timed' }),
  'a hopeless rate': flashOf(6, 1e12, { ...quick, 'converter.jitter_s': 0 }),
  'a common mode of nothing': flashOf(4, 1e9, { ...quick, 'converter.common_mode_v': 0 }),
  'no common mode, trimmed, all corners': flashOf(4, 1e9, {
    ...manual, corners: ['all'], 'comparator.offset_method': 'trim', 'converter.common_mode_v': 0.02,
  }),
  'a trim of one bit': flashOf(6, 1e9, {
    ...quick, 'comparator.offset_method': 'trim', 'comparator.trim_bits': 1, 'comparator.widths': { ...plainWidths, input_m: 1e-7 },
  }),
  'widths below the minimum': flashOf(4, 1e9, { ...quick, 'comparator.widths': { ...plainWidths, cross_p_m: 1e-8 } }),
}
