import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import { plan } from '../planner/plan'
import { waves } from '../planner/waves'

export type Job =
  | { kind: 'plan'; document: Plan; card: Card; options: { workingsFor?: number } }
  | { kind: 'waves'; document: Plan; card: Card; options: { index: number; overdrive_v: number | null } }

/** One job of the worker pool: the planner's doors and nothing else. */
export default function run(job: Job) {
  return job.kind === 'plan' ? plan(job.document, job.card, job.options) : waves(job.document, job.card, job.options)
}
