import { Button, ListBox, ListBoxItem, Popover, Select, SelectValue, Label, Text } from 'react-aria-components'
import { Icon } from './icon'

interface Props {
  label: string
  path: string
  options: Readonly<Record<string, string>>
  later?: readonly string[]
  value: string
  isDefault: boolean
  problem: string | null
  help: string
  onChoose(value: string): void
  onClear(): void
  onExplain(): void
}

/** One of several; what is still to come is shown and cannot be taken. */
export function ChoiceField({ label, path, options, later = [], value, isDefault, problem, help, ...act }: Props) {
  return (
    <Select className="field" value={value} disabledKeys={later} isInvalid={problem !== null}
      onChange={(key) => act.onChoose(String(key))} data-mistake={problem ? '' : undefined}>
      <Label>{label}</Label>
      <Button className="box choice" data-path={path} data-default={isDefault ? '' : undefined} onFocus={act.onExplain}
        onKeyDown={(event) => { if (event.key === 'Delete' || event.key === 'Backspace') act.onClear() }}>
        <SelectValue>{() => options[value] ?? value}</SelectValue>
        <Icon shape="down" />
      </Button>
      <Text slot="description" className="hidden">{isDefault ? 'Default. ' : ''}{help}</Text>
      {problem && <p className="mistake">{problem}</p>}
      <Popover className="popover" placement="bottom end">
        <ListBox>
          {Object.entries(options).map(([key, text]) => (
            <ListBoxItem key={key} id={key} className="option" textValue={text}>
              <Text slot="label">{text}</Text>
              {later.includes(key) && <Text slot="description" className="small">not available yet</Text>}
            </ListBoxItem>
          ))}
        </ListBox>
      </Popover>
    </Select>
  )
}
