import type { Content } from 'pdfmake/interfaces'
import { cautionText } from '../../contract/caution'
import { bare, ink } from '../theme'

/** The caution, first thing under the title. */
export const caution = (): Content => barred([{ text: cautionText }], ink.copper)

/** A block with a heavy line at its left. */
export function barred(stack: Content[], color: string): Content {
  return {
    table: { widths: ['*'], body: [[{ stack }]] },
    layout: {
      ...bare, vLineWidth: (i) => (i === 0 ? 2 : 0), vLineColor: () => color,
      paddingLeft: () => 8, paddingTop: () => 2, paddingBottom: () => 2,
    },
    margin: [1, 4, 0, 8],
  }
}
