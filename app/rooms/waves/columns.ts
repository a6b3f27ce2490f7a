import type { Waves } from '../../../main/contract/waves'
import { formatSi } from '../../../main/contract/units'
import type { Table } from '../../charts/table'

export interface LineStyle { readonly label: string; readonly color: string; readonly width: number; readonly dash: string }

/** How each column of the waves is drawn: the outputs strong, inner nodes thin, the clock as a dashed line. */
export const lineStyles: Readonly<Record<string, LineStyle>> = {
  clock_v: { label: 'clock', color: 'var(--muted)', width: 1, dash: '5 3' },
  x_pos_v: { label: 'X+', color: 'var(--copper)', width: 1, dash: '' },
  x_neg_v: { label: 'X−', color: 'var(--ink)', width: 1, dash: '' },
  tail_v: { label: 'tail', color: 'var(--muted)', width: 1, dash: '1 3' },
  o_pos_v: { label: 'O+', color: 'var(--copper)', width: 2.25, dash: '' },
  o_neg_v: { label: 'O−', color: 'var(--ink)', width: 2.25, dash: '' },
}

/** Column names as they are printed: voltages of nodes that have no style of their own by their plain name. */
const titleOf = (column: string) => lineStyles[column]?.label ?? column.replace(/_[vs]$/, '')

export function tableOf(waves: Waves): Table {
  return {
    columns: waves.columns.map((column) => ({ title: titleOf(column), number: true })),
    rows: thinned(waves.rows, 400).map((row) => row.map((value, index) => formatSi(value, waves.columns[index].endsWith('_s') ? 's' : 'V', 4))),
  }
}

/** Every n-th row, so that no more than so many are left; the last one stays. */
export function thinned<T>(rows: readonly T[], most: number): readonly T[] {
  const every = Math.ceil(rows.length / most)
  return every <= 1 ? rows : rows.filter((_row, index) => index % every === 0 || index === rows.length - 1)
}
