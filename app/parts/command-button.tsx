import type { ReactNode } from 'react'
import { Button } from 'react-aria-components'
import { run, type Command } from '../commands/command'
import { ariaShortcut } from '../commands/shortcuts'
import { useApp } from '../state/use-store'

interface Props<A> {
  command: Command<A>
  argument: A
  look?: string
  children?: ReactNode
  label?: string
  disabled?: boolean
}

/** A button that runs a command. */
export function CommandButton<A>({ command, argument, look = '', children, label, disabled }: Props<A>) {
  const app = useApp()
  return (
    <Button className={`button ${look}`} isDisabled={disabled} aria-label={label}
      aria-keyshortcuts={command.shortcut ? ariaShortcut(command.shortcut) : undefined} onPress={() => run(app, command, argument)}>
      {children ?? command.label}
    </Button>
  )
}
