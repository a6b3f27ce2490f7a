import type { Content, CustomTableLayout } from 'pdfmake/interfaces'

/** Paper, ink and copper in print: the light colours of the window on white. */
export const ink = {
  text: '#1E2430', muted: '#5C6169', rule: '#DDD7C9', head: '#A79F8E', copper: '#A8562A', over: '#8C2F1B', plate: '#FAF8F4',
  time: '#1F6F78', noise: '#6B4C8A', offset: '#7A4A12',
  paleTint: ['#FAF8F3', '#F4E8DB', '#EFDBC6', '#EACFB0', '#E3BF97', '#DCAE7E'],
  tint: ['#F3EEE2', '#E9D5BD', '#DFBC98', '#D6A374', '#CC894F', '#C2702B'],
} as const

/** Type sizes [pt]. */
export const size = { table: 6.6, small: 7, body: 8.5, head: 12, large: 14, title: 20 } as const

/** Page margins [pt]: left, top, right, bottom. */
export const margins: [number, number, number, number] = [42, 50, 42, 46]
export const pageWidth = { A4: 595.28, LETTER: 612 } as const
export type Paper = keyof typeof pageWidth

const hair = 0.5

/** Rows between hairlines, a darker line under the header. */
export const ruled: CustomTableLayout = {
  hLineWidth: (i, node) => (i === 0 && headers(node) === 0 ? 0 : i === headers(node) && i > 0 ? 0.7 : i === 0 ? 0 : hair),
  hLineColor: (i, node) => (i === headers(node) && i > 0 ? ink.head : ink.rule),
  vLineWidth: () => 0,
  paddingLeft: (i) => (i === 0 ? 0 : 4),
  paddingRight: (i, node) => (i === (node.table.widths?.length ?? 0) - 1 ? 0 : 4),
  paddingTop: () => 2,
  paddingBottom: () => 2,
}

/** As `ruled`, closer together, for many columns. */
export const dense: CustomTableLayout = {
  ...ruled,
  paddingLeft: (i) => (i === 0 ? 0 : 2.5),
  paddingRight: (i, node) => (i === (node.table.widths?.length ?? 0) - 1 ? 0 : 2.5),
  paddingTop: () => 2,
  paddingBottom: () => 2,
}

/** No lines and no space of its own. */
export const bare: CustomTableLayout = {
  hLineWidth: () => 0, vLineWidth: () => 0, paddingLeft: () => 0, paddingRight: () => 0, paddingTop: () => 0, paddingBottom: () => 0,
}

function headers(node: { table: { headerRows?: number } }): number {
  return node.table.headerRows ?? 0
}

/** A line across the page. */
export const lineAcross = (width: number, color: string, lineWidth: number, below = 6): Content =>
  ({ canvas: [{ type: 'line', x1: 0, y1: 0, x2: width, y2: 0, lineWidth, lineColor: color }], margin: [0, 0, 0, below] })
