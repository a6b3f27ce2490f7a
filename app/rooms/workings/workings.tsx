import { useId } from 'react'
import type { Working } from '../../../main/contract/result'
import { WorkingView } from '../../parts/working-view'
import { isCurrent } from '../../state/result-store'
import { useApp, useStore } from '../../state/use-store'

const matches = (working: Working, words: readonly string[]) => {
  const text = `${working.id} ${working.title} ${working.formula} ${working.source}`.toLowerCase()
  return words.every((word) => text.includes(word))
}

/** How the numbers came about: those of the bank, and of the selected comparator. */
export function Workings() {
  const app = useApp()
  const id = useId()
  const filter = useStore(app.views, (state) => state.filter)
  const common = useStore(app.results, (state) => state.result?.workings ?? null)
  const fetched = useStore(app.workings, (state) => state)
  const current = useStore(app.results, (state) => isCurrent(state) && fetched.key?.revision === state.revision)
  if (!common) return <p className="nothing">How each number came about appears here once there is a plan.</p>
  const all = current && fetched.value ? fetched.value : common
  const shown = all.filter((working) => matches(working, filter.toLowerCase().split(/\s+/).filter(Boolean)))
  return (
    <>
      <div className="filter">
        <label htmlFor={id} className="small muted">Narrow to</label>
        <input id={id} type="search" value={filter} autoComplete="off" onChange={(event) => app.views.patch({ filter: event.target.value })} />
        <span className="small muted" role="status">{shown.length} of {all.length} workings</span>
      </div>
      {shown.length === 0
        ? <p className="nothing">No working has all these words.</p>
        : <div className="working-list">{shown.map((working) => <WorkingView key={working.id} working={working} />)}</div>}
    </>
  )
}
