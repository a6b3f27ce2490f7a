import { z } from 'zod'

/** Transient of one comparator: evaluate at an overdrive, then reset. Columns as in the `waves` command. */
export const wavesSchema = z.strictObject({
  overdrive_v: z.number(),
  corner: z.string(),
  columns: z.array(z.string()).min(2),
  rows: z.array(z.array(z.number())),
  /** Boundaries of the phases [s], from the 50 % crossing of the clock edge that starts the decision. */
  phases: z.array(z.strictObject({ name: z.enum(['reset', 'integrate', 'regenerate', 'decided']), from_s: z.number(), to_s: z.number() })),
  decision_s: z.number().nullable(),
})
export type Waves = z.output<typeof wavesSchema>
