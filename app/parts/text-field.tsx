import { useId, useState } from 'react'

interface Props {
  label: string
  path: string
  value: string
  help: string
  long: boolean
  longest: number
  problem: string | null
  onCommit(value: string): void
  onExplain(): void
}

/** A line or paragraph of words, entered when the field is left. */
export function TextField({ label, path, value, help, long, longest, problem, onCommit, onExplain }: Props) {
  const id = useId()
  const [typing, setTyping] = useState<string | null>(null)
  const commit = () => {
    if (typing !== null && typing !== value) onCommit(typing)
    setTyping(null)
  }
  const shared = {
    id, maxLength: longest, value: typing ?? value, 'data-path': path, 'aria-describedby': `${id}h`, onBlur: commit, onFocus: onExplain,
    'data-typing': typing !== null && typing !== value ? 'yes' : undefined,
    onChange: (event: { target: { value: string } }) => setTyping(event.target.value),
  }
  return (
    <div className="field wide" data-mistake={problem ? '' : undefined}>
      <label htmlFor={id}>{label}</label>
      <div className="box">
        {long
          ? <textarea {...shared} rows={4} />
          : <input {...shared} type="text" autoComplete="off" onKeyDown={(event) => { if (event.key === 'Enter') commit() }} />}
      </div>
      <span id={`${id}h`} className="hidden">{help}</span>
      {problem && <p className="mistake">{problem}</p>}
    </div>
  )
}
