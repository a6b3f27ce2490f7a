import { measureEdits } from './edits'
import { measureEngine } from './engine'
import type { Measured } from './measure'
import { measurePlans, planOnceHere } from './plans'
import { measureSheet, sheetOnceHere } from './sheet'

/** Parts of the bench by name, and what they start anew for every run. Each prints one JSON value. */
const parts: Readonly<Record<string, (argument: string) => Promise<unknown>>> = {
  engine: (): Promise<Measured> => measureEngine(),
  plans: (): Promise<Measured> => measurePlans(),
  sheet: (): Promise<Measured> => measureSheet(),
  edits: (): Promise<Measured> => measureEdits(),
  'plan-once': planOnceHere,
  'sheet-once': sheetOnceHere,
}

const [part, argument = ''] = process.argv.slice(2)
process.stdout.write(JSON.stringify(await parts[part](argument)))
