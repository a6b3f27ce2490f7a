/** One thing wrong with a document, said so that a person can mend it. */
export interface Problem {
  readonly code: ProblemCode
  /** Where, as a dotted path into the plan; '' for the whole document. */
  readonly path: string
  /** What stood there, shortened. */
  readonly value: string
  /** What is allowed there. */
  readonly allowed: string
  /** What to do. */
  readonly hint: string
}

export const problemCodes = [
  'not_text', 'not_json', 'too_large', 'too_deep', 'missing', 'unknown_key', 'wrong_type', 'out_of_range', 'not_a_choice',
  'unknown_card', 'newer_than_program', 'not_available_yet', 'repeated_key',
] as const
export type ProblemCode = (typeof problemCodes)[number]

export const errorCodes = [
  'bad_document', 'bad_request', 'unknown_channel', 'not_found', 'read_failed', 'write_failed', 'cancelled', 'compute_failed', 'refused',
] as const
export type ErrorCode = (typeof errorCodes)[number]

export interface Failure {
  readonly ok: false
  readonly error: { readonly code: ErrorCode; readonly message: string; readonly problems?: readonly Problem[] }
}
export type Reply<T> = { readonly ok: true; readonly value: T } | Failure

export const succeed = <T>(value: T): Reply<T> => ({ ok: true, value })
export const fail = (code: ErrorCode, message: string, problems?: readonly Problem[]): Failure =>
  ({ ok: false, error: problems ? { code, message, problems } : { code, message } })

/** One line for a log or a terminal. */
export function problemText(problem: Problem): string {
  const where = problem.path === '' ? 'document' : problem.path
  const got = problem.value === '' ? '' : `: got ${problem.value}`
  return `${where}${got} [${problem.code}]. Allowed: ${problem.allowed}. ${problem.hint}`
}
