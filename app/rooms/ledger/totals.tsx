import { Button } from 'react-aria-components'
import type { Finding, Result } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { run } from '../../commands/command'
import { selectComparator } from '../../commands/select-comparator'
import { showTab } from '../../commands/show-tab'
import { setBack } from '../../state/result-store'
import { cannotBeMet, isOver, tightestEntry, tightestUse } from '../../state/selection'
import { useApp, useStore } from '../../state/use-store'
import { nameOf } from '../bank/describe'
import { cornerShown, limitPhrase, percent, shortFigure, splitFigure } from '../../text/labels'

/** What the plan comes to; always in sight. */
export function Totals() {
  const app = useApp()
  const result = useStore(app.results, (state) => state.result)
  const back = useStore(app.results, setBack)
  return (
    <section className="totals" aria-labelledby="totals-title" data-room="totals" data-set-back={back ?? undefined}>
      <h2 id="totals-title" className="room-title">Ledger{back !== null && <span className="stale">, {back}</span>}</h2>
      {result ? <Figures result={result} /> : <div className="totals-plate empty" />}
    </section>
  )
}

function Figures({ result }: { result: Result }) {
  const { ledger, predicted, plan } = result
  const asked = plan.converter.enob_bits
  const short = predicted.enob_bits !== null && predicted.enob_bits < asked - 1e-9
  return (
    <div className="totals-plate">
      <Total figure={formatSi(ledger.power_w, 'W')} label="power" />
      <Total figure={formatSi(ledger.area_m2, 'm²')} label="area" />
      <Total figure={formatSi(predicted.enob_bits, 'bit')} label={`effective, of ${shortFigure(asked, '')} asked`} bad={short} more={cornerShown(result)} />
      <Tightest result={result} />
      <Findings findings={result.findings} />
    </div>
  )
}

interface TotalProps { figure: string; label: string; bad?: boolean; more?: string }

function Total({ figure, label, bad = false, more = '' }: TotalProps) {
  const [number, unit] = splitFigure(figure)
  return (
    <p className="total" data-bad={bad ? '' : undefined} title={more || undefined}>
      <span className="total-figure figure">{number}<span className="total-unit">{unit === '' ? '' : ` ${unit}`}</span></span>
      <span className="small muted">{label}{more !== '' && <span className="hidden">, {more}</span>}</span>
    </p>
  )
}

function Tightest({ result }: { result: Result }) {
  const app = useApp()
  const entry = tightestEntry(result)
  const use = tightestUse(entry)
  const hopeless = entry.tightest !== null && cannotBeMet(entry, entry.tightest)
  const [number, unit] = hopeless ? [entry.tightest === 'time' ? 'no window' : 'nothing can meet it', ''] : splitFigure(percent(use))
  const label = entry.tightest === null || (use === null && !hopeless) ? 'not evaluated' : `${hopeless ? '' : 'of '}${limitPhrase(entry.tightest)}`
  return (
    <Button className="total" data-bad={isOver(use) || hopeless ? '' : undefined} onPress={() => run(app, selectComparator, { index: entry.index })}>
      <span className="hidden">Tightest use: </span>
      <span className="total-figure figure" data-words={hopeless ? '' : undefined}>{number}<span className="total-unit">{unit === '' ? '' : ` ${unit}`}</span></span>
      <span className="small muted">{label}<span className="hidden">, {nameOf(entry, result.plan.converter.lanes)}</span></span>
    </Button>
  )
}

const severities = ['stop', 'caution', 'note'] as const
const plural = (count: number, word: string) => `${count} ${word}${count === 1 ? '' : 's'}`

/** "1 stop, 2 cautions" */
export function countFindings(findings: readonly Finding[]): string {
  const parts = severities.map((severity) => [findings.filter((one) => one.severity === severity).length, severity] as const)
    .filter(([count]) => count > 0).map(([count, severity]) => plural(count, severity))
  return parts.length === 0 ? 'no findings' : parts.join(', ')
}

function Findings({ findings }: { findings: readonly Finding[] }) {
  const app = useApp()
  const worst = severities.find((severity) => findings.some((one) => one.severity === severity))
  return (
    <Button className="total-findings" data-worst={worst ?? 'none'} onPress={() => run(app, showTab, { tab: 'findings' })}>
      <span>{countFindings(findings)}</span>
      <span className="small muted">{worst === 'stop' ? 'cannot be built as it stands' : 'all limits are met'}</span>
    </Button>
  )
}
