import { demos } from '../../main/documents/demos'
import { validatePlan } from '../../main/documents/read-plan'
import type { Result } from '../../main/contract/result'
import { plan } from '../../main/planner/plan'
import { makeSheet, type SheetOptions } from '../../main/sheet/make-sheet'
import { planChecksum } from '../../main/usecases/make-sheet'
import { inFreshProcesses } from './fresh'
import { repeated, rowOf, taken, type Measured, type Taken } from './measure'

function first(): { result: Result; options: SheetOptions } {
  const reply = validatePlan(demos[0].document)
  if (!reply.ok) throw new Error(reply.error.message)
  const { plan: document, card } = reply.value
  return { result: plan(document, card), options: { paper: 'A4', date: new Date(0), version: 'bench', checksum: planChecksum(document) } }
}

/** The first sheet of this process: fonts are unpacked and pdfmake is loaded. */
export async function sheetOnceHere(): Promise<Taken> {
  const { result, options } = first()
  return taken(() => makeSheet(result, options))
}

/** The sheet of the first demo. */
export async function measureSheet(): Promise<Measured> {
  const { result, options } = first()
  const bytes = await makeSheet(result, options)
  return {
    rows: [
      rowOf('demo 1: cold', await inFreshProcesses('sheet-once', '', 3)),
      rowOf('demo 1: warm', await repeated(() => makeSheet(result, options), { runs: 9, warmUp: 2 })),
    ],
    notes: [`  ${Math.round(bytes.length / 1024)} KB, ${result.comparators.length} comparators`],
  }
}
