import { z } from 'zod'
import { cornerNames, ledgerItems, limitNames } from './choices'
import { planSchema, type Plan } from './plan'

export const resultSchemaId = 'latchwright.result/1'

const finite = z.number()
const orNull = z.number().nullable()
const limitKeys = Object.keys(limitNames) as [keyof typeof limitNames, ...(keyof typeof limitNames)[]]

export const limitsSchema = z.strictObject({
  window_s: finite, overdrive_v: orNull, tau_s: finite, integration_s: finite, noise_v: finite, offset_v: finite,
  trim_step_v: orNull, skew_s: orNull, kickback_v: finite, memory_v: finite, input_cap_f: finite,
})

/** Null only where the latch could not be evaluated at all; a `stop` finding then says why. */
export const reachedSchema = z.strictObject({
  delay_s: orNull, tau_s: orNull, integration_s: orNull, noise_v: orNull, offset_v: orNull, residual_v: orNull, trim_step_v: orNull,
  kickback_v: orNull, memory_v: orNull, input_cap_f: orNull, aperture_s: orNull, energy_j: orNull, area_m2: orNull,
})

export const useSchema = z.strictObject({ time: orNull, noise: orNull, offset: orNull, kickback: orNull, memory: orNull, input: orNull })

export const comparatorSchema = z.strictObject({
  index: z.int().min(1), lane: z.int().min(0), cycle: z.int().min(1).nullable(), threshold_v: orNull, common_mode_v: finite,
  limits: limitsSchema, reached: reachedSchema, use: useSchema, tightest: z.enum(limitKeys).nullable(),
})

const ledgerLine = z.strictObject({
  item: z.enum(Object.keys(ledgerItems) as [keyof typeof ledgerItems, ...(keyof typeof ledgerItems)[]]),
  value: finite, model: z.string().min(1), overridden: z.boolean(),
})

const remedySchema = z.strictObject({
  text: z.string().min(1),
  set: z.array(z.strictObject({ path: z.string().min(1), value: z.json() })).min(1),
})

export const findingSchema = z.strictObject({
  severity: z.enum(['stop', 'caution', 'note']),
  code: z.string().regex(/^[a-z][a-z0-9_]*$/),
  message: z.string().min(1), path: z.string().nullable(), remedy: z.string().nullable(), remedies: z.array(remedySchema),
})

export const workingSchema = z.strictObject({
  id: z.string().min(1), title: z.string().min(1), formula: z.string().min(1), numbers: z.string().min(1),
  value: orNull, unit: z.string(), source: z.string().min(1),
})

export const budgetItems = ['quantisation', 'jitter', 'sampling_noise', 'reference', 'threshold_spread', 'comparator_noise'] as const

export const resultSchema = z.strictObject({
  schema: z.literal(resultSchemaId),
  plan: planSchema,
  quantities: z.strictObject({ lsb_v: finite, comparator_count: z.int(), decision_rate_hz: finite, error_power_allowed_v2: finite }),
  budget: z.array(z.strictObject({ item: z.enum(budgetItems), allowed_v2: finite, used_v2: orNull })).length(budgetItems.length),
  comparators: z.array(comparatorSchema).min(1),
  design: z.strictObject({
    widths: planSchema.shape.comparator.unwrap().shape.widths.unwrap().extend({ input_length_m: z.number(), extra_cap_f: z.number() }),
    corner: z.string(),
    offset_parts_v: z.strictObject({ input: orNull, cross_n: orNull, cross_p: orNull, reset: orNull }),
    trim_bits: z.int().nullable(),
  }),
  ledger: z.strictObject({ power_w: orNull, area_m2: orNull, power: z.array(ledgerLine), area: z.array(ledgerLine) }),
  predicted: z.strictObject({ enob_bits: orNull, sndr_db: orNull, walden_j: orNull, schreier_db: orNull }),
  corners: z.array(z.strictObject({
    name: z.string(), delay_s: orNull, noise_v: orNull, offset_v: orNull, power_w: orNull, meets: z.boolean(),
  })).min(1),
  findings: z.array(findingSchema),
  workings: z.array(workingSchema),
})

type Parsed = z.output<typeof resultSchema>
export type Result = Omit<Parsed, 'plan'> & { plan: Plan }
export type ComparatorEntry = z.output<typeof comparatorSchema>
export type Limits = z.output<typeof limitsSchema>
export type Reached = z.output<typeof reachedSchema>
export type Use = z.output<typeof useSchema>
export type Finding = z.output<typeof findingSchema>
export type Remedy = z.output<typeof remedySchema>
export type Working = z.output<typeof workingSchema>
export type Ledger = Parsed['ledger']
export type LedgerLine = z.output<typeof ledgerLine>
export type BudgetLine = Parsed['budget'][number]
export type CornerEntry = Parsed['corners'][number]
export type Design = Parsed['design']

export { cornerNames }
