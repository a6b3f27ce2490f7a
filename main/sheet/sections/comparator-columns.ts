import type { Content } from 'pdfmake/interfaces'
import type { ComparatorEntry, Limits, Reached } from '../../contract/result'
import { inScale, pairInScale, scaleOf } from '../columns'
import { rangeOf, type Fold } from '../fold'
import { dash, useOf } from '../format'
import { useMeasures, type UseMeasure } from '../measures'
import { ink, size } from '../theme'
import { figure } from '../words'
import { useBar } from './use-bar'

/** A column of the table of comparators. */
export interface Column {
  readonly head: string
  /** What one comparator would show; neighbours are folded when all columns with `folds` show the same. */
  readonly text: (group: Fold<ComparatorEntry>) => string
  readonly folds: boolean
  readonly cell: (group: Fold<ComparatorEntry>, width: number) => Content
  readonly least?: number
}

const face = { fontSize: size.table }
const colors: Partial<Record<UseMeasure['use'], string>> = { time: ink.time, noise: ink.noise, offset: ink.offset }

function simple(head: string, folds: boolean, text: Column['text']): Column {
  return { head, folds, text, cell: (group) => figure(text(group), face) }
}

const differ = <T>(values: readonly T[]): boolean => values.some((value) => value !== values[0])

/** Where a comparator stands: its lane, its number and threshold, or its cycle; and its common mode where that differs. */
export function placeColumns(all: readonly ComparatorEntry[]): Column[] {
  const columns: Column[] = differ(all.map((entry) => entry.lane)) ? [simple('Lane', true, ({ first }) => String(first.lane))] : []
  if (all[0].cycle === null) columns.push(simple('No.', false, ({ first, last }) => rangeOf(first.index, last.index)), threshold(all))
  else columns.push(simple('Cycle', false, ({ first, last }) => rangeOf(first.cycle ?? 0, last.cycle ?? 0)))
  if (differ(all.map((entry) => entry.common_mode_v))) columns.push(commonMode(all))
  return columns
}

function threshold(all: readonly ComparatorEntry[]): Column {
  const scale = scaleOf(all.map((entry) => entry.threshold_v), 'V')
  const digits = Math.max(3, Math.ceil(Math.log10(all.length)))
  return simple(`Threshold, ${scale.name}`, false, ({ first, last }) => {
    const [from, to] = [inScale(first.threshold_v, scale, digits), inScale(last.threshold_v, scale, digits)]
    return from === to ? from : `${from} … ${to}`
  })
}

function commonMode(all: readonly ComparatorEntry[]): Column {
  const scale = scaleOf(all.map((entry) => entry.common_mode_v), 'V')
  return simple(`Common mode, ${scale.name}`, true, ({ first }) => inScale(first.common_mode_v, scale))
}

/** The six uses: reached of limit over a bar, and the tightest of them. */
export function useColumns(all: readonly ComparatorEntry[]): Column[] {
  return [...useMeasures(all).map((measure) => useColumn(all, measure)), tightest(all)]
}

function useColumn(all: readonly ComparatorEntry[], { use, reached, limit, label, unit }: UseMeasure): Column {
  const scale = scaleOf(all.map((entry) => entry.limits[limit]), unit)
  const pair = (entry: ComparatorEntry): string => pairInScale(entry.reached[reached], entry.limits[limit], scale)
  return {
    head: `${label}, ${scale.name}`, folds: true, least: 44,
    text: ({ first }) => pair(first),
    cell: ({ first }, width) => useCell(pair(first), first.use[use], colors[use] ?? ink.muted, width),
  }
}

function useCell(text: string, use: number | null, color: string, width: number): Content {
  const over = use !== null && use > 1
  const style = over ? { ...face, color: ink.over, bold: true } : face
  const shown = figure(over ? `${useOf(use)}◥` : useOf(use), { ...style, width: 23 })
  const bar: Content = { canvas: useBar(use, Math.min(width - 24, 40), color), margin: [0, 3.2, 0, 0] }
  return { stack: [figure(text, style), { columns: [shown, bar], columnGap: 1 }] }
}

function tightest(all: readonly ComparatorEntry[]): Column {
  const names = new Map(useMeasures(all).map(({ use, label }) => [use, label]))
  const text: Column['text'] = ({ first }) => (first.tightest === null ? dash : names.get(first.tightest) ?? dash)
  return { head: 'Tightest', folds: true, text, cell: (group) => ({ text: text(group), fontSize: size.table, noWrap: true }) }
}

interface Further { readonly head: string; readonly unit: string; readonly reached: keyof Reached | null; readonly limit: keyof Limits | null }

const further: readonly Further[] = [
  { head: 'Overdrive', unit: 'V', reached: null, limit: 'overdrive_v' },
  { head: 'Regeneration τ', unit: 's', reached: 'tau_s', limit: 'tau_s' },
  { head: 'Integration t₀', unit: 's', reached: 'integration_s', limit: 'integration_s' },
  { head: 'Raw offset σ', unit: 'V', reached: 'offset_v', limit: null },
  { head: 'Offset left', unit: 'V', reached: 'residual_v', limit: 'offset_v' },
  { head: 'Skew limit', unit: 's', reached: null, limit: 'skew_s' },
  { head: 'Aperture', unit: 's', reached: 'aperture_s', limit: null },
  { head: 'Energy', unit: 'J', reached: 'energy_j', limit: null },
  { head: 'Area', unit: 'm²', reached: 'area_m2', limit: null },
]

/** The other limits and figures, as far as they differ along the bank; those that do not stand with the common limits. */
export function furtherColumns(all: readonly ComparatorEntry[]): Column[] {
  const raw = all.every((entry) => entry.reached.offset_v === entry.reached.residual_v)
  const shown = new Set([...useMeasures(all).map((measure) => measure.reached), ...(raw ? ['offset_v'] : [])])
  return further.filter(({ reached }) => reached === null || !shown.has(reached)).map((one) => furtherColumn(all, one))
    .filter((column) => differ(all.map((entry) => column.text({ first: entry, last: entry, count: 1 }))))
}

function furtherColumn(all: readonly ComparatorEntry[], { head, unit, reached, limit }: Further): Column {
  const scale = scaleOf(all.flatMap((entry) => [limit === null ? null : entry.limits[limit], reached === null ? null : entry.reached[reached]]), unit)
  return simple(`${head}, ${scale.name}`, true, ({ first }) => {
    if (limit === null) return inScale(reached === null ? null : first.reached[reached], scale)
    return reached === null ? inScale(first.limits[limit], scale) : pairInScale(first.reached[reached], first.limits[limit], scale)
  })
}
