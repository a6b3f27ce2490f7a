import { z } from 'zod'
import { cardSchema } from './cards'
import { choices, cornerNames, ledgerItems, type ChoicePath } from './choices'
import { quantities, type Quantity, type QuantityPath } from './quantities'

export const planSchemaId = 'latchwright.plan/1'

function num(path: QuantityPath) {
  const quantity: Quantity = quantities[path]
  const base = quantity.integer ? z.int() : z.number()
  return base.min(quantity.min).max(quantity.max)
}

function choice<P extends ChoicePath>(path: P) {
  type Option = keyof (typeof choices)[P]['options'] & string
  return z.enum(Object.keys(choices[path].options) as [Option, ...Option[]])
}

const flashSchema = z.strictObject({
  input_style: choice('converter.flash.input_style').default('differential'),
  front_sampler: z.boolean().default(true),
  sampling_cap_f: num('converter.flash.sampling_cap_f').default(5e-13),
  evaluate_fraction: num('converter.flash.evaluate_fraction').default(0.5),
  capture_latches: num('converter.flash.capture_latches').default(1),
  bank_share: num('converter.flash.bank_share').default(0.5),
  ladder_ohm: num('converter.flash.ladder_ohm').default(200),
  ladder_sigma: num('converter.flash.ladder_sigma').default(0.005),
  encoder: choice('converter.flash.encoder').default('ones_counter'),
})

const sarSchema = z.strictObject({
  timing: choice('converter.sar.timing').default('synchronous'),
  sample_fraction: num('converter.sar.sample_fraction').default(0.2),
  redundant_cycles: num('converter.sar.redundant_cycles').default(0),
  comparators: choice('converter.sar.comparators').default('one'),
  dac_scheme: choice('converter.sar.dac_scheme').default('common_mode_based'),
  unit_cap_f: num('converter.sar.unit_cap_f').default(1e-15),
  unit_cap_sigma: num('converter.sar.unit_cap_sigma').default(0.003),
  dac_tau_s: num('converter.sar.dac_tau_s').default(2e-11),
  settle_lsb: num('converter.sar.settle_lsb').default(0.25),
  logic_delay_s: num('converter.sar.logic_delay_s').default(3e-11),
  range_loss: num('converter.sar.range_loss').default(0.01),
})

const converterSchema = z.strictObject({
  architecture: choice('converter.architecture'),
  resolution_bits: num('converter.resolution_bits'),
  sample_rate_hz: num('converter.sample_rate_hz'),
  lanes: num('converter.lanes').default(1),
  full_scale_v: num('converter.full_scale_v').optional(),
  common_mode_v: num('converter.common_mode_v').optional(),
  enob_bits: num('converter.enob_bits').optional(),
  input_frequency_hz: num('converter.input_frequency_hz').nullable().default(null),
  error_rate: num('converter.error_rate').default(1e-12),
  yield: num('converter.yield').default(0.99),
  inl_lsb: num('converter.inl_lsb').default(0.5),
  inl_method: choice('converter.inl_method').default('terminal'),
  dnl_lsb: num('converter.dnl_lsb').default(0.5),
  jitter_s: num('converter.jitter_s').default(1.5e-13),
  source_ohm: num('converter.source_ohm').default(25),
  input_attenuation_db: num('converter.input_attenuation_db').default(0.5),
  flash: flashSchema.optional(),
  sar: sarSchema.optional(),
})

const widthsSchema = z.strictObject({
  input_m: num('comparator.widths.input_m'),
  input_length_m: num('comparator.widths.input_length_m').optional(),
  cross_n_m: num('comparator.widths.cross_n_m'),
  cross_p_m: num('comparator.widths.cross_p_m'),
  tail_m: num('comparator.widths.tail_m'),
  reset_m: num('comparator.widths.reset_m'),
  extra_cap_f: num('comparator.widths.extra_cap_f').default(0),
  second_tail_m: num('comparator.widths.second_tail_m').optional(),
  second_input_m: num('comparator.widths.second_input_m').optional(),
})

const comparatorSchema = z.strictObject({
  topology: choice('comparator.topology').default('strong_arm'),
  sizing: choice('comparator.sizing').default('auto'),
  widths: widthsSchema.optional(),
  objective: choice('comparator.objective').default('energy'),
  load_f: num('comparator.load_f').default(2e-15),
  clock_rise_s: num('comparator.clock_rise_s').default(2e-11),
  offset_method: choice('comparator.offset_method').default('size'),
  trim_bits: num('comparator.trim_bits').nullable().default(null),
  autozero_gain: num('comparator.autozero_gain').default(20),
  autozero_cap_f: num('comparator.autozero_cap_f').default(5e-14),
})

const budgetSchema = z.strictObject({
  noise_share: num('budget.noise_share').default(0.5),
  integration_share: num('budget.integration_share').default(0.35),
  kick_share: num('budget.kick_share').default(0.25),
  kick_imbalance: num('budget.kick_imbalance').default(0.1),
  memory_share: num('budget.memory_share').default(0.1),
  dac_load_share: num('budget.dac_load_share').default(0.1),
  clock_uncertainty_s: num('budget.clock_uncertainty_s').nullable().default(null),
  capture_setup_s: num('budget.capture_setup_s').nullable().default(null),
})

const overrideSchema = z.strictObject({
  item: z.enum(Object.keys(ledgerItems) as [keyof typeof ledgerItems, ...(keyof typeof ledgerItems)[]]),
  value: z.number().min(0).max(1e6),
  reason: z.string().max(500).default(''),
})

/** The plan document as it may be written: only four keys are required. */
export const planSchema = z.strictObject({
  schema: z.literal(planSchemaId),
  title: z.string().max(200).default('Untitled plan'),
  author: z.string().max(200).default(''),
  revision: z.string().max(40).default('A'),
  notes: z.string().max(20_000).default(''),
  converter: converterSchema,
  comparator: comparatorSchema.prefault({}),
  budget: budgetSchema.prefault({}),
  corners: z.array(z.enum([...cornerNames, 'all'])).min(1).max(8).default(['typical']),
  process: z.strictObject({ card: z.union([z.string().min(1).max(80), cardSchema]).default('generic-28') }).prefault({}),
  overrides: z.array(overrideSchema).max(100).default([]),
})

/** A plan as a person or program writes it. */
export type PlanInput = z.input<typeof planSchema>
/** After parsing, before the defaults that depend on the card and the architecture. */
export type ParsedPlan = z.output<typeof planSchema>

export type FlashBrief = z.output<typeof flashSchema>
export type SarBrief = z.output<typeof sarSchema>
export type Widths = z.output<typeof widthsSchema> & { input_length_m: number }
export type BudgetBrief = z.output<typeof budgetSchema>
export type Override = z.output<typeof overrideSchema>
export type ComparatorBrief = Omit<z.output<typeof comparatorSchema>, 'widths'> & { widths?: Widths }
export type ConverterBrief = Omit<z.output<typeof converterSchema>, 'full_scale_v' | 'common_mode_v' | 'enob_bits'>
  & { full_scale_v: number; common_mode_v: number; enob_bits: number }

/** The plan with every default written out; what the planner takes and what a result carries. */
export type Plan = Omit<ParsedPlan, 'converter' | 'comparator' | 'corners'> & {
  converter: ConverterBrief
  comparator: ComparatorBrief
  corners: (typeof cornerNames)[number][]
}

export { flashSchema, sarSchema }
