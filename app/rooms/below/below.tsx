import { Tab as TabHandle, TabList, TabPanel, Tabs } from 'react-aria-components'
import { run } from '../../commands/command'
import { showTab } from '../../commands/show-tab'
import { tabs, type Tab } from '../../state/view-store'
import { useApp, useStore } from '../../state/use-store'
import { Budget } from '../budget/budget'
import { Corners } from '../corners/corners'
import { Findings } from '../findings/findings'
import { WavesRoom } from '../waves/waves-room'
import { Workings } from '../workings/workings'
import { Splitter } from './splitter'

const rooms: Readonly<Record<Tab, () => React.ReactNode>> = {
  waves: WavesRoom, budget: Budget, corners: Corners, findings: Findings, workings: Workings,
}

/** The rooms below the bank, one at a time. */
export function Below() {
  const app = useApp()
  const tab = useStore(app.views, (state) => state.tab)
  const findings = useStore(app.results, (state) => state.result?.findings.length ?? 0)
  return (
    <section className="below" aria-label="Rooms below the bank" data-room="below">
      <Splitter />
      <Tabs className="tabs" selectedKey={tab} onSelectionChange={(key) => run(app, showTab, { tab: key as Tab })}>
        <TabList className="tab-list" aria-label="Rooms below the bank">
          {(Object.keys(tabs) as Tab[]).map((key) => (
            <TabHandle key={key} id={key} className="tab" data-room-start={key === tab ? '' : undefined}>
              {tabs[key]}{key === 'findings' && findings > 0 && <span className="tab-count figure">{findings}</span>}
            </TabHandle>
          ))}
        </TabList>
        {(Object.keys(rooms) as Tab[]).map((key) => {
          const Room = rooms[key]
          return <TabPanel key={key} id={key} className="tab-panel scroll"><Room /></TabPanel>
        })}
      </Tabs>
    </section>
  )
}
