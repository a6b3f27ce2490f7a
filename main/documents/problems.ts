import type { z } from 'zod'
import type { Problem, ProblemCode } from '../contract/errors'
import { parseQuantity } from '../contract/expression'
import { allowedAt, quantityAt } from './allowed'
import { nearMiss } from './near-miss'
import { dotted, mostProblems, shortKey } from './path-text'
import { keysAt, planPaths, schemaAt, variants, type Path } from './plan-schema'

type Issue = z.core.$ZodIssue
const longestValue = 60

/** A value as it is quoted in a message: JSON, cut short; never NaN or Infinity. */
export function shortValue(value: unknown): string {
  if (value === undefined) return ''
  if (typeof value === 'number' && !Number.isFinite(value)) return 'a number beyond ±1.8e308'
  const text = typeof value === 'object' && value !== null ? shortObject(value) : JSON.stringify(value)
  return text.length > longestValue ? `${text.slice(0, longestValue - 1)}…` : text
}

function shortObject(value: object): string {
  if (Array.isArray(value)) return `a list of ${value.length}`
  return `an object with ${Object.keys(value).slice(0, 5).map(shortKey).join(', ') || 'no keys'}`
}

export function valueAt(document: unknown, path: Path): unknown {
  return path.reduce<unknown>((value, step) => (
    typeof value === 'object' && value !== null && Object.hasOwn(value, step) ? (value as Record<string | number, unknown>)[step] : undefined
  ), document)
}

function unknownKeyHint(parent: Path, key: string): string {
  const known = keysAt(parent)
  const near = nearMiss(key, known)
  if (near !== null) return `Did you mean “${near}”?`
  const elsewhere = planPaths.find((path) => path.endsWith(`.${key}`) && path !== dotted([...parent, key]))
  if (elsewhere !== undefined) return `It belongs at ${elsewhere}.`
  return 'Take it out, or look for its right name in the JSON Schema.'
}

function unknownKeys(path: Path, keys: readonly string[], document: unknown): Problem[] {
  const allowed = keysAt(path).join(', ')
  return keys.slice(0, mostProblems + 1).map((key) => ({
    code: 'unknown_key', path: dotted([...path, key]), value: shortValue(valueAt(document, [...path, key])), allowed,
    hint: unknownKeyHint(path, key),
  }))
}

function typeHint(path: Path, value: unknown): string {
  const quantity = quantityAt(dotted(path))
  if (value === null) return 'Take the key out to get its default.'
  if (!quantity) return 'Mend the value or take the key out.'
  if (typeof value !== 'string') return quantity.integer ? 'Write a whole number.' : 'Write a number.'
  const reading = parseQuantity(value, quantity.unit)
  return reading.ok ? `Write it as a number in SI units: ${reading.value}.` : 'Write a number in SI units, without quotes.'
}

function rangeHint(path: Path, value: unknown): string {
  const quantity = quantityAt(dotted(path))
  if (!quantity || typeof value !== 'number') return 'Mend the value or take the key out.'
  const unit = quantity.unit === '' ? 'a pure number' : `in ${quantity.unit}`
  return `The value is ${unit}. ${quantity.help}`
}

function choiceHint(path: Path, value: unknown): string {
  const node = schemaAt(path)
  const options = node ? variants(node).flatMap((variant) => variant.enum ?? (variant.const === undefined ? [] : [variant.const])) : []
  const near = typeof value === 'string' ? nearMiss(value, options) : null
  return near === null ? 'Take one of these.' : `Did you mean “${near}”?`
}

function codeOf(issue: Issue, value: unknown): ProblemCode {
  if (value === undefined) return 'missing'
  if (issue.code === 'invalid_value') return 'not_a_choice'
  if (issue.code === 'too_big' || issue.code === 'too_small') return 'out_of_range'
  return typeof value === 'number' && !Number.isFinite(value) ? 'out_of_range' : 'wrong_type'
}

function hintOf(code: ProblemCode, path: Path, value: unknown): string {
  if (code === 'missing') return 'Add it; it has no default.'
  if (code === 'not_a_choice') return choiceHint(path, value)
  return code === 'out_of_range' ? rangeHint(path, value) : typeHint(path, value)
}

/** Of a choice between an id and a whole object the branch that fits what stands there. */
function unionIssues(issue: Extract<Issue, { code: 'invalid_union' }>, value: unknown): Issue[] {
  const isObject = typeof value === 'object' && value !== null && !Array.isArray(value)
  const branch = isObject ? issue.errors.find((errors) => errors.some((error) => error.path.length > 0 || error.code === 'unrecognized_keys')) : undefined
  return (branch ?? []).map((inner) => ({ ...inner, path: [...issue.path, ...inner.path] }))
}

function fromIssue(issue: Issue, document: unknown): Problem[] {
  const path = issue.path as Path
  const value = path.length === 0 ? document : valueAt(document, path)
  if (issue.code === 'unrecognized_keys') return unknownKeys(path, issue.keys, document)
  const inner = issue.code === 'invalid_union' ? unionIssues(issue, value) : []
  if (inner.length > 0) return inner.flatMap((one) => fromIssue(one, document))
  const code = codeOf(issue, value)
  const architecture = valueAt(document, ['converter', 'architecture'])
  return [{ code, path: dotted(path), value: shortValue(value), allowed: allowedAt(path, architecture), hint: hintOf(code, path, value) }]
}

/** What the schema has to say about a document, as problems a person can mend: the first ones, one more than are told. */
export function problemsFromIssues(issues: readonly Issue[], document: unknown): Problem[] {
  return issues.slice(0, mostProblems + 1).flatMap((issue) => fromIssue(issue, document)).slice(0, mostProblems + 1)
}

/** One problem for each place and kind, the first said. */
export function withoutRepeats(problems: readonly Problem[]): Problem[] {
  const seen = new Map<string, Problem>()
  for (const problem of problems) {
    const id = `${problem.code} ${problem.path}`
    if (!seen.has(id)) seen.set(id, problem)
  }
  return [...seen.values()]
}
