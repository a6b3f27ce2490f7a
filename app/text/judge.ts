import { parseQuantity } from '../../main/contract/expression'
import { resolutionRange, type Quantity } from '../../main/contract/quantities'
import { formatSi } from '../../main/contract/units'
import { valueAt } from '../state/paths'
import { quantityOf, shortFigure, splitFigure } from './labels'

export type Judged = { readonly ok: true; readonly value: number | null } | { readonly ok: false; readonly message: string }

/** The range a quantity has in this document; that of the resolution depends on the architecture. */
export function rangeOf(path: string, quantity: Quantity, document: unknown): readonly [number, number] {
  const architecture = valueAt(document, 'converter.architecture')
  if (path === 'converter.resolution_bits' && (architecture === 'flash' || architecture === 'sar')) return resolutionRange[architecture]
  return [quantity.min, quantity.max]
}

/** "1 kS/s to 1 TS/s" */
export function rangeText(path: string, document: unknown): string {
  const quantity = quantityOf(path)
  if (!quantity) return ''
  const [low, high] = rangeOf(path, quantity, document)
  return `${shortFigure(low, quantity.unit)} to ${shortFigure(high, quantity.unit, 10)}`
}

const bareNumber = /^(\d+\.?\d*|\.\d+)$/

/** What a bare number was meant to be in a field that is shown with a prefix, where that is in the range. */
function meant(text: string, unit: string, shown: unknown, [low, high]: readonly [number, number]): string {
  if (typeof shown !== 'number' || unit === '' || !bareNumber.test(text)) return ''
  const prefix = splitFigure(formatSi(shown, unit))[1].slice(0, -unit.length)
  const typed = `${text}${prefix === 'µ' ? 'u' : prefix}`
  const reading = prefix === '' ? null : parseQuantity(typed, unit)
  if (!reading?.ok || reading.value < low || reading.value > high) return ''
  return ` Did you mean ${shortFigure(reading.value, unit)}? Type ${typed}.`
}

/**
 * Reads what was typed into a quantity's field: a value within its range, or what is wrong with it.
 *
 * @param shown  the value the field shows, whose prefix a bare number may have been meant with
 */
export function judge(path: string, text: string, document: unknown, shown: unknown = valueAt(document, path)): Judged {
  const quantity = quantityOf(path)
  if (!quantity) return { ok: false, message: 'This field takes no number.' }
  if (quantity.nullMeans !== undefined && /^(auto|null|none|default)$/i.test(text.trim())) return { ok: true, value: null }
  const reading = parseQuantity(text, quantity.unit)
  if (!reading.ok) return reading
  const [low, high] = rangeOf(path, quantity, document)
  if (reading.value < low || reading.value > high) {
    return { ok: false, message: `Not in the range ${rangeText(path, document)}.${meant(text.trim(), quantity.unit, shown, [low, high])}` }
  }
  if (quantity.integer && !Number.isInteger(reading.value)) return { ok: false, message: 'Only whole numbers make sense here.' }
  return { ok: true, value: reading.value }
}

/** A value one step up or down: whole numbers by one, probabilities by a decade, others in their second digit; large: ten such steps. */
export function stepped(path: string, value: number, direction: 1 | -1, large: boolean, document: unknown): number {
  const quantity = quantityOf(path)
  if (!quantity) return value
  const [low, high] = rangeOf(path, quantity, document)
  return Math.min(high, Math.max(low, rawStep(quantity, value, direction, large)))
}

function rawStep(quantity: Quantity, value: number, direction: 1 | -1, large: boolean): number {
  const count = large ? 10 : 1
  if (quantity.integer) return Math.round(value) + direction * (large ? 4 : 1)
  if (quantity.unit === '/sample') return Number((value * 10 ** (direction * (large ? 3 : 1))).toPrecision(6))
  if (value === 0) return direction > 0 ? Math.max(quantity.min, quantity.max * 1e-9) : 0
  const below = direction < 0 && Math.abs(Math.log10(Math.abs(value)) % 1) < 1e-9 ? 1 : 0
  const unit = 10 ** (Math.floor(Math.log10(Math.abs(value)) + 1e-9) - 1 - below)
  return Number((Math.round(value / unit + direction * count) * unit).toPrecision(12))
}
