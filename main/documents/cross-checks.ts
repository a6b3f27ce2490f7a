import { choices, laterValues, type Choice } from '../contract/choices'
import type { Problem } from '../contract/errors'
import { resolutionRange } from '../contract/quantities'
import { allowedAt } from './allowed'
import { builtInCard, builtInCards } from './cards'
import { nearMiss } from './near-miss'
import { schemaAt, type Path } from './plan-schema'
import { shortValue, valueAt } from './problems'

/*
 * What no single field can know. All of it reads the document as written, so that it is said
 * together with what the schema says, however broken the rest is.
 */

const steps = (path: string): Path => path.split('.')
const at = (document: unknown, path: string): unknown => valueAt(document, steps(path))

/** The block of the other architecture is kept and has no effect, so its options need not be built. */
function hasEffect(path: string, architecture: unknown): boolean {
  if (path.startsWith('converter.flash.')) return architecture !== 'sar'
  return path.startsWith('converter.sar.') ? architecture !== 'flash' : true
}

function laterOptions(document: unknown, architecture: unknown): Problem[] {
  return (Object.entries(choices) as [string, Choice][]).flatMap(([path, { options, later }]) => {
    const value = at(document, path)
    if (!later || typeof value !== 'string' || !later.includes(value) || !hasEffect(path, architecture)) return []
    const ready = Object.keys(options).filter((option) => !later.includes(option))
    return [notYet(path, value, ready.map((option) => JSON.stringify(option)).join(', '), 'This option is part of the document but not built yet; take one of these.')]
  })
}

function laterNumbers(document: unknown, architecture: unknown): Problem[] {
  return laterValues.flatMap(({ path, later, allowed, hint }) => {
    const value = at(document, path)
    return later(value, document) && hasEffect(path, architecture) ? [notYet(path, value, allowed, hint)] : []
  })
}

function notYet(path: string, value: unknown, allowed: string, hint: string): Problem {
  return { code: 'not_available_yet', path, value: shortValue(value), allowed, hint }
}

function resolution(document: unknown, architecture: unknown): Problem[] {
  if (architecture !== 'flash' && architecture !== 'sar') return []
  const path = 'converter.resolution_bits'
  const value = at(document, path)
  const [min, max] = resolutionRange[architecture]
  if (typeof value !== 'number' || (value >= min && value <= max)) return []
  return [{
    code: 'out_of_range', path, value: shortValue(value), allowed: allowedAt(steps(path), architecture),
    hint: 'Change the resolution or the architecture.',
  }]
}

function redundancy(document: unknown): Problem[] {
  const path = 'converter.sar.redundant_cycles'
  const [value, bits] = [at(document, path), at(document, 'converter.resolution_bits')]
  if (typeof value !== 'number' || typeof bits !== 'number' || value < bits) return []
  return [{
    code: 'out_of_range', path, value: shortValue(value), allowed: `a whole number from 0 to ${bits - 1}, fewer than the bits`,
    hint: 'Plan fewer redundant cycles, or more bits.',
  }]
}

function widths(document: unknown): Problem[] {
  if (at(document, 'comparator.sizing') !== 'manual') return []
  const given = at(document, 'comparator.widths')
  if (given === undefined) return [missing('comparator.widths', 'Manual sizing needs the widths; add them, or take automatic sizing.')]
  if (at(document, 'comparator.topology') !== 'double_tail' || typeof given !== 'object') return []
  return ['second_tail_m', 'second_input_m'].map((key) => `comparator.widths.${key}`)
    .filter((path) => at(document, path) === undefined)
    .map((path) => missing(path, 'Manual sizing of a double tail needs it.'))
}

function missing(path: string, hint: string): Problem {
  const allowed = schemaAt(steps(path)) ? allowedAt(steps(path), undefined) : ''
  return { code: 'missing', path, value: '', allowed, hint }
}

function card(document: unknown): Problem[] {
  const path = 'process.card'
  const id = at(document, path)
  if (typeof id !== 'string' || id === '' || builtInCard(id)) return []
  const ids = builtInCards.map((known) => known.id)
  const near = nearMiss(id, ids)
  return [{
    code: 'unknown_card', path, value: shortValue(id), allowed: ids.join(', '),
    hint: near === null ? 'Take one of these, or put a whole card in its place.' : `Did you mean “${near}”?`,
  }]
}

/** Problems between fields, and of options that are not built yet. */
export function crossCheck(document: unknown): Problem[] {
  const architecture = at(document, 'converter.architecture')
  return [
    ...resolution(document, architecture), ...(architecture === 'sar' ? redundancy(document) : []), ...widths(document), ...card(document),
    ...laterOptions(document, architecture), ...laterNumbers(document, architecture),
  ]
}
