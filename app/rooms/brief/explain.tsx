import { Button } from 'react-aria-components'
import { clearValue } from '../../commands/clear-value'
import { run } from '../../commands/command'
import { valueAt } from '../../state/paths'
import { useApp, useStore } from '../../state/use-store'
import { Formula } from '../../text/formula'
import { rangeText } from '../../text/judge'
import { choiceOf, labelOf, plainFields, quantityOf } from '../../text/labels'

const needed: readonly string[] = ['converter.architecture', 'converter.resolution_bits', 'converter.sample_rate_hz']

/** The foot of the brief: what the field at hand is for, its range, and the way back to its default. */
export function Explain() {
  const app = useApp()
  const path = useStore(app.views, (state) => state.explained)
  const document = useStore(app.documents, (state) => state.document)
  if (path === null) return <p className="explain muted">Go to a field to see what it is for and what it takes. F6 moves from room to room, F1 lists all keys.</p>
  const quantity = quantityOf(path)
  const help = quantity?.help ?? choiceOf(path)?.help ?? plainFields[path]?.help ?? ''
  const written = valueAt(document, path) !== undefined
  return (
    <div className="explain">
      <p className="explain-head">
        <strong>{labelOf(path)}</strong>
        {quantity && <span className="muted"><Formula text={quantity.symbol} /></span>}
      </p>
      <p className="explain-help"><Formula text={help} /></p>
      <p className="explain-foot muted">
        <span>{quantity ? rangeText(path, document) : ''}{quantity?.nullMeans ? `; empty means ${quantity.nullMeans}` : ''}</span>
        {written && !needed.includes(path)
          ? <Button className="link" onPress={() => run(app, clearValue, { path })}>Use the default</Button>
          : <span>{needed.includes(path) ? 'needed' : 'default'}</span>}
      </p>
    </div>
  )
}
