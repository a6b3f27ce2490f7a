import type { Choice } from '../../../main/contract/choices'
import type { Quantity } from '../../../main/contract/quantities'
import { run } from '../../commands/command'
import { setSizing } from '../../commands/set-sizing'
import { ChoiceField } from '../../parts/choice-field'
import { QuantityField } from '../../parts/quantity-field'
import { TextField } from '../../parts/text-field'
import { choiceOf, plainFields, quantityOf } from '../../text/labels'
import { CardField } from './card-field'
import { CornersField } from './corners-field'
import { OverridesField } from './overrides-field'
import { SwitchField } from './switch-field'
import { useField } from './use-field'

const required: readonly string[] = [
  'converter.resolution_bits', 'converter.sample_rate_hz', 'comparator.widths.input_m', 'comparator.widths.cross_n_m',
  'comparator.widths.cross_p_m', 'comparator.widths.tail_m', 'comparator.widths.reset_m',
]

/** The field of a path, whatever kind it is. */
export function Field({ path }: { path: string }) {
  const quantity = quantityOf(path)
  const choice = choiceOf(path)
  if (quantity) return <BriefQuantity path={path} quantity={quantity} />
  if (choice) return <BriefChoice path={path} choice={choice} />
  switch (plainFields[path]?.kind) {
    case 'switch': return <SwitchField path={path} />
    case 'card': return <CardField />
    case 'corners': return <CornersField />
    case 'overrides': return <OverridesField />
    default: return <BriefText path={path} />
  }
}

function BriefQuantity({ path, quantity }: { path: string; quantity: Quantity }) {
  const field = useField(path)
  return (
    <QuantityField path={path} quantity={quantity} document={field.document} value={asNumber(field.written)} fallback={asNumber(field.planned)}
      required={required.includes(path)} draft={field.draft} problem={field.problem}
      onCommit={field.set} onClear={field.clear} onDraft={field.keep} onExplain={field.explain} />
  )
}

const asNumber = (value: unknown) => (typeof value === 'number' ? value : null)

function BriefChoice({ path, choice }: { path: string; choice: Choice }) {
  const field = useField(path)
  const value = typeof field.written === 'string' ? field.written : typeof field.planned === 'string' ? field.planned : ''
  const choose = (next: string) => {
    if (path === 'comparator.sizing') run(field.app, setSizing, { value: next === 'manual' ? 'manual' : 'auto' })
    else field.set(next)
  }
  return (
    <ChoiceField label={choice.label} path={path} options={choice.options} later={choice.later} value={value} help={choice.help}
      isDefault={field.written === undefined} problem={field.problem} onChoose={choose}
      onClear={path === 'converter.architecture' ? () => undefined : field.clear} onExplain={field.explain} />
  )
}

function BriefText({ path }: { path: string }) {
  const field = useField(path)
  const plain = plainFields[path]
  const value = typeof field.written === 'string' ? field.written : typeof field.planned === 'string' ? field.planned : ''
  return (
    <TextField label={plain.label} path={path} value={value} help={plain.help} long={plain.kind === 'long_text'} longest={plain.longest ?? 200}
      problem={field.problem} onCommit={(text) => (text === '' ? field.clear() : field.set(text))} onExplain={field.explain} />
  )
}
