import { builtInCard } from '../../main/documents/cards'
import type { CornerName } from '../../main/contract/choices'
import { analyseLatch, type LatchAnalysis } from '../../main/planner/latch/analysis'
import type { Circuit } from '../../main/planner/latch/circuit'
import { conditionsOf } from '../../main/planner/latch/condition'
import { strongArm } from '../../main/planner/latch/strong-arm'
import { workedLatches, type WorkedLatch } from '../independent/cases'
import { repeated, rowOf, type Measured, type Row } from './measure'

const giveUpAfter = 1e-6
const often = { runs: 25, warmUp: 10, batch: 20 }

/** The circuit of a worked case; of a corner with two temperatures, the cold one. */
function circuitOf(latch: WorkedLatch, corner: CornerName): { circuit: Circuit; name: string } {
  const card = builtInCard(latch.card)
  if (card === null) throw new RangeError(`no card ${latch.card}`)
  const condition = conditionsOf(card, [corner]).at(-1)!
  const circuit = strongArm({
    card, condition, widths: latch.widths, commonMode: latch.common_mode_v, load: latch.load_f, clockRise: latch.clock_rise_s, trimCapacitance: 0,
  })
  return { circuit, name: `${latch.card}, ${condition.name}` }
}

function analysed(circuit: Circuit, departure?: number): LatchAnalysis {
  const found = analyseLatch(circuit, giveUpAfter, departure)
  if (typeof found === 'string') throw new RangeError(found)
  return found
}

async function rowsOf(latch: WorkedLatch, corner: CornerName): Promise<Row[]> {
  const { circuit, name } = circuitOf(latch, corner)
  const { departure } = analysed(circuit)
  return [
    rowOf(`${name}: with the large-signal stretch`, await repeated(() => analysed(circuit), often)),
    rowOf(`${name}: without it`, await repeated(() => analysed(circuit, departure), often)),
  ]
}

/** Passes of the engine over the strong-arm latches of the worked cases, and over the first at its cold slow corner. */
export async function measureEngine(): Promise<Measured> {
  const latches = workedLatches()
  const rows: Row[] = []
  for (const latch of latches) rows.push(...await rowsOf(latch, 'typical'))
  rows.push(...await rowsOf(latches[0], 'slow'))
  return { rows, notes: [] }
}
