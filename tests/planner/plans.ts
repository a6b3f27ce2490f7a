import type { Card } from '../../main/contract/cards'
import type { Plan } from '../../main/contract/plan'
import type { Result } from '../../main/contract/result'
import { demos } from '../../main/documents/demos'
import { validatePlan } from '../../main/documents/read-plan'
import { setPaths } from '../../main/documents/set-path'
import { plan, type PlanOptions } from '../../main/planner/plan'

/** Values of a document by dotted path. */
export type Changes = Readonly<Record<string, unknown>>

/** A copy of a document with values put in; what the command line does with `--set`. */
export function changed(document: unknown, changes: Changes): unknown {
  const settings = Object.entries(changes).map(([path, value]) => ({ path, value }))
  const { document: result, problems } = setPaths(structuredClone(document), settings)
  if (problems.length > 0) throw new Error(JSON.stringify(problems))
  return result
}

/** Reads a document as the program does; throws where the program refuses. */
export function read(document: unknown): { plan: Plan; card: Card } {
  const reply = validatePlan(document)
  if (!reply.ok) throw new Error(JSON.stringify(reply.error))
  return reply.value
}

export function planned(document: unknown, options: PlanOptions = { remedies: false }): Result {
  const { plan: complete, card } = read(document)
  return plan(complete, card, options)
}

/** The worked plans that come with the program: flash with trim, flash of eight bits, SAR. */
export const [sounder, mast, logger] = demos.map((demo) => demo.document)

export const flashOf = (bits: number, rate: number, changes: Changes = {}): unknown =>
  changed({ schema: 'latchwright.plan/1', converter: { architecture: 'flash', resolution_bits: bits, sample_rate_hz: rate } }, changes)

export const sarOf = (bits: number, rate: number, changes: Changes = {}): unknown =>
  changed({ schema: 'latchwright.plan/1', converter: { architecture: 'sar', resolution_bits: bits, sample_rate_hz: rate } }, changes)

/** Widths that make a latch of a sort on the 28 nm card. */
export const plainWidths = {
  input_m: 4e-6, input_length_m: 3e-8, cross_n_m: 2e-6, cross_p_m: 2e-6, tail_m: 4e-6, reset_m: 1e-6, extra_cap_f: 0,
}

export const stops = (result: Result): string[] => result.findings.filter((f) => f.severity === 'stop').map((f) => f.code)
