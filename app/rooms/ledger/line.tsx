import { useState } from 'react'
import { Button, Disclosure, DisclosurePanel, Heading } from 'react-aria-components'
import type { LedgerLine } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { run } from '../../commands/command'
import { dropOverride } from '../../commands/drop-override'
import { ShareBar } from '../../parts/use-bar'
import { WorkingView } from '../../parts/working-view'
import { useApp, useStore } from '../../state/use-store'
import { unbroken } from '../../text/numbers'
import { OverrideForm } from './override-form'
import { workingsOf } from './find-workings'

interface Props { line: LedgerLine; label: string; share: number; unit: string }

/** A line of the ledger; it opens to its model and workings, and can be overridden there. */
export function Line({ line, label, share, unit }: Props) {
  const [open, setOpen] = useState(false)
  return (
    <Disclosure className="line" isExpanded={open} onExpandedChange={setOpen}>
      <Heading level={4}>
        <Button slot="trigger" className="line-button">
          <span className="line-name">{label}{line.overridden && <span className="mark">yours</span>}</span>
          <span className="figure">{formatSi(line.value, unit)}</span>
          <ShareBar share={share} />
        </Button>
      </Heading>
      <DisclosurePanel className="line-panel">{open && <LineBody line={line} label={label} share={share} unit={unit} />}</DisclosurePanel>
    </Disclosure>
  )
}

function LineBody({ line, label, share, unit }: Props) {
  const app = useApp()
  const [editing, setEditing] = useState(false)
  const workings = useStore(app.results, (state) => state.result?.workings)
  const own = workingsOf(workings ?? [], [line.item])
  return (
    <>
      <p className="small">{unbroken(`${(share * 100).toPrecision(3)} % of the ${unit === 'W' ? 'power' : 'area'}. ${line.model}`)}</p>
      {own.map((working) => <WorkingView key={working.id} working={working} />)}
      {editing
        ? <OverrideForm item={line.item} label={label} unit={unit} start={line.value} onDone={() => setEditing(false)} />
        : (
          <p className="line-actions">
            <Button className="button small" onPress={() => setEditing(true)}>Override</Button>
            {line.overridden && <Button className="button small" onPress={() => run(app, dropOverride, { item: line.item })}>Use the model</Button>}
          </p>
        )}
    </>
  )
}
