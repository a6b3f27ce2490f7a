import { resolutionRange, quantities, type Quantity } from '../contract/quantities'
import { formatExact } from '../contract/units'
import { builtInCards } from './cards'
import { schemaAt, variants, type Path, type SchemaNode } from './plan-schema'

/** The glossary entry of a path, or null. */
export function quantityAt(path: string): Quantity | null {
  return Object.hasOwn(quantities, path) ? (quantities as Record<string, Quantity>)[path] : null
}

function withUnit(value: number, unit: string): string {
  const shown = formatExact(value, unit)
  return unit === '' || shown.startsWith(`${value} `) ? shown : `${value} (${shown})`
}

/** Range of a numeric field; that of the resolution depends on the architecture. */
function rangeText(path: string, quantity: Quantity, architecture: unknown): string {
  const own = path === 'converter.resolution_bits' && (architecture === 'flash' || architecture === 'sar') ? resolutionRange[architecture] : null
  const [min, max] = own ?? [quantity.min, quantity.max]
  const range = `${withUnit(min, quantity.unit)} to ${withUnit(max, quantity.unit)}`
  const whole = quantity.integer ? 'a whole number from ' : ''
  const empty = quantity.nullMeans === undefined ? '' : `, or null (${quantity.nullMeans})`
  return `${whole}${range}${own ? ` with architecture ${String(architecture)}` : ''}${empty}`
}

function numberText({ minimum, exclusiveMinimum, maximum }: SchemaNode): string {
  const from = exclusiveMinimum !== undefined ? `more than ${exclusiveMinimum}` : `${minimum ?? 'any'}`
  return `a number, ${from} to ${maximum ?? 'any'}`
}

function nodeText(node: SchemaNode): string {
  if (node.const !== undefined) return JSON.stringify(node.const)
  if (node.enum) return node.enum.map((option) => JSON.stringify(option)).join(', ')
  switch (node.type) {
    case 'string': return `text of ${node.minLength ?? 0} to ${node.maxLength ?? 'any number of'} characters`
    case 'number': case 'integer': return numberText(node)
    case 'boolean': return 'true or false'
    case 'array': return `a list of ${node.minItems ?? 0} to ${node.maxItems ?? 'any number of'} entries`
    case 'null': return 'null'
    default: return `an object with ${Object.keys(node.properties ?? {}).join(', ')}`
  }
}

/**
 * What may stand at a place of a plan, in words.
 *
 * @param path          keys and positions from the root
 * @param architecture  what the plan says it is; the range of the resolution follows it
 */
export function allowedAt(path: Path, architecture: unknown): string {
  const dotted = path.join('.')
  if (dotted === 'process.card') return `the id of a card of the program (${builtInCards.map((card) => card.id).join(', ')}), or a whole card`
  const quantity = quantityAt(dotted)
  if (quantity) return rangeText(dotted, quantity, architecture)
  const node = schemaAt(path)
  return node ? variants(node).map(nodeText).join(', or ') : 'nothing'
}
