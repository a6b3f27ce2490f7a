import { Button } from 'react-aria-components'
import { run } from '../commands/command'
import { showSide } from '../commands/show-side'
import { Announcer } from '../parts/announcer'
import { Dialogs } from '../parts/dialogs'
import { NoticePlate } from '../parts/notice'
import { useApp, useStore } from '../state/use-store'
import { Bank } from './bank/bank'
import { Bar } from './bar/bar'
import { Below } from './below/below'
import { Brief } from './brief/brief'
import { Ledger } from './ledger/ledger'
import { Totals } from './ledger/totals'

/** The whole window. */
export function Desk() {
  const app = useApp()
  const side = useStore(app.views, (state) => state.side)
  return (
    <>
      <main className="desk" data-side={side}>
        <Bar />
        <SideSwitch />
        <Brief />
        <Bank />
        <Below />
        <Totals />
        <Ledger />
      </main>
      <NoticePlate />
      <Announcer />
      <Dialogs />
    </>
  )
}

/** On a narrow window the brief and the ledger share one place. */
function SideSwitch() {
  const app = useApp()
  const side = useStore(app.views, (state) => state.side)
  return (
    <div className="side-switch" role="group" aria-label="Side room">
      {(['brief', 'ledger'] as const).map((name) => (
        <Button key={name} className="tab" aria-pressed={side === name} data-selected={side === name ? '' : undefined}
          onPress={() => run(app, showSide, { side: name })}>
          {name === 'brief' ? 'Brief' : 'Ledger'}
        </Button>
      ))}
    </div>
  )
}
