import type { Content, TableCell } from 'pdfmake/interfaces'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { ink, ruled } from '../theme'
import { columnHead, heading, right } from '../words'

/** What the same design does at each corner that was evaluated. */
export function corners({ result, width }: SheetContext): Content {
  const heads = [columnHead('Corner'), ...['Delay', 'Noise', 'Raw offset', 'Power'].map((text) => columnHead(text, 'right')), columnHead('Meets its limits', 'right')]
  const body = result.corners.map((corner): TableCell[] => [
    corner.name,
    right(formatSi(corner.delay_s, 's')), right(formatSi(corner.noise_v, 'V')), right(formatSi(corner.offset_v, 'V')), right(formatSi(corner.power_w, 'W')),
    { text: corner.meets ? 'yes' : '◥ no', alignment: 'right', color: corner.meets ? ink.text : ink.over, bold: !corner.meets },
  ])
  const note = result.corners.length > 1 ? 'Reached values elsewhere on the sheet are the worst of these, quantity by quantity; power is that of the corner with the most.' : undefined
  return {
    stack: [
      heading('Corners', width, note),
      { table: { headerRows: 1, widths: ['*', 'auto', 'auto', 'auto', 'auto', 'auto'], body: [heads, ...body] }, layout: { ...ruled, paddingLeft: (i) => (i === 0 ? 0 : 14) } },
    ],
    unbreakable: true,
  }
}
