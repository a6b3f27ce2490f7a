import { choices, limitNames, type Choice, type ChoicePath, type LimitName } from '../../main/contract/choices'
import { quantities, type Quantity, type QuantityPath } from '../../main/contract/quantities'
import type { Result } from '../../main/contract/result'
import { formatSi } from '../../main/contract/units'

/** Fields of the brief that are neither quantities nor choices. */
export interface PlainField {
  readonly label: string
  readonly help: string
  readonly kind: 'text' | 'long_text' | 'switch' | 'card' | 'corners' | 'overrides'
  readonly longest?: number
}

export const plainFields: Readonly<Record<string, PlainField>> = {
  title: { label: 'Title', help: 'Heads the sheet and names the file.', kind: 'text', longest: 200 },
  author: { label: 'Author', help: 'Who answers for the plan; printed on the sheet.', kind: 'text', longest: 200 },
  revision: { label: 'Revision', help: 'A letter or number of your own, printed on the sheet.', kind: 'text', longest: 40 },
  notes: { label: 'Notes', help: 'Whatever a reader of the plan should know.', kind: 'long_text', longest: 20_000 },
  'converter.flash.front_sampler': { label: 'Front sampler', kind: 'switch',
    help: 'One sampler holds the input for the whole bank. Without it every comparator samples for itself, and skew counts.' },
  'process.card': { label: 'Process card', help: 'The set of process parameters: devices, capacitances, logic and layout.', kind: 'card' },
  corners: { label: 'Corners', kind: 'corners',
    help: 'Where the design has to hold: the card as it is, slow at 0.9 and fast at 1.1 of the supply, each hot and cold.' },
  overrides: { label: 'Overrides', help: 'Figures of your own in place of lines of the ledger.', kind: 'overrides' },
}

export const quantityOf = (path: string): Quantity | null =>
  (Object.hasOwn(quantities, path) ? quantities[path as QuantityPath] : null)
export const choiceOf = (path: string): Choice | null => (Object.hasOwn(choices, path) ? choices[path as ChoicePath] : null)

/** The label of a field as it stands beside it. */
export function labelOf(path: string): string {
  return quantityOf(path)?.label ?? choiceOf(path)?.label ?? plainFields[path]?.label ?? (path === '' ? 'Document' : path)
}

/** A label within a sentence: abbreviations keep their capitals. */
export const lowered = (label: string): string => (/^.[^A-Z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label)

/** A value of the brief as a person reads it. */
export function shownValue(path: string, value: unknown): string {
  const quantity = quantityOf(path)
  if (quantity && typeof value === 'number') return shortFigure(value, quantity.unit)
  const choice = choiceOf(path)
  if (choice && typeof value === 'string') return lowered(choice.options[value] ?? value)
  if (typeof value === 'boolean') return value ? 'on' : 'off'
  if (typeof value === 'string') return value.length > 24 ? `${value.slice(0, 23)}…` : value
  return value === null || value === undefined ? 'default' : JSON.stringify(value)
}

/** The name of the undo step that sets a field. */
export const stepName = (path: string, value: unknown): string => `${lowered(labelOf(path))} ${shownValue(path, value)}`.trim()

/** A figure without the zeros that only fill it up: "2 GS/s", "66.7 mV". */
export function shortFigure(value: number, unit: string, digits = 4): string {
  return formatSi(value, unit, digits).replace(/^([−-]?\d+)\.(\d*?)0+(?=$|[ e])/, (_all, whole: string, rest: string) =>
    (rest === '' ? whole : `${whole}.${rest}`))
}

/** A formatted figure as number and unit. */
export function splitFigure(text: string): readonly [string, string] {
  const space = text.indexOf(' ')
  return space < 0 ? [text, ''] : [text.slice(0, space), text.slice(space + 1)]
}

export const ledgerUnit = (item: string): string => (item.startsWith('power.') ? 'W' : 'm²')

/** Beyond this ratio two values are not read in the same unit. */
const farApart = 30

/** "188 of 233 ps": both in the same unit, so that they can be compared by eye; "20.1 pV of 7.50 mV" where they are far apart. */
export function reachedOfLimit(reached: number | null, limit: number | null, unit: string): string {
  if (limit === null) return formatSi(reached, unit)
  const [small, large] = [Math.abs(reached ?? 0), Math.abs(limit)].toSorted((a, b) => a - b)
  if (reached === null || large > small * farApart) return `${formatSi(reached, unit)} of ${formatSi(limit, unit)}`
  const [figure, shown] = splitFigure(formatSi(large, unit, 9))
  const scale = Number(figure) / large
  return `${figureAt(reached * scale)} of ${figureAt(limit * scale)} ${shown}`
}

function figureAt(value: number): string {
  const size = Math.abs(value)
  return value.toFixed(size >= 99.95 ? 0 : size >= 9.995 ? 1 : 2).replace('-', '−')
}

/** "104 %", of what is said beside it. */
export const percent = (use: number | null): string =>
  (use === null ? '—' : use >= 9.995 ? `${use.toPrecision(3).replace(/e.*/, '')} ×` : `${Math.round(use * 100)} %`)

/** The limits as they are read in a sentence. */
export const limitPhrase = (name: LimitName): string => `${lowered(limitNames[name])} limit`

/** Where power, budget and predicted resolution are of: "at fast · 0.99 V · 125 °C, the corner of the largest power". */
export function cornerShown({ corners, ledger }: Result): string {
  const corner = corners.find(({ power_w }) => power_w === ledger.power_w)
  return corner ? `at ${corner.name}${corners.length > 1 ? ', the corner of the largest power' : ''}` : ''
}
