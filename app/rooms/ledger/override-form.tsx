import { useId, useState, type FormEvent } from 'react'
import { Button } from 'react-aria-components'
import type { LedgerItem } from '../../../main/contract/choices'
import { parseQuantity } from '../../../main/contract/expression'
import { formatExact, formatSi } from '../../../main/contract/units'
import { run } from '../../commands/command'
import { setOverride } from '../../commands/set-override'
import { useApp } from '../../state/use-store'

interface Props { item: LedgerItem; label: string; unit: string; start: number; onDone(): void }

const most = 1e6

function read(text: string, unit: string): { value: number } | { mistake: string } {
  const reading = parseQuantity(text, unit)
  if (!reading.ok) return { mistake: reading.message }
  return reading.value < 0 || reading.value > most ? { mistake: `From 0 to ${formatSi(most, unit)}.` } : { value: reading.value }
}

/** A figure of the user's own for a line of the ledger, and why. */
export function OverrideForm({ item, label, unit, start, onDone }: Props) {
  const app = useApp()
  const id = useId()
  const [text, setText] = useState(formatExact(Number(start.toPrecision(4)), unit))
  const [reason, setReason] = useState('')
  const outcome = read(text, unit)
  const submit = (event: FormEvent) => {
    event.preventDefault()
    if ('mistake' in outcome) return
    run(app, setOverride, { item, value: outcome.value, reason })
    onDone()
  }
  return (
    <form className="override" onSubmit={submit} onKeyDown={(event) => { if (event.key === 'Escape') onDone() }}>
      <label htmlFor={`${id}v`}>{label} of your own</label>
      <input id={`${id}v`} className="figure" value={text} autoFocus spellCheck={false} autoComplete="off" aria-describedby={`${id}e`}
        aria-invalid={'mistake' in outcome || undefined} onFocus={(event) => event.target.select()} onChange={(event) => setText(event.target.value)} />
      <p id={`${id}e`} className="small" data-bad={'mistake' in outcome ? '' : undefined}>
        {'mistake' in outcome ? outcome.mistake : `= ${formatSi(outcome.value, unit, 4)}`}
      </p>
      <label htmlFor={`${id}r`}>Reason</label>
      <input id={`${id}r`} value={reason} maxLength={500} autoComplete="off" onChange={(event) => setReason(event.target.value)} />
      <p className="line-actions">
        <Button type="submit" className="button small primary" isDisabled={'mistake' in outcome}>Set</Button>
        <Button className="button small" onPress={onDone}>Cancel</Button>
      </p>
    </form>
  )
}
