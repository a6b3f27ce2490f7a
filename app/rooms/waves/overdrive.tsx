import { useId, useState } from 'react'
import { Button } from 'react-aria-components'
import { parseQuantity } from '../../../main/contract/expression'
import { formatSi } from '../../../main/contract/units'

interface Props { value: number | null; shown: number | null; limit: number | null; onChange(value: number | null): void }

const most_v = 20

function read(text: string): number | null | undefined {
  if (text.trim() === '') return null
  const reading = parseQuantity(text, 'V')
  return reading.ok && reading.value > 0 && reading.value <= most_v ? reading.value : undefined
}

/** The overdrive of the waves; empty: the one that the comparator has to resolve. */
export function Overdrive({ value, shown, limit, onChange }: Props) {
  const id = useId()
  const [text, setText] = useState<string | null>(null)
  const wrong = text !== null && read(text) === undefined
  const commit = () => {
    const next = text === null ? undefined : read(text)
    if (next === undefined) return
    setText(null)
    onChange(next)
  }
  const atLimit = () => {
    setText(null)
    onChange(limit)
  }
  return (
    <span className="overdrive">
      <label htmlFor={id}>overdrive</label>
      <input id={id} className="figure" autoComplete="off" spellCheck={false} value={text ?? (value === null ? '' : formatSi(value, 'V'))}
        placeholder={shown === null ? 'auto' : formatSi(shown, 'V')} aria-invalid={wrong || undefined} title={wrong ? 'Above 0, at most 20 V.' : undefined}
        onChange={(event) => setText(event.target.value)} onBlur={commit} onKeyDown={(event) => { if (event.key === 'Enter') commit() }} />
      {limit !== null && limit > 0 && limit <= most_v && <Button className="button quiet small" isDisabled={value === limit} onPress={atLimit}>at the limit’s overdrive</Button>}
    </span>
  )
}
