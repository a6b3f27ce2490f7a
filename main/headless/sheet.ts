import { InvalidArgumentError, Option } from 'commander'
import { makePlanSheet, sheetDate } from '../usecases/make-sheet'
import { withPlan, type Face } from './command'
import { exit, proceed } from './exit'
import { planOf } from './input'
import { deliver, verdict } from './output'

function dateOf(text: string): Date {
  const date = new Date(`${text}T00:00:00Z`)
  const real = /^\d{4}-\d\d-\d\d$/.test(text) && !Number.isNaN(date.getTime()) && date.toISOString().startsWith(text)
  if (!real) throw new InvalidArgumentError('Write a date as YYYY-MM-DD.')
  return date
}

/** `sheet FILE --out S.pdf`: the hand-over document. */
export const sheetCommand: Face = {
  declare: (command) => withPlan(command)
    .description('plan the comparators and set the hand-over sheet as PDF')
    .requiredOption('--out <S.pdf>', 'write the sheet into this file; - writes it to standard output')
    .addOption(new Option('--paper <SIZE>', 'paper').choices(['a4', 'letter']).default('a4'))
    .option('--date <YYYY-MM-DD>', 'date on the sheet; else SOURCE_DATE_EPOCH, else today (UTC)', dateOf),
  run: async ([file], options, { streams, compute, environment }) => proceed(await planOf(file, options, streams), streams, async (read) => {
    const date = (options['date'] as Date | undefined) ?? sheetDate(environment)
    const made = await makePlanSheet(compute(), read, { paper: options['paper'] === 'letter' ? 'LETTER' : 'A4', date })
    return proceed(made, streams, async ({ bytes, result }) => {
      const delivered = await deliver(bytes, options['out'], streams)
      return delivered === exit.done ? verdict(result, streams) : delivered
    })
  }),
}
