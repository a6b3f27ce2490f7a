import { Checkbox, CheckboxGroup, Label } from 'react-aria-components'
import { cornerNames, type CornerName } from '../../../main/contract/choices'
import { run } from '../../commands/command'
import { setCorners } from '../../commands/set-corners'
import { Icon } from '../../parts/icon'
import { plainFields } from '../../text/labels'
import { useField } from './use-field'

const path = 'corners'
const words: Readonly<Record<CornerName, string>> = { typical: 'Typical', slow: 'Slow', fast: 'Fast' }

function chosenOf(written: unknown, planned: unknown): CornerName[] {
  const names = Array.isArray(written) ? written : Array.isArray(planned) ? planned : ['typical']
  return cornerNames.filter((name) => names.includes('all') || names.includes(name))
}

/** The corners that the design has to hold at; at least one. */
export function CornersField() {
  const field = useField(path)
  const chosen = chosenOf(field.written, field.planned)
  return (
    <CheckboxGroup className="field corners" value={chosen}
      onChange={(names) => run(field.app, setCorners, { names: names as CornerName[] })}>
      <Label>{plainFields[path].label}</Label>
      <div className="box bare checks" data-default={field.written === undefined ? '' : undefined}>
        {cornerNames.map((name, index) => (
          <Checkbox key={name} value={name} className="check" onFocus={field.explain} data-path={index === 0 ? path : undefined}
            isDisabled={chosen.length === 1 && chosen[0] === name}>
            <span className="tick"><Icon shape="check" /></span>{words[name]}
          </Checkbox>
        ))}
      </div>
      {field.problem && <p className="mistake">{field.problem}</p>}
    </CheckboxGroup>
  )
}
