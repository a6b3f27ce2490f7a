import { Switch } from 'react-aria-components'
import { laterValues } from '../../../main/contract/choices'
import { plainFields } from '../../text/labels'
import { useField } from './use-field'

/** On or off; a position whose physics is still to come cannot be chosen. */
export function SwitchField({ path }: { path: string }) {
  const field = useField(path)
  const { label, help } = plainFields[path]
  const on = (field.written ?? field.planned) !== false
  const stuck = laterValues.some((one) => one.path === path && one.later(!on, field.document))
  return (
    <div className="field">
      <span id={`${path}-label`}>{label}</span>
      <div className="box bare" data-default={field.written === undefined ? '' : undefined}>
        <Switch className="switch" data-path={path} aria-labelledby={`${path}-label`} aria-describedby={`${path}-help`} isSelected={on}
          isDisabled={stuck} onChange={field.set} onFocus={field.explain}>
          <span className="track" />
          <span>{on ? 'on' : 'off'}</span>
        </Switch>
      </div>
      <span id={`${path}-help`} className="hidden">{help}</span>
      {stuck && <p className="aside">Turning it off is not available yet.</p>}
      {field.problem && <p className="mistake">{field.problem}</p>}
    </div>
  )
}
