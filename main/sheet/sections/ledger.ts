import type { Content, TableCell } from 'pdfmake/interfaces'
import { ledgerItems } from '../../contract/choices'
import type { LedgerLine } from '../../contract/result'
import { formatSi } from '../../contract/units'
import { inScale, scaleOf, type Scale } from '../columns'
import type { SheetContext } from '../context'
import { dash } from '../format'
import { ink, ruled, size } from '../theme'
import { columnHead, heading, right, subheading } from '../words'

const barWidth = 96

/** Power and area, line by line, each with its model; lines the user set are marked. */
export function ledger({ result, width }: SheetContext): Content {
  const { power, area, power_w, area_m2 } = result.ledger
  return [
    { stack: [
      heading('Power and area', width, '◆ marks a line set by hand: its model is not used. Bars: share of the total.'),
      subheading('Power'), part(power, power_w, 'W'),
    ], unbreakable: true },
    { stack: [subheading('Area'), part(area, area_m2, 'm²')], unbreakable: true },
  ]
}

function part(lines: readonly LedgerLine[], total: number | null, unit: string): Content {
  const scale = scaleOf([...lines.map((line) => line.value)], unit)
  const body = lines.map((line) => row(line, total, scale))
  const why = total === null ? 'Could not be totalled: see the findings.' : ''
  const sum: TableCell[] = [{ text: 'Total', bold: true }, right(formatSi(total, unit), { bold: true }), '', { text: why, color: ink.muted }]
  const heads = [columnHead('Line'), columnHead(`${unit === 'W' ? 'Power' : 'Area'}, ${scale.name}`, 'right'), columnHead('Share of the total'), columnHead('Model')]
  return { table: { headerRows: 1, widths: [74, 62, barWidth + 34, '*'], body: [heads, ...body, sum], dontBreakRows: true }, layout: ruled }
}

function row({ item, value, model, overridden }: LedgerLine, total: number | null, scale: Scale): TableCell[] {
  const share = total !== null && total > 0 ? value / total : null
  const name = ledgerItems[item]
  return [
    overridden ? { text: [`${name} `, { text: '◆', color: ink.copper }], noWrap: true } : { text: name, noWrap: true },
    right(inScale(value, scale)),
    { columns: [
      { width: 30, text: share === null ? dash : percent(share), font: 'figures', fontSize: size.small, alignment: 'right', margin: [0, 1.2, 0, 0] },
      { width: barWidth, canvas: [{ type: 'rect', x: 0, y: 4, w: Math.max(0.4, (share ?? 0) * barWidth), h: 3.4, color: ink.copper }] },
    ], columnGap: 4 },
    { text: overridden ? `Set by hand. ${model}` : model, color: ink.muted, fontSize: size.small, margin: [0, 1.2, 0, 0] },
  ]
}

const percent = (share: number): string => (share > 0 && share < 5e-4 ? '<0.1\u00a0%' : `${(100 * share).toFixed(share < 0.0995 ? 1 : 0)}\u00a0%`)
