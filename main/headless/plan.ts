import { runPlan } from '../usecases/run-plan'
import { withPlan, wholeNumber, type Face } from './command'
import { exit, proceed } from './exit'
import { planOf } from './input'
import { deliver, verdict } from './output'

/** `plan FILE`: the result as JSON. */
export const planCommand: Face = {
  declare: (command) => withPlan(command)
    .description('plan the comparators; the result as JSON on standard output or in a file')
    .option('--out <R.json>', 'write the result into this file')
    .option('--workings <N>', 'give the workings of entry N of the bank instead of those of the tightest', wholeNumber(1, 1_000_000)),
  run: async ([file], options, { streams, compute }) => proceed(await planOf(file, options, streams), streams, async (read) => {
    const workingsFor = options['workings'] as number | undefined
    const planned = await runPlan(compute(), read, workingsFor === undefined ? {} : { workingsFor })
    return proceed(planned, streams, async (result) => {
      const delivered = await deliver(`${JSON.stringify(result)}\n`, options['out'], streams)
      return delivered === exit.done ? verdict(result, streams) : delivered
    })
  }),
}
