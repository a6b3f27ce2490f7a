import type { Card } from '../contract/cards'
import { fail, problemText, succeed, type Failure, type Problem, type Reply } from '../contract/errors'
import { planSchema, planSchemaId, type ParsedPlan, type Plan } from '../contract/plan'
import { builtInCard } from './cards'
import { completePlan } from './complete-plan'
import { crossCheck } from './cross-checks'
import { decodeDocument } from './decode'
import { migrate } from './migrations/migrate'
import { dotted, mostProblems } from './path-text'
import { problemsFromIssues, shortValue, withoutRepeats } from './problems'
import { lineAndColumn, scanJson } from './scan-json'
import { setPaths, type Setting } from './set-path'

/** A plan that was read: `document` as written, `plan` with every default filled in. */
export interface ReadPlan {
  readonly plan: Plan
  readonly card: Card
  readonly document: unknown
  /** What was changed or dropped on the way in, for the person to see. */
  readonly changes: string[]
}

const deepest = 64

function refuse(problems: readonly Problem[]): Failure {
  const [first] = problems
  if (problems.length === 1) return fail('bad_document', problemText(first), problems)
  const many = problems.length > mostProblems ? `More than ${mostProblems} problems, of which these are told` : `${problems.length} problems`
  return fail('bad_document', `${many}. First: ${problemText(first)}`, problems.slice(0, mostProblems))
}

function wholeDocument(code: Problem['code'], value: string, allowed: string, hint: string): Problem {
  return { code, path: '', value, allowed, hint }
}

const tooDeep = (): Problem =>
  wholeDocument('too_deep', `more than ${deepest} levels`, `at most ${deepest} levels of brackets`, 'A plan needs no more than five; is this the right file?')

function isTooDeep(value: unknown, room = deepest): boolean {
  if (typeof value !== 'object' || value === null) return false
  return room === 0 || Object.values(value).some((inner) => isTooDeep(inner, room - 1))
}

/** Documents of another kind or of a later version, where what else is wrong would only mislead. */
function anotherKind(document: Readonly<Record<string, unknown>>): Problem[] {
  const { schema } = document
  const version = typeof schema === 'string' ? /^latchwright\.plan\/(\d{1,9})$/.exec(schema)?.[1] : undefined
  if (version !== undefined && Number(version) > 1) {
    return [{ code: 'newer_than_program', path: 'schema', value: shortValue(schema), allowed: planSchemaId, hint: 'Open it with a newer Latchwright.' }]
  }
  if (typeof schema !== 'string' || !schema.startsWith('latchwright.result/')) return []
  return [{ code: 'not_a_choice', path: 'schema', value: shortValue(schema), allowed: planSchemaId, hint: 'This is a result; its plan stands under “plan”.' }]
}

const brokenText = /\p{Surrogate}/u

/** Halves of characters cannot be written back, so they are refused where they stand: the first ones, one more than are told. */
function brokenTexts(value: unknown, path: readonly string[] = [], found: Problem[] = []): Problem[] {
  if (typeof value === 'string' && brokenText.test(value)) {
    found.push({
      code: 'wrong_type', path: dotted(path), value: 'text with half a character', allowed: 'whole characters', hint: 'Take out the lone \\ud800 … \\udfff escape.',
    })
  }
  if (typeof value !== 'object' || value === null) return found
  for (const [key, inner] of Object.entries(value)) {
    if (found.length > mostProblems) break
    brokenTexts(inner, [...path, key], found)
  }
  return found
}

function cardOf(parsed: ParsedPlan): Card | null {
  const { card } = parsed.process
  return typeof card === 'string' ? builtInCard(card) : card
}

function check(value: unknown, known: readonly Problem[], changes: readonly string[]): Reply<ReadPlan> {
  if (isTooDeep(value)) return refuse([tooDeep()])
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return refuse([...known, wholeDocument('wrong_type', shortValue(value), 'an object', 'A plan starts with {"schema": "latchwright.plan/1", …')])
  }
  const kind = anotherKind(value as Record<string, unknown>)
  if (kind.length > 0) return refuse(kind)
  const migrated = migrate(value as Record<string, unknown>)
  const { document } = migrated
  const parsed = planSchema.safeParse(document)
  const issues = parsed.success ? [] : problemsFromIssues(parsed.error.issues, document)
  const problems = withoutRepeats([...known, ...issues, ...crossCheck(document), ...brokenTexts(document)])
  const card = parsed.success ? cardOf(parsed.data) : null
  if (problems.length > 0 || !parsed.success || !card) return refuse(problems)
  return succeed({ plan: completePlan(parsed.data, card), card, document, changes: [...changes, ...migrated.changes] })
}

function repeatedKey(path: string): Problem {
  return { code: 'repeated_key', path, value: '', allowed: 'every key once', hint: 'Take out all but one; programs differ in which they believe.' }
}

/** Text or bytes of a JSON document, parsed, with the problems that only the text shows. */
export function readJson(input: string | Uint8Array): Reply<{ value: unknown; problems: Problem[]; changes: string[] }> {
  const decoded = decodeDocument(input)
  if (!decoded.ok) return refuse([decoded.problem])
  const { text, changes } = decoded
  const scan = scanJson(text, deepest)
  if (scan.tooDeep) return refuse([tooDeep()])
  if (scan.broken) {
    const { line, column } = lineAndColumn(text, scan.broken.at)
    const found = text.slice(scan.broken.at, scan.broken.at + 20).split('\n')[0]
    const where = `line ${line}, column ${column}`
    return refuse([wholeDocument('not_json', found === '' || /NaN|Infinity/.test(found) ? where : `${where}: ${shortValue(found)}`, scan.broken.allowed, scan.broken.hint)])
  }
  return succeed({ value: JSON.parse(text) as unknown, problems: scan.repeated.map(repeatedKey), changes })
}

/**
 * A plan from the text or bytes of its file.
 *
 * @param input     JSON in UTF-8
 * @param settings  values put into the raw document before it is checked (the command line's `--set`)
 * @returns         the plan; or every problem of the document at once, error code `bad_document`
 */
export function readPlan(input: string | Uint8Array, settings: readonly Setting[] = []): Reply<ReadPlan> {
  const json = readJson(input)
  if (!json.ok) return json
  const { value, problems, changes } = json.value
  const set = setPaths(value, settings)
  return check(set.document, [...problems, ...set.problems], changes)
}

/** The same for a document that is a value already. */
export function validatePlan(value: unknown): Reply<ReadPlan> {
  return check(value, [], [])
}
