import type { Card } from '../contract/cards'
import { fail, type Failure } from '../contract/errors'
import type { Plan } from '../contract/plan'
import type { Result } from '../contract/result'
import type { Waves } from '../contract/waves'
import type { PlanOptions } from '../planner/plan'
import type { WavesOptions } from '../planner/waves'
import { isSuperseded } from './superseded'

export type { PlanOptions, WavesOptions }

/** Where the planner runs. It takes completed plans; use cases turn what it throws into replies. */
export interface Compute {
  plan(document: Plan, card: Card, options?: PlanOptions): Promise<Result>
  waves(document: Plan, card: Card, options: WavesOptions): Promise<Waves>
  close(): Promise<void>
}

/** In this thread, which has nothing else to do meanwhile. */
export function directCompute(): Compute {
  return {
    plan: async (document, card, options) => (await import('../planner/plan')).plan(document, card, options),
    waves: async (document, card, options) => (await import('../planner/waves')).waves(document, card, options),
    close: async () => {},
  }
}

/** What the planner threw, as a reply: an entry that is not there is the asker's fault, a replaced request nobody's. */
export function computeFailure(error: unknown): Failure {
  if (isSuperseded(error)) throw error
  if (error instanceof RangeError) return fail('bad_request', error.message)
  return fail('compute_failed', `The planner stopped: ${error instanceof Error ? error.message : String(error)}`)
}
