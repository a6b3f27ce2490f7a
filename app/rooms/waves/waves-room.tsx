import { useEffect, useState } from 'react'
import type { Waves } from '../../../main/contract/waves'
import { formatSi } from '../../../main/contract/units'
import { ChartFrame } from '../../charts/chart-frame'
import { isCurrent } from '../../state/result-store'
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
  const { value, failure, busy } = useStore(app.waves, (state) => state)
  const index = entry?.index ?? 0
  useEffect(() => {
    if (revision >= 0 && index > 0) app.waves.ask({ revision, index, overdrive_v: overdrive })
  }, [app, revision, index, overdrive])
  if (!entry) return <p className="nothing">The waves of a comparator appear here once there is a plan.</p>
  const name = nameOf(entry, lanes)
  return (
    <ChartFrame title={`Waves of ${lowered(name)}`} table={value ? tableOf(value) : { columns: [], rows: [] }}
      head={<><Overdrive value={overdrive} shown={value?.overdrive_v ?? null} onChange={setOverdrive} /><div className="chart-more"><Key waves={value} /></div></>}>
      {value ? <WavesChart waves={value} name={name} />
        : <p className="nothing">{failure ?? (busy ? 'Integrating the circuit.' : 'There are no waves for this comparator.')}</p>}
    </ChartFrame>
  )
}

function Key({ waves }: { waves: Waves | null }) {
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
      <li>{waves.corner}</li>
      {waves.decision_s !== null && <li>decided at <span className="figure">{formatSi(waves.decision_s, 's')}</span></li>}
    </ul>
  )
}
