import { useEffect, useState } from 'react'
import type { Waves } from '../../../main/contract/waves'
import { formatSi } from '../../../main/contract/units'
import { ChartFrame } from '../../charts/chart-frame'
import { isCurrent, setBack } from '../../state/result-store'
import type { WavesKey } from '../../state/app'
import { useSelected } from '../../state/selection'
import { useApp, useStore } from '../../state/use-store'
import { lowered } from '../../text/labels'
import { nameOf } from '../bank/describe'
import { lineStyles, tableOf } from './columns'
import { Overdrive } from './overdrive'
import { isNamed } from './phases'
import { WavesChart } from './waves-chart'

/** The transient of the selected comparator. */
export function WavesRoom() {
  const app = useApp()
  const entry = useSelected()
  const [overdrive, setOverdrive] = useState<number | null>(null)
  const revision = useStore(app.results, (state) => (isCurrent(state) && !state.planning ? state.revision : -1))
  const lanes = useStore(app.results, (state) => state.result?.plan.converter.lanes ?? 1)
  const { value, valueKey, failure, busy } = useStore(app.waves, (state) => state)
  const back = useStore(app.results, setBack)
  const present = useStore(app.documents, (state) => state.revision)
  const index = entry?.index ?? 0
  const stale = valueKey === null ? null : earlier(valueKey, { revision: present, index, overdrive_v: overdrive }, back)
  useEffect(() => {
    if (revision >= 0 && index > 0) app.waves.ask({ revision, index, overdrive_v: overdrive })
  }, [app, revision, index, overdrive])
  if (!entry) return <p className="nothing">The waves of a comparator appear here once there is a plan.</p>
  const name = nameOf(entry, lanes)
  const shown = stale === null ? value?.overdrive_v ?? null : null
  return (
    <ChartFrame title={`Waves of ${lowered(name)}`} table={value ? tableOf(value) : { columns: [], rows: [] }}
      stale={stale !== null} head={(
        <>
          <Overdrive value={overdrive} shown={shown} limit={entry.limits.overdrive_v} onChange={setOverdrive} />
          <div className="chart-more">
            <Key waves={value} stale={stale !== null} />
            <p className="chart-state" role="status">{stale}</p>
          </div>
        </>
      )}>
      {value ? <WavesChart waves={value} name={stale === null ? name : `${lowered(name)}, ${stale}`} />
        : <p className="nothing">{busy || back === 'planning' ? 'Integrating the circuit.' : failure ?? 'There are no waves for this comparator.'}</p>}
    </ChartFrame>
  )
}

const coming = 'new one is being computed'

/** What a curve is of when it is not the one that is asked for; null when it is. */
function earlier(shown: WavesKey, wanted: WavesKey, back: string | null): string | null {
  if (shown.revision !== wanted.revision) return back === null || back === 'planning' ? `of the plan before, ${coming}` : back
  if (shown.index !== wanted.index) return `of the comparator before, ${coming}`
  return shown.overdrive_v === wanted.overdrive_v ? null : `at the overdrive before, ${coming}`
}

function Key({ waves, stale }: { waves: Waves | null; stale: boolean }) {
  if (!waves) return null
  return (
    <ul className="chart-key" aria-label="Lines">
      {waves.columns.filter((column) => column in lineStyles).map((column) => (
        <li key={column}>
          <svg width="18" height="8" aria-hidden="true">
            <path d="M0 4h18" stroke={lineStyles[column].color} strokeWidth={lineStyles[column].width} strokeDasharray={lineStyles[column].dash} />
          </svg>
          {lineStyles[column].label}
        </li>
      ))}
      {waves.phases.filter((phase) => !isNamed(waves, phase) && phase.name !== 'reset').map((phase) => (
        <li key={phase.name}><span className="phase-swatch" style={{ background: `var(--wash-${phase.name})` }} />{phase.name}</li>
      ))}
      {!stale && <li>{waves.corner}</li>}
      {!stale && waves.decision_s !== null && (
        <li>
          <span>decided at <span className="figure">{formatSi(waves.decision_s, 's')}</span>, overdrive <span className="figure">{formatSi(waves.overdrive_v, 'V')}</span></span>
        </li>
      )}
    </ul>
  )
}
