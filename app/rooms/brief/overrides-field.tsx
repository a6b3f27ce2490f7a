import { Button } from 'react-aria-components'
import { ledgerItems } from '../../../main/contract/choices'
import { formatSi } from '../../../main/contract/units'
import { run } from '../../commands/command'
import { dropOverride } from '../../commands/drop-override'
import { ledgerUnit } from '../../text/labels'
import { useApp, useStore } from '../../state/use-store'

const none: never[] = []

/** The lines of the ledger that carry a figure of the user's own; they are set in the ledger itself. */
export function OverridesField() {
  const app = useApp()
  const overrides = useStore(app.documents, (state) => state.document.overrides ?? none)
  const problems = useStore(app.results, (state) => state.problems)
  if (overrides.length === 0) return <p className="aside" tabIndex={-1} data-path="overrides">None. A line of the ledger can be overridden where it stands.</p>
  return (
    <ul className="override-list" tabIndex={-1} data-path="overrides">
      {overrides.map((line, index) => {
        const item = line.item
        const problem = problems.find(({ path }) => path.startsWith(`overrides.${index}`))
        return (
          <li key={index}>
            <span>{ledgerItems[item] ?? line.item}, {item.startsWith('power.') ? 'power' : 'area'}</span>
            <span className="figure">{formatSi(line.value, ledgerUnit(item))}</span>
            <span className="small muted">{line.reason === undefined || line.reason === '' ? 'no reason given' : line.reason}</span>
            <Button className="link small" onPress={() => run(app, dropOverride, { item })}>Remove</Button>
            {problem && <p className="mistake">{problem.hint}</p>}
          </li>
        )
      })}
    </ul>
  )
}
