import type { Working } from '../../../contract/result'
import { digits } from '../digits'

/** Writes a working; `numbers` is the formula with its numbers in, evaluable as it stands. */
export const working = (
  id: string, title: string, formula: string, numbers: string, value: number | null, unit: string, source: string,
): Working => ({ id, title, formula, numbers, value, unit, source })

/** Template for `numbers`: every inserted number with ten significant digits. */
export const numbers = (parts: TemplateStringsArray, ...values: number[]): string =>
  parts.reduce((text, part, i) => text + part + (i < values.length ? inserted(values[i], text + part) : ''), '')

/** Negative numbers in brackets, except at the very start. */
function inserted(value: number, before: string): string {
  const text = digits(value)
  return text.startsWith('-') && before.trim() !== '' ? `(${text})` : text
}
