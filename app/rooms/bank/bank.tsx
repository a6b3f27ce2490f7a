import { Button } from 'react-aria-components'
import { run } from '../../commands/command'
import { zoomBank, zoomRange } from '../../commands/zoom-bank'
import { Icon } from '../../parts/icon'
import { setBack } from '../../state/result-store'
import { useSelected } from '../../state/selection'
import { useApp, useStore } from '../../state/use-store'
import { formatSi } from '../../../main/contract/units'
import { bankTitle, nameOf, tightestText } from './describe'
import { Legend } from './legend'
import { Picture } from './picture'

/** The comparators and the picture of them. */
export function Bank() {
  const app = useApp()
  const state = useStore(app.results, (now) => now)
  const { result, failure, problems, planning } = state
  return (
    <section className="bank" aria-labelledby="bank-title" data-room="bank" data-set-back={setBack(state) ?? undefined}>
      <header className="bank-head">
        <h2 id="bank-title" className="room-title">Bank<span className="bank-count">{result ? `, ${bankTitle(result)}` : ''}</span></h2>
        <p className="bank-state small" role="status">
          {failure !== null ? <Failure text={failure} />
            : problems.length > 0 ? <span className="stale">of the last valid brief</span>
              : planning && <span className="busy">planning</span>}
        </p>
        <ZoomButtons />
      </header>
      <Legend />
      {result ? <Picture result={result} /> : <EmptyBank failed={failure !== null || problems.length > 0} />}
      <SelectedLine />
    </section>
  )
}

function Failure({ text }: { text: string }) {
  const app = useApp()
  return <span className="stale">{text} <Button className="link" onPress={() => app.results.retry()}>Try again</Button></span>
}

function ZoomButtons() {
  const app = useApp()
  const zoom = useStore(app.views, (state) => state.zoom)
  const by = (factor: number) => {
    const frame = document.querySelector('.bank-frame')
    const [x, y] = [(frame?.clientWidth ?? 0) / 2, (frame?.clientHeight ?? 0) / 2]
    run(app, zoomBank, { scale: zoom.scale * factor, x: x - (x - zoom.x) * factor, y: y - (y - zoom.y) * factor })
  }
  return (
    <div className="bank-zoom" role="group" aria-label="Zoom of the bank">
      <Button className="button quiet square" aria-label="Zoom out" isDisabled={zoom.scale <= zoomRange.min} onPress={() => by(1 / 1.5)}><Icon shape="minus" /></Button>
      <Button className="button quiet square" aria-label="Show all of the bank" isDisabled={zoom.scale === 1} onPress={() => run(app, zoomBank, { scale: 1, x: 0, y: 0 })}><Icon shape="fit" /></Button>
      <Button className="button quiet square" aria-label="Zoom in" isDisabled={zoom.scale >= zoomRange.max} onPress={() => by(1.5)}><Icon shape="plus" /></Button>
    </div>
  )
}

function SelectedLine() {
  const app = useApp()
  const entry = useSelected()
  const lanes = useStore(app.results, (state) => state.result?.plan.converter.lanes ?? 1)
  return (
    <p className="bank-foot small muted">
      {entry && (
        <>
          <strong>{nameOf(entry, lanes)}</strong>
          {entry.threshold_v !== null && <span>threshold <span className="figure">{formatSi(entry.threshold_v, 'V')}</span></span>}
          <span>{tightestText(entry)}</span>
        </>
      )}
    </p>
  )
}

function EmptyBank({ failed }: { failed: boolean }) {
  return (
    <div className="bank-empty">
      <p className="muted">{failed ? 'There is no plan yet. Mend the brief on the left, and the bank appears here.' : 'Planning the first bank.'}</p>
    </div>
  )
}
