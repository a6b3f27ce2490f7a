import { useEffect, useState } from 'react'
import { formatSi } from '../../main/contract/units'
import type { Result } from '../../main/contract/result'
import { countFindings } from '../rooms/ledger/totals'
import { useApp, useStore } from '../state/use-store'

const quiet_ms = 600

function said(result: Result): string {
  const first = result.findings.find(({ severity }) => severity === 'stop')
  return `Planned: ${formatSi(result.ledger.power_w, 'W')}, ${formatSi(result.predicted.enob_bits, 'bit')}, ${countFindings(result.findings)}.${first ? ` ${first.message}` : ''}`
}

/** Tells readers, politely and once things are quiet, what the last plan came to. */
export function Announcer() {
  const app = useApp()
  const { result, problems } = useStore(app.results, (state) => state)
  const [text, setText] = useState('')
  useEffect(() => {
    const next = problems.length > 0 ? `The brief cannot be planned: ${problems.length} to mend.` : result ? said(result) : ''
    const timer = setTimeout(() => setText(next), quiet_ms)
    return () => clearTimeout(timer)
  }, [result, problems])
  return <p className="hidden" aria-live="polite">{text}</p>
}
