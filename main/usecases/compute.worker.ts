import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import { plan, type PlanOptions } from '../planner/plan'
import { waves, type WavesOptions } from '../planner/waves'

export type Job =
  | { kind: 'plan'; document: Plan; card: Card; options: PlanOptions }
  | { kind: 'waves'; document: Plan; card: Card; options: WavesOptions }

/** One job of the worker pool: the planner's doors and nothing else. */
export default function run(job: Job) {
  return job.kind === 'plan' ? plan(job.document, job.card, job.options) : waves(job.document, job.card, job.options)
}
