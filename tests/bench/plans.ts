import { demos } from '../../main/documents/demos'
import { validatePlan, type ReadPlan } from '../../main/documents/read-plan'
import type { PlanInput } from '../../main/contract/plan'
import { plan } from '../../main/planner/plan'
import { inFreshProcesses } from './fresh'
import { repeated, rowOf, taken, type Measured, type Row, type Taken } from './measure'

/** Aims of the design: a plan of up to 8 bit from a cold start, remedies included; an 8 bit flash at the typical corner while a person types. */
const coldAim_ms = 20_000
const typicalFlashAim_ms = 250
const coldRuns = 5
const warm = { runs: 15, warmUp: 3 }
/** One bit more than the first demo, which no latch can do: the remedies are looked for and verified. */
const stopped = 'stopped'

function read(document: unknown): ReadPlan {
  const reply = validatePlan(document)
  if (!reply.ok) throw new Error(reply.error.message)
  return reply.value
}

function documentOf(which: string): PlanInput {
  const start = structuredClone(demos[which === stopped ? 0 : Number(which)].document) as PlanInput
  if (which === stopped) start.converter.resolution_bits += 1
  return start
}

/** In this process, which has planned nothing before. */
export async function planOnceHere(which: string): Promise<Taken> {
  const { plan: document, card } = read(documentOf(which))
  return taken(() => plan(document, card))
}

async function warmly(which: string): Promise<Taken[]> {
  const { plan: document, card } = read(documentOf(which))
  const { jitter_s } = document.converter
  return repeated((call) => plan({ ...document, converter: { ...document.converter, jitter_s: jitter_s * (1 + call * 1e-6) } }, card), warm)
}

async function rowsOf(index: number): Promise<Row[]> {
  const { plan: document } = read(demos[index].document)
  const { architecture, resolution_bits } = document.converter
  const isTypicalFlash = architecture === 'flash' && resolution_bits === 8 && document.corners.join() === 'typical'
  const name = `${resolution_bits} bit ${architecture === 'sar' ? 'SAR' : 'flash'}, ${document.corners.join(' + ')} (demo ${index + 1})`
  return [
    rowOf(`${name}: cold`, await inFreshProcesses('plan-once', String(index), coldRuns), resolution_bits <= 8 ? coldAim_ms : null),
    rowOf(`${name}: warm`, await warmly(String(index)), isTypicalFlash ? typicalFlashAim_ms : null),
  ]
}

/** Full plans of the demos, cold and warm, and one that cannot be built. */
export async function measurePlans(): Promise<Measured> {
  const rows: Row[] = []
  for (const index of demos.keys()) rows.push(...await rowsOf(index))
  rows.push(rowOf('demo 1 with a bit more, not feasible, remedies found: cold', await inFreshProcesses('plan-once', stopped, 2), coldAim_ms))
  return { rows, notes: [] }
}
