import { valueAt } from '../../state/paths'

export interface Section {
  readonly id: string
  readonly title: string
  readonly fields: readonly string[]
}

/** The brief in the order it is read. Fields that have no effect at the moment are left out by `isShown`. */
export const sections: readonly Section[] = [
  { id: 'converter', title: 'Converter', fields: [
    'converter.architecture', 'converter.resolution_bits', 'converter.sample_rate_hz', 'converter.lanes',
    'converter.full_scale_v', 'converter.common_mode_v',
  ] },
  { id: 'targets', title: 'What it must meet', fields: [
    'converter.enob_bits', 'converter.input_frequency_hz', 'converter.error_rate', 'converter.yield',
    'converter.inl_lsb', 'converter.inl_method', 'converter.dnl_lsb',
  ] },
  { id: 'comparator', title: 'Comparator', fields: [
    'comparator.topology', 'comparator.sizing', 'comparator.objective',
    'comparator.widths.input_m', 'comparator.widths.input_length_m', 'comparator.widths.cross_n_m', 'comparator.widths.cross_p_m',
    'comparator.widths.tail_m', 'comparator.widths.reset_m', 'comparator.widths.extra_cap_f',
    'comparator.widths.second_tail_m', 'comparator.widths.second_input_m',
    'comparator.load_f', 'comparator.clock_rise_s',
    'comparator.offset_method', 'comparator.trim_bits', 'comparator.autozero_gain', 'comparator.autozero_cap_f',
  ] },
  { id: 'process', title: 'Process', fields: ['process.card', 'corners'] },
  { id: 'source', title: 'Signal source', fields: ['converter.jitter_s', 'converter.source_ohm', 'converter.input_attenuation_db'] },
  { id: 'block', title: 'Architecture', fields: [
    'converter.flash.input_style', 'converter.flash.front_sampler', 'converter.flash.sampling_cap_f', 'converter.flash.bank_share',
    'converter.flash.evaluate_fraction', 'converter.flash.capture_latches', 'converter.flash.ladder_ohm', 'converter.flash.ladder_sigma',
    'converter.flash.encoder',
    'converter.sar.timing', 'converter.sar.comparators', 'converter.sar.redundant_cycles', 'converter.sar.sample_fraction',
    'converter.sar.dac_scheme', 'converter.sar.unit_cap_f', 'converter.sar.unit_cap_sigma', 'converter.sar.dac_tau_s',
    'converter.sar.settle_lsb', 'converter.sar.logic_delay_s', 'converter.sar.range_loss',
  ] },
  { id: 'shares', title: 'Budget shares', fields: [
    'budget.noise_share', 'budget.integration_share', 'budget.kick_share', 'budget.kick_imbalance', 'budget.memory_share',
    'budget.dac_load_share', 'budget.clock_uncertainty_s', 'budget.capture_setup_s',
  ] },
  { id: 'overrides', title: 'Overrides', fields: ['overrides'] },
  { id: 'about', title: 'This plan', fields: ['title', 'revision', 'author', 'notes'] },
]

/** The title of a section; that of the architecture's own block names it. */
export function titleOf(section: Section, plan: unknown): string {
  if (section.id !== 'block') return section.title
  return valueAt(plan, 'converter.architecture') === 'sar' ? 'SAR' : 'Flash'
}

export const sectionOf = (path: string): string | undefined =>
  sections.find(({ fields }) => fields.some((field) => path === field || path.startsWith(`${field}.`)))?.id

const conditions: readonly { readonly starts: string; readonly path: string; readonly is: string }[] = [
  { starts: 'converter.flash.', path: 'converter.architecture', is: 'flash' },
  { starts: 'converter.sar.', path: 'converter.architecture', is: 'sar' },
  { starts: 'comparator.widths.', path: 'comparator.sizing', is: 'manual' },
  { starts: 'comparator.widths.second_', path: 'comparator.topology', is: 'double_tail' },
  { starts: 'comparator.objective', path: 'comparator.sizing', is: 'auto' },
  { starts: 'comparator.trim_bits', path: 'comparator.offset_method', is: 'trim' },
  { starts: 'comparator.autozero_', path: 'comparator.offset_method', is: 'autozero' },
]

const starting: Readonly<Record<string, string>> = {
  'comparator.sizing': 'auto', 'comparator.offset_method': 'size', 'comparator.topology': 'strong_arm',
}

/** What must be chosen elsewhere for a field to have an effect. */
export const conditionsOf = (path: string) => conditions.filter(({ starts }) => path.startsWith(starts))

/** Whether a field has an effect in this document, written or by default. */
export function isShown(path: string, document: unknown): boolean {
  return conditionsOf(path).every((condition) => (valueAt(document, condition.path) ?? starting[condition.path]) === condition.is)
}
