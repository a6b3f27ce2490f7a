import { problemText, type ErrorCode, type Failure, type Reply } from '../contract/errors'
import { mostProblems } from '../documents/path-text'
import type { Streams } from './streams'

/** Exit codes of every command. */
export const exit = { done: 0, unmet: 1, badInput: 2, cannotReadOrWrite: 3, cancelled: 130 } as const

const codes: Readonly<Partial<Record<ErrorCode, number>>> = {
  not_found: exit.cannotReadOrWrite, read_failed: exit.cannotReadOrWrite, write_failed: exit.cannotReadOrWrite, cancelled: exit.cancelled,
  compute_failed: exit.cannotReadOrWrite,
}

const countOf = (told: number): string => (told === 1 ? '1 problem' : `${told} problems${told < mostProblems ? '' : ' or more'}`)

/** Says what is wrong on the error stream, a problem a line under a line that counts them, and gives the exit code. */
export function report({ error }: Failure, streams: Streams): number {
  const problems = error.problems ?? []
  if (problems.length === 0) streams.err(`latchwright: ${error.message}`)
  else {
    streams.err(`latchwright: ${countOf(problems.length)} in the plan`)
    for (const problem of problems) streams.err(problemText(problem))
  }
  return codes[error.code] ?? exit.badInput
}

/** What a command does with a reply: go on with the value, or report the failure. */
export async function proceed<T>(reply: Reply<T>, streams: Streams, next: (value: T) => Promise<number>): Promise<number> {
  return reply.ok ? next(reply.value) : report(reply, streams)
}
