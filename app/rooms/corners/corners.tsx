import type { CornerEntry } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { ChartFrame } from '../../charts/chart-frame'
import type { Table } from '../../charts/table'
import { useApp, useStore } from '../../state/use-store'

const measures = [
  { key: 'delay_s', title: 'Delay', unit: 's', tone: 'var(--time)' },
  { key: 'noise_v', title: 'Noise', unit: 'V', tone: 'var(--noise)' },
  { key: 'offset_v', title: 'Raw offset', unit: 'V', tone: 'var(--offset)' },
  { key: 'power_w', title: 'Power', unit: 'W', tone: 'var(--copper)' },
] as const

const verdict = (corner: CornerEntry) => (corner.meets ? 'meets all limits' : 'misses a limit')

function tableOf(corners: readonly CornerEntry[]): Table {
  return {
    columns: [{ title: 'Corner', number: false }, ...measures.map(({ title }) => ({ title, number: true })), { title: 'Verdict', number: false }],
    rows: corners.map((corner) => [corner.name, ...measures.map(({ key, unit }) => formatSi(corner[key], unit)), verdict(corner)]),
  }
}

/** What the design does at each corner that was chosen. */
export function Corners() {
  const app = useApp()
  const corners = useStore(app.results, (state) => state.result?.corners ?? null)
  const worst = useStore(app.results, (state) => state.result?.design.corner)
  if (!corners) return <p className="nothing">The corners appear here once there is a plan.</p>
  const most = (key: (typeof measures)[number]['key']) => Math.max(...corners.map((corner) => corner[key] ?? 0), Number.MIN_VALUE)
  return (
    <ChartFrame title="The design at each corner" table={tableOf(corners)} exportable={false}
      head={corners.length === 1 ? <p className="small muted">More corners are chosen in the brief, under Process.</p> : <p className="small muted">tightest at {worst}</p>}>
      <table className="data">
        <thead>
          <tr>
            <th scope="col">Corner</th>
            {measures.map(({ key, title }) => <th key={key} scope="col" colSpan={2}>{title}</th>)}
            <th scope="col">Verdict</th>
          </tr>
        </thead>
        <tbody>
          {corners.map((corner) => (
            <tr key={corner.name} data-picked={corner.name === worst && corners.length > 1 ? '' : undefined}>
              <th scope="row">{corner.name}</th>
              {measures.map(({ key, unit, tone }) => [
                <td key={key} className="number">{formatSi(corner[key], unit)}</td>,
                <td key={`${key}-bar`} className="corner-bar"><Bar share={(corner[key] ?? 0) / most(key)} tone={tone} /></td>,
              ])}
              <td>{corner.meets ? 'meets all limits' : <strong className="bad">misses a limit</strong>}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ChartFrame>
  )
}

function Bar({ share, tone }: { share: number; tone: string }) {
  return <svg width="100%" height="8" aria-hidden="true"><rect x="0" y="1" height="6" width={`${share * 100}%`} fill={tone} /></svg>
}
