import { Button } from 'react-aria-components'
import { run } from '../../commands/command'
import { CommandButton } from '../../parts/command-button'
import { exportSheet } from '../../commands/export-sheet'
import { goToField } from '../../commands/go-to-field'
import { openPlan } from '../../commands/open-plan'
import { redo } from '../../commands/redo'
import { savePlan } from '../../commands/save-plan'
import { savePlanAs } from '../../commands/save-plan-as'
import { showAbout } from '../../commands/show-about'
import { undo } from '../../commands/undo'
import { Icon } from '../../parts/icon'
import { isDirty } from '../../state/document-store'
import { useApp, useStore } from '../../state/use-store'
import { NewMenu, PaperMenu, PlanMenu } from './menus'

/** Title and state of the plan, and what can be done with it as a whole. */
export function Bar() {
  return (
    <header className="bar" data-room="bar">
      <PlanTitle />
      <div className="bar-actions" role="toolbar" aria-label="Plan">
        <NewMenu />
        <CommandButton command={openPlan} argument={undefined} look="quiet wide-only" />
        <CommandButton command={savePlan} argument={undefined} look="quiet wide-only" />
        <CommandButton command={savePlanAs} argument={undefined} look="quiet wide-only" />
        <PlanMenu />
        <CommandButton command={showAbout} argument={undefined} look="quiet wide-only" />
        <UndoButtons />
        <Sheet />
      </div>
    </header>
  )
}

function PlanTitle() {
  const app = useApp()
  const state = useStore(app.documents, (now) => now)
  const planned = useStore(app.results, (now) => now.result?.plan.revision)
  const title = state.document.title ?? 'Untitled plan'
  const revision = state.document.revision ?? planned ?? 'A'
  const kept = isDirty(state) ? (state.savedAt === null ? 'not saved' : `changed since ${state.savedAt}`)
    : state.savedAt !== null ? `saved ${state.savedAt}` : state.place ? 'as opened' : 'not saved yet'
  return (
    <div className="bar-title">
      <h1>
        <Button className="title-button" aria-label={`${title}, change the title`} onPress={() => run(app, goToField, { path: 'title' })}>{title}</Button>
      </h1>
      <p className="small muted">
        revision {revision}, <span data-testid="saved-state">{kept}</span>
        {state.place && <span className="place"> in {state.place.name}</span>}
      </p>
    </div>
  )
}

function UndoButtons() {
  const app = useApp()
  const past = useStore(app.documents, (state) => state.past)
  const future = useStore(app.documents, (state) => state.future)
  const last = past[past.length - 1]?.label
  const next = future[0]?.label
  return (
    <>
      <CommandButton command={undo} argument={undefined} look="undo" disabled={last === undefined} label={last === undefined ? 'Undo' : `Undo “${last}”`}>
        <Icon shape="undo" /><span className="ellipsis">{last === undefined ? 'Undo' : `Undo “${last}”`}</span>
      </CommandButton>
      <CommandButton command={redo} argument={undefined} look="square-bar" disabled={next === undefined} label={next === undefined ? 'Redo' : `Redo “${next}”`}>
        <Icon shape="redo" />
      </CommandButton>
    </>
  )
}

function Sheet() {
  const app = useApp()
  const busy = useStore(app.views, (state) => state.busy)
  const ready = useStore(app.results, (state) => state.result !== null)
  return (
    <span className="sheet" role="group" aria-label="Sheet">
      <PaperMenu />
      <CommandButton command={exportSheet} argument={undefined} look="primary" disabled={!ready || busy !== null}>
        {busy ?? exportSheet.label}
      </CommandButton>
    </span>
  )
}
