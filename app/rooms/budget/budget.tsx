import type { BudgetLine, Result } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { ChartFrame } from '../../charts/chart-frame'
import type { Table } from '../../charts/table'
import { useApp, useStore } from '../../state/use-store'
import { cornerShown, shortFigure } from '../../text/labels'

const names: Readonly<Record<BudgetLine['item'], string>> = {
  quantisation: 'Quantisation', jitter: 'Aperture jitter', sampling_noise: 'Sampling noise', reference: 'Reference elements',
  threshold_spread: 'Threshold spread', comparator_noise: 'Comparator noise',
}
const tones: Readonly<Record<BudgetLine['item'], string>> = {
  quantisation: 'var(--edge)', jitter: 'var(--muted)', sampling_noise: 'var(--time)', reference: 'var(--copper)',
  threshold_spread: 'var(--offset)', comparator_noise: 'var(--noise)',
}

/** Root mean square of an error power: what people compare with an LSB. */
const rms = (power: number | null) => (power === null ? null : Math.sqrt(Math.max(0, power)))
const share = (power: number | null, whole: number) => (power === null ? '—' : `${((power / whole) * 100).toPrecision(3)} %`)

function tableOf({ budget, quantities }: Result): Table {
  const whole = quantities.error_power_allowed_v2
  return {
    columns: [
      { title: 'Error', number: false }, { title: 'used, rms', number: true }, { title: 'allowed, rms', number: true },
      { title: 'used of all allowed power', number: true },
    ],
    rows: budget.map(({ item, used_v2, allowed_v2 }) =>
      [names[item], formatSi(rms(used_v2), 'V'), formatSi(rms(allowed_v2), 'V'), share(used_v2, whole)]),
  }
}

/** Where the error power goes. */
export function Budget() {
  const app = useApp()
  const result = useStore(app.results, (state) => state.result)
  if (!result) return <p className="nothing">Where the error power goes appears here once there is a plan.</p>
  const { enob_bits: asked } = result.plan.converter
  const allowed = formatSi(rms(result.quantities.error_power_allowed_v2), 'V')
  return (
    <ChartFrame title="Where the error power goes" table={tableOf(result)} exportable={false}
      head={<p className="small muted"><span className="figure">{allowed}</span> rms is allowed for <span className="figure">{shortFigure(asked, 'bit')}</span>; used {cornerShown(result)}</p>}>
      <Stack budget={result.budget} whole={result.quantities.error_power_allowed_v2} />
      <Rows budget={result.budget} whole={result.quantities.error_power_allowed_v2} />
    </ChartFrame>
  )
}

function Stack({ budget, whole }: { budget: readonly BudgetLine[]; whole: number }) {
  const used = budget.reduce((sum, line) => sum + (line.used_v2 ?? 0), 0)
  const full = Math.max(used, whole)
  return (
    <div className="stack" role="img" aria-label={`${share(used, whole)} of the allowed error power is used`}>
      {budget.map(({ item, used_v2 }) => <span key={item} style={{ width: `${((used_v2 ?? 0) / full) * 100}%`, background: tones[item] }} />)}
    </div>
  )
}

function Rows({ budget, whole }: { budget: readonly BudgetLine[]; whole: number }) {
  const largest = Math.max(...budget.flatMap(({ used_v2, allowed_v2 }) => [used_v2 ?? 0, allowed_v2]))
  return (
    <table className="data">
      <thead>
        <tr>
          <th scope="col">Error</th><th scope="col" className="bar-cell">power used, dashed: allowed</th>
          <th scope="col" className="number">used, rms</th><th scope="col" className="number">allowed, rms</th>
          <th scope="col" className="number">used of all allowed power</th>
        </tr>
      </thead>
      <tbody>
        {budget.map(({ item, used_v2, allowed_v2 }) => (
          <tr key={item}>
            <th scope="row">{names[item]}</th>
            <td className="bar-cell"><PowerBar used={(used_v2 ?? 0) / largest} allowed={allowed_v2 / largest} color={tones[item]} over={(used_v2 ?? 0) > allowed_v2 * 1.000001} /></td>
            <td className="number">{formatSi(rms(used_v2), 'V')}</td>
            <td className="number">{formatSi(rms(allowed_v2), 'V')}</td>
            <td className="number">{share(used_v2, whole)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}

function PowerBar({ used, allowed, color, over }: { used: number; allowed: number; color: string; over: boolean }) {
  return (
    <svg width="100%" height="12" aria-hidden="true">
      <rect x="0" y="2" height="8" width={`${used * 99}%`} fill={over ? 'var(--over)' : color} />
      <line x1={`${allowed * 99}%`} x2={`${allowed * 99}%`} y1="0" y2="12" stroke="var(--ink)" strokeDasharray="2 1.5" />
    </svg>
  )
}
