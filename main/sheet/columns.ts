import { formatSi } from '../contract/units'
import { dash, plain } from './format'

/** The unit that a whole column is in: its name, the SI unit it is made of, and what an SI value is multiplied by. */
export interface Scale {
  readonly unit: string
  readonly name: string
  readonly factor: number
}

/** The unit in which the largest value of a column has one to three digits before its point; areas up to four. */
export function scaleOf(values: readonly (number | null)[], unit: string): Scale {
  const largest = values.reduce((most: number, value) => Math.max(most, Math.abs(value ?? 0)), 0)
  if (largest === 0) return { unit, name: unit, factor: 1 }
  if (unit === 'm²' && largest < 1e-8) return { unit, name: 'µm²', factor: 1e12 }
  const [number, name = unit] = formatSi(largest, unit).split(' ')
  return { unit, name, factor: 10 ** Math.round(Math.log10(Number(number) / largest)) }
}

/** A value in the unit of its column; one too small for that brings a unit of its own. */
export function inScale(value: number | null, { unit, factor }: Scale, digits = 3): string {
  if (value === null) return dash
  return value !== 0 && Math.abs(value * factor) < 1e-4 ? formatSi(value, unit, digits) : plain(value * factor, digits)
}

/** `188 of 233`, in the unit of the column. */
export const pairInScale = (reached: number | null, limit: number | null, scale: Scale): string => `${inScale(reached, scale)} of ${inScale(limit, scale)}`

/** What a column has to hold: the head and the texts under it, and `least` where it needs more. */
export interface Fitted {
  readonly head: string
  readonly texts: readonly string[]
  readonly least?: number
}

/** Width of a figure in the tables' size, and of a letter of their heads [pt]. */
const figureWidth = 4.18
const letterWidth = 3.9

/**
 * Widths of columns [pt]: what each needs for its longest text and the longest word of its head, and an equal part of what is left.
 *
 * @param columns  what each has to hold
 * @param total    width of the table [pt], the space between columns included
 * @param between  space between two columns [pt]
 */
export function columnWidths(columns: readonly Fitted[], total: number, between: number): number[] {
  const needed = columns.map(({ head, texts, least = 0 }) => Math.max(
    least, ...texts.map((text) => text.length * figureWidth), ...head.split(' ').map((word) => word.length * letterWidth),
  ))
  const left = total - between * (columns.length - 1) - needed.reduce((sum, width) => sum + width, 0)
  return needed.map((width) => width + Math.max(0, left) / columns.length)
}

/** Whether the columns fit at all. */
export function columnsFit(columns: readonly Fitted[], total: number, between: number): boolean {
  const widths = columnWidths(columns, 0, between)
  return widths.reduce((sum, width) => sum + width, 0) + between * (columns.length - 1) <= total
}
