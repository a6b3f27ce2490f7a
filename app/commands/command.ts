import type { App } from '../state/app'

/** A key with its modifiers; `mod` is Ctrl, on a Mac the command key. */
export interface Shortcut {
  readonly key: string
  readonly mod?: boolean
  readonly shift?: boolean
}

/** One thing a person can do. `argument` says to what; commands with a shortcut must do without one. */
export interface Command<A = void> {
  readonly id: string
  readonly label: string
  readonly shortcut: Shortcut | null
  enabled(app: App): boolean
  apply(app: App, argument: A): void | Promise<void>
}

/** States a command; `enabled` defaults to always. */
export function command<A = void>(parts: Omit<Command<A>, 'enabled' | 'shortcut'> & Partial<Command<A>>): Command<A> {
  return { shortcut: null, enabled: () => true, ...parts }
}

/** Runs a command when it is enabled. */
export function run<A>(app: App, chosen: Command<A>, argument: A): void {
  if (chosen.enabled(app)) void chosen.apply(app, argument)
}
