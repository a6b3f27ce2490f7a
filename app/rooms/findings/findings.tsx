import { Button } from 'react-aria-components'
import type { Finding } from '../../../main/contract/result'
import { applyRemedy } from '../../commands/apply-remedy'
import { run } from '../../commands/command'
import { goToField } from '../../commands/go-to-field'
import { sameJson } from '../../state/paths'
import { useApp, useStore } from '../../state/use-store'
import { labelOf } from '../../text/labels'
import { sectionOf } from '../brief/sections'

const signs: Readonly<Record<Finding['severity'], string>> = { stop: 'M1 1h9l4 4v8H1z', caution: 'M7.5 1.5l6.5 12H1z', note: 'M2 2.5h11v10H2z' }
const order = ['stop', 'caution', 'note']

/** What the planner has to say, the gravest first. */
export function Findings() {
  const app = useApp()
  const findings = useStore(app.results, (state) => state.result?.findings ?? null)
  const seeking = useStore(app.results, (state) => state.seeking)
  if (!findings) return <p className="nothing">What the planner has to say appears here once there is a plan.</p>
  if (findings.length === 0) return <p className="nothing">Nothing to say: every limit is met at every chosen corner.</p>
  const sorted = findings.toSorted((a, b) => order.indexOf(a.severity) - order.indexOf(b.severity))
  return (
    <>
      <p className="small muted" role="status">{seeking ? 'Planning changes that may make this feasible …' : ''}</p>
      <ul aria-label="Findings">
        {sorted.map((finding, index) => <OneFinding key={finding.code + index} finding={finding} repeated={isRepeated(sorted, index)} />)}
      </ul>
    </>
  )
}

/** Whether a finding before this one lists the very same remedies. */
function isRepeated(findings: readonly Finding[], index: number): boolean {
  const { remedies } = findings[index]
  return remedies.length > 0 && findings.slice(0, index).some((one) => sameJson(one.remedies, remedies))
}

function OneFinding({ finding, repeated }: { finding: Finding; repeated: boolean }) {
  const app = useApp()
  const { path } = finding
  return (
    <li className="finding" data-severity={finding.severity}>
      <span className="sign">
        <svg width="15" height="15" fill="none" stroke="currentColor" strokeWidth="1.5" strokeLinejoin="round" aria-hidden="true"><path d={signs[finding.severity]} /></svg>
        {finding.severity}
      </span>
      <p>{finding.message}</p>
      {path !== null && sectionOf(path) !== undefined
        ? <Button className="link" onPress={() => run(app, goToField, { path })}>{labelOf(path)}</Button> : <span />}
      {repeated && <p className="same-remedies small muted">The remedies above mend this too.</p>}
      {finding.remedies.length > 0 && !repeated && (
        <ul className="remedies" aria-label="Remedies, each tried by planning again">
          {finding.remedies.map((remedy) => (
            <li key={remedy.text}>
              <span>{remedy.text}</span>
              <Button className="button small" onPress={() => run(app, applyRemedy, { remedy })}>Apply</Button>
            </li>
          ))}
        </ul>
      )}
    </li>
  )
}
