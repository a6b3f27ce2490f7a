import type { Content, TableCell } from 'pdfmake/interfaces'
import type { ComparatorEntry } from '../../contract/result'
import { columnsFit, columnWidths } from '../columns'
import type { SheetContext } from '../context'
import { fold, type Fold } from '../fold'
import { dash } from '../format'
import { noUse, notReached } from '../measures'
import { dense } from '../theme'
import { aside, columnHead, heading, subheading } from '../words'
import { furtherColumns, placeColumns, useColumns, type Column } from './comparator-columns'

const between = 5
const longest = 100

/** Every comparator: limits, what is reached, use and the tightest; neighbours that read alike are folded. */
export function comparators({ result: { comparators: all }, width }: SheetContext): Content {
  const [place, uses, more] = [placeColumns(all), useColumns(all), furtherColumns(all)]
  if (foldsOf(all, [...place, ...uses, ...more]).length > longest) return longTable(all, width)
  const together = columnsFit([...place, ...uses, ...more].map((column) => measured(column, all)), width, between)
  const second = more.length === 0 || together ? [] : [subheading('Further limits and figures that differ'), table(all, [...place, ...more], width)]
  return [heading('Each comparator', width, note, true), table(all, [...place, ...uses, ...(together ? more : [])], width), ...reasons(all), ...second]
}

const note = 'Reached of limit, each column in the unit of its head. Under it the use, reached ÷ limit, with a tick at 1; ◥ marks what is over its limit. '
  + 'Neighbours that are equal to the digits shown are folded into one row.'

/** A long bank: only what differs, several comparators side by side; what is the same stands with the common limits. */
function longTable(all: readonly ComparatorEntry[], width: number): Content {
  const columns = [...placeColumns(all), ...[...useColumns(all), ...furtherColumns(all)].filter((column) => differs(column, all))]
  const groups = foldsOf(all, columns)
  const abreast = [3, 2].find((count) => columnsFit(columns.map((column) => fitted(column, groups)), setWidth(width, count), between)) ?? 1
  const rest = 'Columns that are the same for all are left out: see the common limits.'
  return [heading('Each comparator', width, `${note} ${rest}`, true), table(all, columns, width, abreast), ...reasons(all)]
}

/** Between comparators side by side [pt], and what is left for each. */
const apart = 12
const setWidth = (width: number, abreast: number): number => (width - (abreast - 1) * apart) / abreast

const single = (entry: ComparatorEntry) => ({ first: entry, last: entry, count: 1 })
const measured = (column: Column, all: readonly ComparatorEntry[]) => ({ ...column, texts: all.map((entry) => column.text(single(entry))) })
const fitted = (column: Column, groups: readonly Fold<ComparatorEntry>[]) => ({ ...column, texts: groups.map((group) => column.text(group)) })
const differs = (column: Column, all: readonly ComparatorEntry[]): boolean => new Set(measured(column, all).texts).size > 1

function foldsOf(all: readonly ComparatorEntry[], columns: readonly Column[]): Fold<ComparatorEntry>[] {
  return fold(all, (entry) => columns.filter((column) => column.folds).map((column) => column.text(single(entry))).join('|'))
}

function table(all: readonly ComparatorEntry[], columns: readonly Column[], width: number, abreast = 1): Content {
  const groups = foldsOf(all, columns)
  const widths = columnWidths(columns.map((column) => fitted(column, groups)), setWidth(width, abreast), between)
  const cells = groups.map((group) => columns.map((column, i) => column.cell(group, widths[i]) as TableCell))
  const body = Array.from({ length: Math.ceil(cells.length / abreast) }, (_, row) =>
    Array.from({ length: abreast }, (_unused, i) => cells[row * abreast + i] ?? columns.map((): TableCell => '')).flat())
  const times = <T>(make: () => T[]): T[] => Array.from({ length: abreast }, make).flat()
  const heads = times(() => columns.map(({ head }) => columnHead(head)))
  return {
    table: { headerRows: 1, widths: times(() => widths), body: [heads, ...body], dontBreakRows: true },
    layout: abreast > 1 ? apartEvery(columns.length) : dense,
  }
}

/** More room between comparators side by side. */
const apartEvery = (count: number): typeof dense =>
  ({ ...dense, paddingLeft: (i) => (i === 0 ? 0 : i % count === 0 ? apart - between / 2 : between / 2) })

/** Why a dash stands in the table. */
function reasons(all: readonly ComparatorEntry[]): Content[] {
  const unevaluated = all.some((entry) => entry.reached.delay_s === null)
  const unheld = all.some((entry) => entry.reached.delay_s !== null && Object.values(entry.use).includes(null))
  return [...(unevaluated ? [notReached] : []), ...(unheld ? [noUse] : [])].map((text) => aside(`${dash}  ${text}`, { margin: [0, 4, 0, 0] }))
}
