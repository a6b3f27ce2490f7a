import { type Command, InvalidArgumentError } from 'commander'
import { parseQuantity, parseSetValue } from '../contract/expression'
import type { Setting } from '../documents/set-path'
import type { Compute } from '../usecases/compute'
import type { Streams } from './streams'

/** What a command is given beside its arguments. */
export interface Surroundings {
  readonly streams: Streams
  readonly compute: () => Compute
  readonly environment: Readonly<Record<string, string | undefined>>
  /** Resolves when the person interrupts (Ctrl-C). */
  readonly interrupted: Promise<void>
}

/** A command of the program: how it is called, and what it does; it resolves to an exit code. */
export interface Face {
  readonly declare: (command: Command) => Command
  readonly run: (args: readonly string[], options: Readonly<Record<string, unknown>>, surroundings: Surroundings) => Promise<number>
}

/** `PATH=VALUE` of `--set`, gathered. */
export function gatherSetting(text: string, before: Setting[] | undefined): Setting[] {
  const at = text.indexOf('=')
  if (at < 1) throw new InvalidArgumentError('Write it as PATH=VALUE, for instance converter.resolution_bits=7.')
  return [...(before ?? []), { path: text.slice(0, at).trim(), value: parseSetValue(text.slice(at + 1)) }]
}

/** A whole number of an option, within bounds. */
export function wholeNumber(min: number, max: number) {
  return (text: string): number => {
    const value = /^\d{1,9}$/.test(text) ? Number(text) : NaN
    if (!(value >= min && value <= max)) throw new InvalidArgumentError(`Write a whole number from ${min} to ${max}.`)
    return value
  }
}

/** A positive quantity of an option, with SI prefix, unit or arithmetic. */
export function positiveQuantity(unit: string, max: number) {
  return (text: string): number => {
    const reading = parseQuantity(text, unit)
    if (!reading.ok) throw new InvalidArgumentError(reading.message)
    if (!(reading.value > 0 && reading.value <= max)) throw new InvalidArgumentError(`Write a value above 0 and up to ${max} ${unit}.`)
    return reading.value
  }
}

/** Options that every command with a plan has. */
export function withPlan(command: Command): Command {
  return command
    .argument('<FILE>', 'plan file (*.bank.json); - reads standard input')
    .option('--set <PATH=VALUE>', 'change a value of the plan first; VALUE is JSON, a number with an SI prefix (2G), or else a text; may be repeated', gatherSetting)
}
