import { runWaves, wavesCsv } from '../usecases/run-waves'
import { positiveQuantity, wholeNumber, withPlan, type Face } from './command'
import { proceed } from './exit'
import { planOf } from './input'
import { deliver } from './output'

const largestOverdrive = 20

/** `waves FILE`: the transient of one comparator as CSV. */
export const wavesCommand: Face = {
  declare: (command) => withPlan(command)
    .description('the transient of one comparator as CSV: time_s, clock_v, then a column a node')
    .option('--overdrive <V>', 'differential overdrive at its input, for instance 5m; else that of its limit', positiveQuantity('V', largestOverdrive))
    .option('--index <N>', 'entry of the bank', wholeNumber(1, 1_000_000), 1)
    .option('--out <W.csv>', 'write the waves into this file'),
  run: async ([file], options, { streams, compute }) => proceed(await planOf(file, options, streams), streams, async (read) => {
    const asked = { index: options['index'] as number, overdrive_v: (options['overdrive'] as number | undefined) ?? null }
    return proceed(await runWaves(compute(), read, asked), streams, (waves) => deliver(wavesCsv(waves), options['out'], streams))
  }),
}
