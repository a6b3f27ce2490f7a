import { ledgerItems } from '../../../main/contract/choices'
import type { LedgerLine } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { setBack } from '../../state/result-store'
import { useApp, useStore } from '../../state/use-store'
import { ComparatorPanel } from './comparator-panel'
import { Line } from './line'

const none: never[] = []

/** Power and area, line by line, and the selected comparator against its limits. */
export function Ledger() {
  const app = useApp()
  const ledger = useStore(app.results, (state) => state.result?.ledger ?? null)
  const back = useStore(app.results, setBack)
  return (
    <section className="ledger scroll" aria-label="Ledger, line by line" data-room="ledger" data-set-back={back ?? undefined}>
      <Group title="Power" lines={ledger?.power ?? none} total={ledger?.power_w ?? null} unit="W" />
      <ComparatorPanel />
      <Group title="Area" lines={ledger?.area ?? none} total={ledger?.area_m2 ?? null} unit="m²" />
    </section>
  )
}

function Group({ title, lines, total, unit }: { title: string; lines: readonly LedgerLine[]; total: number | null; unit: string }) {
  if (lines.length === 0) return null
  const sorted = lines.toSorted((a, b) => b.value - a.value)
  return (
    <section className="ledger-group" aria-label={title}>
      <h3><span>{title}</span><span className="figure">{formatSi(total, unit)}</span></h3>
      {sorted.map((line) => <Line key={line.item} line={line} label={ledgerItems[line.item]} share={total ? line.value / total : 0} unit={unit} />)}
    </section>
  )
}
