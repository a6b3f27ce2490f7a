import type { Problem } from '../contract/errors'
import { nearMiss } from './near-miss'
import { planPaths, schemaAt, type Path } from './plan-schema'
import { shortValue } from './problems'

/** One value to be put into a document before it is checked. */
export interface Setting { readonly path: string; readonly value: unknown }

type Container = Readonly<Record<string | number, unknown>>

const stepsOf = (path: string): Path => path.split('.').map((step) => (/^\d{1,4}$/.test(step) ? Number(step) : step))

function isContainer(value: unknown, step: string | number): value is Container {
  return typeof value === 'object' && value !== null && Array.isArray(value) === (typeof step === 'number')
}

function unknown({ path, value }: Setting): Problem {
  const near = planPaths.find((known) => known.endsWith(`.${path}`)) ?? nearMiss(path, planPaths)
  return {
    code: 'unknown_key', path, value: shortValue(value), allowed: 'a path of the plan, as converter.resolution_bits',
    hint: near === null ? 'Look for the right path in the JSON Schema.' : `Did you mean “${near}”?`,
  }
}

/** What stands in the way of a path: the first value on it that cannot hold the next step. */
function obstacle(document: unknown, [step, ...more]: Path): { found: unknown } | null {
  if (step === undefined) return null
  if (document === undefined) return typeof step === 'number' && step > 0 ? { found: [] } : obstacle(undefined, more)
  if (!isContainer(document, step) || (Array.isArray(document) && Number(step) > document.length)) return { found: document }
  return obstacle(Object.hasOwn(document, step) ? document[step] : undefined, more)
}

function blocked({ path }: Setting, found: unknown): Problem {
  return { code: 'wrong_type', path, value: shortValue(found), allowed: 'a key of an object, or the next position of a list', hint: 'Set what holds it as a whole first.' }
}

/** A copy with the value at the path; what is missing on the way is made. */
function put(document: unknown, [step, ...more]: Path, value: unknown): unknown {
  if (step === undefined) return value
  if (typeof step === 'number') {
    const list = Array.isArray(document) ? [...(document as unknown[])] : []
    list[step] = put(list[step], more, value)
    return list
  }
  const object = (document ?? {}) as Readonly<Record<string, unknown>>
  const inner = Object.hasOwn(object, step) ? object[step] : undefined
  return Object.fromEntries([...Object.entries(object), [step, put(inner, more, value)]])
}

/**
 * Puts values into a raw document, one after the other; the document itself is not changed.
 *
 * @returns the new document, and a problem for each path that a plan does not have or that leads nowhere
 */
export function setPaths(document: unknown, settings: readonly Setting[]): { document: unknown; problems: Problem[] } {
  const problems: Problem[] = []
  const changed = settings.reduce<unknown>((now, setting) => {
    const steps = stepsOf(setting.path)
    const inTheWay = obstacle(now, steps)
    if (setting.path === '' || schemaAt(steps) === null) problems.push(unknown(setting))
    else if (inTheWay) problems.push(blocked(setting, inTheWay.found))
    else return put(now, steps, setting.value)
    return now
  }, document)
  return { document: changed, problems }
}
