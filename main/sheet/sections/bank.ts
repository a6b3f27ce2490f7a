import type { Column, Content } from 'pdfmake/interfaces'
import type { ComparatorEntry, Result } from '../../contract/result'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { dash } from '../format'
import { useMeasures } from '../measures'
import { bankPicture } from '../pictures/bank-picture'
import { stripPicture, type Strip, type StripLine } from '../pictures/strip-picture'
import { svgOf } from '../pictures/svg'
import { ink, size } from '../theme'
import { aside, heading } from '../words'

/** The bank as a picture: every comparator, and the limit that moves along it. */
export function bank({ result, width }: SheetContext): Content {
  const { comparators } = result
  const sar = comparators[0].cycle !== null
  const order = sar ? 'Copper runs with time, from cycle to cycle.' : 'Copper follows the ladder, from the lowest threshold to the highest.'
  const strip = stripOf(result)
  const cells = bankPicture(comparators, width)
  const picture: Content = {
    stack: [
      heading('The bank', width, `Tint: the tightest use, from 0.4 of its limit (light) to 1 (dark). Notched corner: over a limit. ${order}`),
      { svg: svgOf(cells), margin: [0, 2, 0, 6] },
      ...(cells.strokes ? [strokeLegend()] : []),
    ],
    unbreakable: true,
  }
  const along: Content = {
    stack: [
      aside(sar ? 'Decision from cycle to cycle' : `${offsetLabel(comparators)} along the ladder`, { margin: [0, 8, 0, 2], fontSize: size.body, color: ink.text }),
      { svg: svgOf(stripPicture(strip, width, 100)) },
    ],
    unbreakable: true,
  }
  return [picture, along]
}

function strokeLegend(): Content {
  const key = (color: string, text: string): Column =>
    ({ width: 'auto', text: [{ text: '▌', color }, { text, color: ink.muted }], fontSize: size.small })
  return {
    columns: [key(ink.time, 'time, left'), key(ink.noise, 'noise, middle'), key(ink.offset, 'offset, right'), aside('dashed: the limit', { width: 'auto' })],
    columnGap: 14,
  }
}

function offsetLabel(comparators: readonly ComparatorEntry[]): string {
  return useMeasures(comparators).find((m) => m.use === 'offset')?.label ?? 'Offset'
}

function stripOf({ comparators }: Result): Strip {
  const first = comparators[0]
  const lane = comparators.filter((entry) => entry.lane === first.lane)
  const use = useMeasures(comparators).find((m) => m.use === (first.cycle === null ? 'offset' : 'time')) ?? useMeasures(comparators)[0]
  const color = first.cycle === null ? ink.offset : ink.time
  const lines: StripLine[] = [
    { name: 'limit', values: lane.map((entry) => entry.limits[use.limit]), color: ink.text, dash: '3 2' },
    { name: 'reached', values: lane.map((entry) => entry.reached[use.reached]), color },
  ]
  const last = lane[lane.length - 1]
  const along = first.cycle === null ? `threshold${comparators.length > lane.length ? `, lane ${first.lane}` : ''}` : 'cycle'
  return { lines: lines.filter((one) => one.values.some((value) => value !== null)), unit: use.unit, ends: [endOf(first), endOf(last)], along }
}

const endOf = (entry: ComparatorEntry): string =>
  entry.cycle !== null ? String(entry.cycle) : entry.threshold_v === null ? dash : formatSi(entry.threshold_v, 'V')
