import { Button, Header, Menu, MenuItem, MenuSection, MenuTrigger, Popover, Separator } from 'react-aria-components'
import { choosePaper } from '../../commands/choose-paper'
import { run, type Command } from '../../commands/command'
import { newFromDemo } from '../../commands/new-from-demo'
import { openPlan } from '../../commands/open-plan'
import { openRecent } from '../../commands/open-recent'
import { savePlan } from '../../commands/save-plan'
import { savePlanAs } from '../../commands/save-plan-as'
import { shortcutText } from '../../commands/shortcuts'
import { showAbout } from '../../commands/show-about'
import { showShortcuts } from '../../commands/show-shortcuts'
import { Icon } from '../../parts/icon'
import { useApp, useStore } from '../../state/use-store'

/** Starts a plan from one of the worked examples. */
export function NewMenu() {
  const app = useApp()
  const demos = useStore(app.library, (state) => state.demos)
  return (
    <MenuTrigger>
      <Button className="button quiet" isDisabled={demos.length === 0}>New<Icon shape="down" /></Button>
      <Popover className="popover" placement="bottom end">
        <Menu className="menu" onAction={(key) => run(app, newFromDemo, { id: String(key) })}>
          <MenuSection>
            <Header className="heading">From a worked example</Header>
            {demos.map((demo) => <MenuItem key={demo.id} id={demo.id} className="option">{demo.title}</MenuItem>)}
          </MenuSection>
        </Menu>
      </Popover>
    </MenuTrigger>
  )
}

const papers = { A4: 'A4', LETTER: 'Letter' } as const

/** Chooses the paper of the sheet. */
export function PaperMenu() {
  const app = useApp()
  const paper = useStore(app.views, (state) => state.paper)
  return (
    <MenuTrigger>
      <Button className="button paper" aria-label={`Paper of the sheet: ${papers[paper]}`}>{papers[paper]}<Icon shape="down" /></Button>
      <Popover className="popover" placement="bottom end">
        <Menu className="menu small-menu" selectionMode="single" selectedKeys={[paper]}
          onAction={(key) => run(app, choosePaper, { paper: key === 'LETTER' ? 'LETTER' : 'A4' })}>
          {Object.entries(papers).map(([key, name]) => <MenuItem key={key} id={key} className="option">{name}</MenuItem>)}
        </Menu>
      </Popover>
    </MenuTrigger>
  )
}

const items: readonly Command[] = [openPlan, savePlan, savePlanAs, showShortcuts, showAbout]

/** Everything else about the plan, with its keys. */
export function PlanMenu() {
  const app = useApp()
  const recent = useStore(app.library, (state) => state.recent)
  const act = (key: string) => {
    const chosen = items.find(({ id }) => id === key)
    if (chosen) run(app, chosen, undefined)
    else run(app, openRecent, { path: key })
  }
  return (
    <MenuTrigger>
      <Button className="button quiet" aria-label="Plan menu">Plan<Icon shape="down" /></Button>
      <Popover className="popover" placement="bottom end">
        <Menu className="menu" onAction={(key) => act(String(key))}>
          {items.map((item) => (
            <MenuItem key={item.id} id={item.id} className="option" textValue={item.label}>
              <span>{item.label}</span>{item.shortcut && <kbd>{shortcutText(item.shortcut)}</kbd>}
            </MenuItem>
          ))}
          {recent.length > 0 && <Separator className="menu-rule" />}
          {recent.map((path) => <MenuItem key={path} id={path} className="option" textValue={path}>{path.replace(/^.*[\\/]/, '')}</MenuItem>)}
        </Menu>
      </Popover>
    </MenuTrigger>
  )
}
