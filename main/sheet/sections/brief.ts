import type { Content, CustomTableLayout, TableCell } from 'pdfmake/interfaces'
import { choices, ledgerItems } from '../../contract/choices'
import { quantities, type Quantity } from '../../contract/quantities'
import { planSchema, type Plan } from '../../contract/plan'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { dash, humanise } from '../format'
import { ruled, size } from '../theme'
import { aside, columnHead, heading, right, subheading, symbol } from '../words'

const glossary: Readonly<Record<string, Quantity | undefined>> = quantities
const options: Readonly<Record<string, { label: string; options: Readonly<Record<string, string>> } | undefined>> = choices

type Row = [string, string, string]

const close: CustomTableLayout = {
  ...ruled, paddingTop: () => 1.4, paddingBottom: () => 1.4, paddingLeft: (i) => (i === 0 ? 0 : 2), paddingRight: (i) => (i === 2 ? 0 : 2),
}

/** Keys in the order of the plan document, whatever order a result carries them in. */
const keyOrder: Readonly<Record<string, readonly string[]>> = {
  converter: Object.keys(planSchema.shape.converter.shape),
  comparator: Object.keys(planSchema.shape.comparator.unwrap().shape),
}

/** What is to be built: every input of the plan, defaults too, in words and units. */
export function brief({ result, width }: SheetContext): Content {
  const { plan } = result
  const left = [group('Converter', rowsOf('converter', plan.converter)), ...architectureGroup(plan)]
  const rightSide = [
    group('Comparator', comparatorRows(plan)),
    group('Budget', rowsOf('budget', plan.budget)),
    group('Process', processRows(plan)),
  ]
  return [
    heading('What is to be built', width, 'The brief, with every default written out.'),
    { columns: [{ width: '*', stack: left }, { width: '*', stack: rightSide }], columnGap: 22 },
    ...overrides(plan, width),
    ...(plan.notes.trim() === '' ? [] : [{ stack: [subheading('Notes'), plan.notes.trim()], unbreakable: plan.notes.length < 1000 }]),
  ]
}

function architectureGroup(plan: Plan): Content[] {
  const { architecture } = plan.converter
  const block = plan.converter[architecture]
  return block ? [group(options['converter.architecture']?.options[architecture] ?? architecture, rowsOf(`converter.${architecture}`, block))] : []
}

function comparatorRows(plan: Plan): Row[] {
  const own = plan.comparator.sizing === 'manual' && plan.comparator.widths
  return [...rowsOf('comparator', plan.comparator), ...(own ? rowsOf('comparator.widths', own) : [])]
}

function processRows(plan: Plan): Row[] {
  const { card } = plan.process
  return [
    ['Card', '', typeof card === 'string' ? card : `${card.title} (own card)`],
    ['Corners', '', plan.corners.join(', ')],
  ]
}

/** The plain fields of one block of the plan; blocks within it are shown as groups of their own. */
function rowsOf(path: string, block: object): Row[] {
  const order = keyOrder[path] ?? Object.keys(block)
  return Object.entries(block)
    .filter(([, value]) => value === null || (value !== undefined && typeof value !== 'object'))
    .sort(([a], [b]) => order.indexOf(a) - order.indexOf(b))
    .map(([key, value]) => rowOf(`${path}.${key}`, key, value))
}

function rowOf(path: string, key: string, value: unknown): Row {
  const quantity = glossary[path]
  if (typeof value === 'boolean') return [humanise(key), '', value ? 'yes' : 'no']
  if (quantity && (typeof value === 'number' || value === null)) {
    return [quantity.label, quantity.symbol, value === null ? quantity.nullMeans ?? dash : formatSi(value, quantity.unit)]
  }
  return [options[path]?.label ?? humanise(key), '', options[path]?.options[String(value)] ?? String(value ?? dash)]
}

function group(title: string, rows: readonly Row[]): Content {
  const isNumber = (value: string): boolean => /^[−\d]/.test(value)
  const body: TableCell[][] = rows.map(([label, sign, value]) => [
    label,
    symbol(sign.toLowerCase() === label.toLowerCase() ? '' : sign),
    isNumber(value) ? right(value) : { text: value, alignment: 'right' },
  ])
  return { stack: [subheading(title), { table: { widths: [90, 26, '*'], body, dontBreakRows: true }, layout: close }], unbreakable: true }
}

function overrides(plan: Plan, width: number): Content[] {
  if (plan.overrides.length === 0) return []
  const body: TableCell[][] = plan.overrides.map(({ item, value, reason }) => [
    `${ledgerItems[item]}, ${item.split('.')[0]}`,
    right(formatSi(value, item.startsWith('power.') ? 'W' : 'm²')),
    reason === '' ? aside('no reason given', { fontSize: size.body }) : reason,
  ])
  const heads = [columnHead('Ledger line'), columnHead('Set to', 'right'), columnHead('Reason')]
  const table: Content = { table: { headerRows: 1, widths: [width * 0.3, 'auto', '*'], body: [heads, ...body], dontBreakRows: true }, layout: ruled }
  return [{ stack: [subheading('Overrides'), table], unbreakable: plan.overrides.length < 12 }]
}
