import { scaleLinear } from 'd3-scale'
import type { ComparatorEntry } from '../../contract/result'
import { ink } from '../theme'
import { label, line, notch, path, rect, type Picture } from './svg'

interface Place { readonly entry: ComparatorEntry; readonly x: number; readonly y: number }
interface Grid { readonly cell: number; readonly tall: number; readonly gap: number; readonly rowGap: number; readonly columns: number }

const strokes = [['time', ink.time], ['noise', ink.noise], ['offset', ink.offset]] as const
/** Room at either side for the numbers of a row's ends. */
const lead = 26

/**
 * The bank: a cell for each comparator, three strokes for time, noise and offset against the dashed limit,
 * tint for the tightest, a notch over a limit. Copper threads them along the ladder, or along time in a SAR.
 */
export function bankPicture(comparators: readonly ComparatorEntry[], width: number): Picture & { strokes: boolean } {
  const sar = comparators[0].cycle !== null
  const rows = sar ? byLane(comparators) : serpentine(comparators, columnsFor(comparators.length, width - 2 * lead))
  const columns = Math.max(...rows.map((row) => row.length))
  const grid = gridFor(columns, width - 2 * lead)
  const places = rows.map((row, r) => row.map((entry, c): Place => ({ entry, ...placeOf(grid, r, sar || r % 2 === 0 ? c : columns - 1 - c) })))
  const height = rows.length * (grid.tall + grid.rowGap)
  const thread = sar ? places.map((row) => threadOf([row], grid)) : [threadOf(places, grid)]
  const cells = places.flat().flatMap((place) => cell(place, grid))
  return { width, height, strokes: hasStrokes(grid), marks: [...thread, ...cells, ...rowLabels(places, grid)] }
}

/** Cells too small for strokes keep their tint and their notch. */
const hasStrokes = (grid: Grid): boolean => grid.cell > 11

function columnsFor(total: number, width: number): number {
  if (total <= 20) return total
  return Math.min(Math.floor(width / 7.2), total <= 130 ? 16 : total <= 300 ? 32 : 64)
}

function gridFor(columns: number, width: number): Grid {
  const pitch = Math.min(width / columns, 44)
  const gap = Math.min(pitch * 0.16, 5)
  const cell = pitch - gap
  return { cell, gap, columns, tall: Math.min(cell * 0.86, 24), rowGap: Math.max(gap * 1.5, 2.4) }
}

function serpentine(comparators: readonly ComparatorEntry[], columns: number): ComparatorEntry[][] {
  return Array.from({ length: Math.ceil(comparators.length / columns) }, (_, r) => comparators.slice(r * columns, (r + 1) * columns))
}

function byLane(comparators: readonly ComparatorEntry[]): ComparatorEntry[][] {
  return [...new Set(comparators.map((entry) => entry.lane))].map((lane) => comparators.filter((entry) => entry.lane === lane))
}

function placeOf(grid: Grid, row: number, column: number): { x: number; y: number } {
  return { x: lead + column * (grid.cell + grid.gap), y: row * (grid.tall + grid.rowGap) }
}

/** The copper line under each row, turning into the next. */
function threadOf(rows: readonly (readonly Place[])[], grid: Grid): string {
  const points = rows.flatMap((row) => [row[0], row[row.length - 1]])
    .map(({ x, y }) => `${x + grid.cell / 2},${y + grid.tall + grid.rowGap / 2}`)
  return path(`M${points.join('L')}`, { stroke: ink.copper, 'stroke-width': hasStrokes(grid) ? 1 : 0.6 })
}

function cell({ entry, x, y }: Place, grid: Grid): string[] {
  const worst = entry.tightest === null ? null : entry.use[entry.tightest]
  const over = entry.tightest !== null && (worst === null || worst > 1)
  const marks = [rect(x, y, grid.cell, grid.tall, tintOf(worst, hasStrokes(grid)), { stroke: over ? ink.over : ink.rule, 'stroke-width': over ? 0.8 : 0.4 })]
  if (hasStrokes(grid)) marks.push(...strokesOf(entry, x, y, grid))
  if (over) marks.push(notch(x + grid.cell, y, Math.max(2.4, grid.cell * 0.2)))
  return marks
}

/** Paler behind strokes, so that they stand out. */
function tintOf(use: number | null, strokes: boolean): string {
  if (use === null) return ink.plate
  const step = Math.floor(scaleLinear([0.4, 1], [0, 5]).clamp(true)(use) + 1e-9)
  return (strokes ? ink.paleTint : ink.tint)[step]
}

function strokesOf(entry: ComparatorEntry, x: number, y: number, grid: Grid): string[] {
  const rise = scaleLinear([0, 1.25], [0, grid.tall - 2]).clamp(true)
  const limit = y + grid.tall - rise(1)
  const thick = Math.min(3, grid.cell / 9)
  const bars = strokes.flatMap(([name, color], i) => {
    const use = entry.use[name]
    const tall = use === null ? 0 : rise(use)
    return [rect(x + grid.cell * (0.28 + 0.22 * i) - thick / 2, y + grid.tall - tall, thick, tall, color)]
  })
  return [...bars, line(x + 1.5, limit, x + grid.cell - 1.5, limit, ink.text, { 'stroke-width': 0.4, 'stroke-dasharray': '1.2 1.2' })]
}

/** The first and the last of a row; the lane where there are several. */
function rowLabels(rows: readonly (readonly Place[])[], grid: Grid): string[] {
  const lanes = rows[0][0].entry.cycle !== null && rows.length > 1
  return rows.flatMap((row, r) => {
    if (grid.tall + grid.rowGap < 9 && r % 2 === 1) return []
    const y = row[0].y + grid.tall / 2 + 2.2
    if (lanes) return [label(0, y, `lane ${row[0].entry.lane}`, { 'font-size': 6.4 })]
    const [left, right] = [...row].sort((a, b) => a.x - b.x).filter((_, i, all) => i === 0 || i === all.length - 1)
    const small = { voice: 'figures', 'font-size': 6.2 } as const
    return [
      label(left.x - 4, y, String(left.entry.cycle ?? left.entry.index), { ...small, anchor: 'end' }),
      ...(right ? [label(right.x + grid.cell + 4, y, String(right.entry.cycle ?? right.entry.index), small)] : []),
    ]
  })
}
