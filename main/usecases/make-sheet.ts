import { createHash } from 'node:crypto'
import { fail, succeed, type Reply } from '../contract/errors'
import type { Plan } from '../contract/plan'
import type { Result } from '../contract/result'
import type { ReadPlan } from '../documents/read-plan'
import { canonicalPlan } from '../documents/write-plan'
import { about } from './about'
import type { Compute } from './compute'
import { runPlan } from './run-plan'

export interface SheetRequest {
  readonly paper: 'A4' | 'LETTER'
  /** Shown on the sheet and written into the file, in UTC. */
  readonly date: Date
}

export interface MadeSheet {
  readonly bytes: Uint8Array
  readonly result: Result
  /** A file name made of the plan's title and revision. */
  readonly suggestedName: string
}

/** SHA-256 of the plan with every default written out and its keys in order; the same plan, however written, has the same. */
export function planChecksum(plan: Plan): string {
  return createHash('sha256').update(JSON.stringify(canonicalPlan(plan))).digest('hex')
}

function fileName(plan: Plan): string {
  const words = `${plan.title} ${plan.revision}`.normalize('NFKD').replace(/[^\p{L}\p{N}]+/gu, '-').replace(/^-+|-+$/g, '')
  return `${words.slice(0, 80) || 'plan'}.pdf`
}

/** Today, or the day the environment fixes so that the same plan gives the same bytes (SOURCE_DATE_EPOCH, seconds). */
export function sheetDate(environment: Readonly<Record<string, string | undefined>>, now: () => number = Date.now): Date {
  const fixed = environment['SOURCE_DATE_EPOCH']
  const milliseconds = fixed !== undefined && /^\d{1,11}$/.test(fixed) ? Number(fixed) * 1000 : now()
  return new Date(Math.floor(milliseconds / 86_400_000) * 86_400_000)
}

/** Plans a document and sets the sheet of the result. */
export async function makePlanSheet(compute: Compute, read: ReadPlan, request: SheetRequest): Promise<Reply<MadeSheet>> {
  const planned = await runPlan(compute, read)
  if (!planned.ok) return planned
  try {
    const { makeSheet } = await import('../sheet/make-sheet')
    const bytes = await makeSheet(planned.value, { ...request, version: about.version, checksum: planChecksum(read.plan) })
    return succeed({ bytes, result: planned.value, suggestedName: fileName(read.plan) })
  } catch (error) {
    return fail('compute_failed', `The sheet could not be set: ${error instanceof Error ? error.message : String(error)}`)
  }
}
