import { fail, succeed, type Reply } from '../contract/errors'
import type { Result } from '../contract/result'
import type { ReadPlan } from '../documents/read-plan'
import { computeFailure, type Compute, type PlanOptions } from './compute'

/** That an entry of the bank was asked for which is not there, said so that a person can mend it. */
export function noSuchEntry(index: number, count: number) {
  return fail('bad_request', `There is no comparator ${index}: the bank has entries 1 to ${count}.`)
}

/**
 * Plans a document.
 *
 * @returns the result, also one with `stop` findings; or `bad_request` when workings of an entry are wanted that is not there
 */
export async function runPlan(compute: Compute, { plan, card }: Pick<ReadPlan, 'plan' | 'card'>, options: PlanOptions = {}): Promise<Reply<Result>> {
  try {
    const result = await compute.plan(plan, card, options)
    const count = result.comparators.length
    const { workingsFor } = options
    return workingsFor !== undefined && (workingsFor < 1 || workingsFor > count) ? noSuchEntry(workingsFor, count) : succeed(result)
  } catch (error) {
    return computeFailure(error)
  }
}

/** Whether a result says that the converter cannot be built as it stands. */
export function hasStop(result: Result): boolean {
  return result.findings.some((finding) => finding.severity === 'stop')
}
