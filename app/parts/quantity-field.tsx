import { useId } from 'react'
import { formatSi } from '../../main/contract/units'
import { Formula } from '../text/formula'
import { judge, type Judged } from '../text/judge'
import { shortFigure, splitFigure } from '../text/labels'
import { shownIn, useTyping, type QuantityFieldProps } from './use-typing'

/** What the field shows while nobody types in it: number, unit, and whether it is a default. */
function atRest({ value, fallback, quantity, draft }: QuantityFieldProps): { text: string; unit: string; isDefault: boolean } {
  if (draft !== undefined) return { text: draft, unit: '', isDefault: false }
  const shown = typeof value === 'number' ? value : fallback
  if (typeof shown !== 'number') return { text: quantity.nullMeans ? 'auto' : '', unit: quantity.nullMeans ? '' : quantity.unit, isDefault: true }
  const [text, unit] = splitFigure(shortFigure(shown, quantity.unit))
  return { text, unit: unit === '' ? quantity.unit : unit, isDefault: typeof value !== 'number' }
}

/** A number with its unit: SI prefixes and expressions in, what was understood beside it, nothing typed is lost. */
export function QuantityField(props: QuantityFieldProps) {
  const { path, quantity, document, required, draft, problem } = props
  const id = useId()
  const { input, text, changed, judged, begin, change, click, key, end } = useTyping(props)
  const rest = atRest(props)
  const kept = draft !== undefined && (text === null || text === draft) ? judge(path, draft, document, shownIn(props)) : null
  const mistake = kept && !kept.ok ? kept.message : problem
  return (
    <div className="field" data-mistake={mistake ? '' : undefined}>
      <label htmlFor={id}>{quantity.label}</label>
      <div className="box" data-default={rest.isDefault && text === null ? '' : undefined}>
        <input ref={input} id={id} data-path={path} data-typing={changed ? 'yes' : undefined}
          type="text" autoComplete="off" spellCheck={false} className="figure" value={text ?? rest.text}
          aria-invalid={mistake ? true : undefined} aria-describedby={`${id}u ${id}h${mistake ? ` ${id}e` : ''}`} aria-required={required || undefined}
          onFocus={begin} onMouseUp={click} onKeyDown={key} onChange={(event) => change(event.target.value)} onBlur={end} />
        <span id={`${id}u`} className="unit" hidden={text !== null || draft !== undefined}>{rest.unit}</span>
        {judged && <Echo judged={judged} unit={quantity.unit} nullMeans={quantity.nullMeans} />}
      </div>
      <span id={`${id}h`} className="hidden">{rest.isDefault ? 'Default. ' : ''}{quantity.help}</span>
      {mistake && <p id={`${id}e`} className="mistake"><Formula text={mistake} /></p>}
    </div>
  )
}

/** What was understood of the text under way, or why not. */
function Echo({ judged, unit, nullMeans }: { judged: Judged; unit: string; nullMeans: string | undefined }) {
  return (
    <output className="echo figure" data-bad={judged.ok ? undefined : ''}>
      {judged.ok ? (judged.value === null ? nullMeans : `= ${formatSi(judged.value, unit, 4)}`) : judged.message}
    </output>
  )
}
