import { ChoiceField } from '../../parts/choice-field'
import { valueAt } from '../../state/paths'
import { useApp, useStore } from '../../state/use-store'
import { plainFields } from '../../text/labels'
import { useField } from './use-field'

const path = 'process.card'
const own = 'card of this plan'

/** The process card: one that comes with the program, or the one that the plan carries. */
export function CardField() {
  const app = useApp()
  const field = useField(path)
  const cards = useStore(app.library, (state) => state.cards)
  const inPlace = typeof field.written === 'object' && field.written !== null
  const options = Object.fromEntries(cards.map((card) => [card.id, card.title]))
  const value = inPlace ? own : String(field.written ?? (typeof field.planned === 'string' ? field.planned : ''))
  const shown = inPlace ? { [own]: String(valueAt(field.written, 'title') ?? own), ...options } : options
  return (
    <ChoiceField label={plainFields[path].label} path={path} options={shown} value={value} help={plainFields[path].help}
      isDefault={field.written === undefined} problem={field.problem}
      onChoose={(next) => { if (next !== own) field.set(next) }} onClear={field.clear} onExplain={field.explain} />
  )
}
