import { useEffect, useState } from 'react'
import { Button, Disclosure, DisclosurePanel, Heading } from 'react-aria-components'
import type { ComparatorEntry, Result } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { UseBar } from '../../parts/use-bar'
import { WorkingView } from '../../parts/working-view'
import { isCurrent } from '../../state/result-store'
import { isOver, useSelected } from '../../state/selection'
import { useApp, useStore } from '../../state/use-store'
import { percent } from '../../text/labels'
import { nameOf, useRows, type UseRow } from '../bank/describe'
import { workingsOf } from './find-workings'

/** The selected comparator: what it reaches of each of its limits. */
export function ComparatorPanel() {
  const app = useApp()
  const entry = useSelected()
  const result = useStore(app.results, (state) => state.result)
  if (!entry || !result) return null
  return <Panel entry={entry} result={result} />
}

const tones: Readonly<Record<string, string>> = { time: 'time', noise: 'noise', offset: 'offset' }

function Panel({ entry, result }: { entry: ComparatorEntry; result: Result }) {
  useWorkings(entry.index)
  const rows = useRows(entry, result.plan.comparator.offset_method)
  return (
    <section className="ledger-group" aria-label="Selected comparator">
      <h3>
        <span>{nameOf(entry, result.plan.converter.lanes)}</span>
        {entry.threshold_v !== null && <span className="note">threshold <span className="figure">{formatSi(entry.threshold_v, 'V')}</span></span>}
      </h3>
      {rows.map((row) => <LimitLine key={row.name} row={row} />)}
    </section>
  )
}

/** Asks for the workings of the comparator while the picture is of the present document. */
function useWorkings(index: number): void {
  const app = useApp()
  const revision = useStore(app.results, (state) => (isCurrent(state) && !state.planning ? state.revision : -1))
  useEffect(() => {
    if (revision >= 0) app.workings.ask({ revision, index })
  }, [app, revision, index])
}

function LimitLine({ row }: { row: UseRow }) {
  const [open, setOpen] = useState(false)
  const over = isOver(row.use) || (row.limited && row.use === null)
  return (
    <Disclosure className="line" isExpanded={open} onExpandedChange={setOpen}>
      <Heading level={4}>
        <Button slot="trigger" className="line-button" data-over={over ? '' : undefined}>
          <span className="line-name">{row.label}{over && <span className="mark over">over</span>}</span>
          <span className="figure">{row.text}</span>
          <UseBar use={row.drawn} tone={tones[row.name] ?? 'muted'} />
        </Button>
      </Heading>
      <DisclosurePanel className="line-panel">{open && <LimitBody row={row} />}</DisclosurePanel>
    </Disclosure>
  )
}

function LimitBody({ row }: { row: UseRow }) {
  const app = useApp()
  const { value, busy, failure } = useStore(app.workings, (state) => state)
  const common = useStore(app.results, (state) => state.result?.workings)
  const own = workingsOf(value ?? common ?? [], row.workings)
  return (
    <>
      {row.use !== null && <p className="small">{percent(row.use)} of the limit is used.</p>}
      {own.map((working) => <WorkingView key={working.id} working={working} />)}
      {failure !== null && <p className="mistake">{failure}</p>}
      {own.length === 0 && failure === null && <p className="small muted">{busy ? 'Fetching the workings.' : 'See the room Workings below.'}</p>}
    </>
  )
}
