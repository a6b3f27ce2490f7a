import type { Content, TableCell } from 'pdfmake/interfaces'
import { choices } from '../../contract/choices'
import { quantities, type Quantity } from '../../contract/quantities'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { dash } from '../format'
import { latchPicture } from '../pictures/latch-picture'
import { svgOf } from '../pictures/svg'
import { ink, ruled, size } from '../theme'
import { aside, columnHead, heading, right, subheading, symbol } from '../words'

const glossary: Readonly<Record<string, Quantity | undefined>> = quantities
const partNames = { input: 'Input pair', cross_n: 'Cross-coupled n', cross_p: 'Cross-coupled p', reset: 'Reset devices' } as const

/** The latch that the planner reached: its widths, its trim, and where its offset comes from. */
export function design({ result, width }: SheetContext): Content {
  const { comparator } = result.plan
  const topology = choices['comparator.topology'].options[comparator.topology]
  const how = comparator.sizing === 'manual' ? 'widths as given' : `sized for ${comparator.objective}`
  const caption = aside('Beside each device: its width, the same for both of a pair.', { margin: [0, 2, 0, 0] })
  const picture = comparator.topology === 'strong_arm' ? [{ width: 226, stack: [{ svg: svgOf(latchPicture(result.design.widths, 226)) }, caption] }] : []
  return {
    stack: [
      heading('The design', width, `${topology}, ${how}. Tightest use at ${result.design.corner}.`),
      { columns: [...picture, { width: '*', stack: [widths(result), subheading('Where the offset comes from'), parts(result)] }], columnGap: 22 },
    ],
    unbreakable: true,
  }
}

function widths({ design: { widths: all, trim_bits }, plan }: SheetContext['result']): Content {
  const body: TableCell[][] = Object.entries(all).flatMap(([key, value]): TableCell[][] => {
    const quantity = glossary[`comparator.widths.${key}`]
    return quantity && value !== undefined ? [[quantity.label, symbol(quantity.symbol), right(formatSi(value, quantity.unit))]] : []
  })
  const trim: TableCell[][] = plan.comparator.offset_method === 'trim'
    ? [['Trim', symbol(''), trim_bits === null ? right(`${dash} none found`) : right(formatSi(trim_bits, 'bit'))]] : []
  return { table: { widths: ['*', 'auto', 'auto'], body: [...body, ...trim] }, layout: ruled }
}

function parts({ design: { offset_parts_v }, comparators }: SheetContext['result']): Content {
  const entries = Object.entries(partNames).map(([key, name]) => ({ name, value: offset_parts_v[key as keyof typeof partNames] }))
  const largest = Math.max(...entries.map(({ value }) => value ?? 0), Number.MIN_VALUE)
  const total = comparators[0].reached.offset_v
  const rows: TableCell[][] = entries.map(({ name, value }) => [
    name,
    value === null ? '' : { canvas: [{ type: 'rect', x: 0, y: 4, w: Math.max(0.4, (value / largest) * 62), h: 3, color: ink.offset }] },
    right(formatSi(value, 'V')),
  ])
  const sum: TableCell[] = [{ text: 'Together, σ of one comparator', bold: true }, '', right(formatSi(total, 'V'), { bold: true })]
  const heads = [columnHead('Pair, V_T and k_p spreads together'), columnHead(''), columnHead('At the input', 'right')]
  const table: Content = { table: { headerRows: 1, widths: ['*', 64, 'auto'], body: [heads, ...rows, sum] }, layout: ruled }
  const note = entries.some(({ value }) => value === null) ? [aside(`${dash}  The latch could not be evaluated: see the findings.`, { fontSize: size.small })] : []
  return [table, ...note]
}
