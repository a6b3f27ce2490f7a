import { chromium, type Page } from '@playwright/test'
import { demos } from '../../main/documents/demos'
import type { PlanInput } from '../../main/contract/plan'
import { startLoopback } from '../../main/loopback'
import { browserArguments, browserPath, prepareBrowser } from '../e2e/browser'
import { field, openWindow, type Wire } from '../e2e/window'
import { cpuNow, rowOf, type Measured, type Row, type Taken } from './measure'
import { nextPicture, watchPictures } from './picture-watch'

const cycles = 6
const stops = 3
const resolution = 'converter.resolution_bits'

/** A change: a key in a field, after a text has been put there or not. */
interface Edit { readonly path: string; readonly text: string | null; readonly key: 'Enter' | 'ArrowUp' | 'ArrowDown' }
interface Timed { readonly picture: Taken; readonly reply: Taken | null; readonly changed: boolean; readonly stops: boolean }
interface Desk { readonly page: Page; readonly wire: Wire; readonly quiet: () => Promise<void> }

/** Down a bit, a new jitter, up again, a new rate: no plan comes twice, so none is remembered. */
function edits({ converter }: PlanInput): Edit[] {
  const jitter = converter.jitter_s ?? 1.5e-13
  return Array.from({ length: cycles }, (_, i): Edit[] => [
    { path: resolution, text: null, key: 'ArrowDown' },
    { path: 'converter.jitter_s', text: `${(jitter * 1e15 * (1 + 0.01 * (i + 1))).toFixed(2)} fs`, key: 'Enter' },
    { path: resolution, text: null, key: 'ArrowUp' },
    { path: 'converter.sample_rate_hz', text: `${((converter.sample_rate_hz / 1e6) * (1 - 0.002 * (i + 1))).toFixed(3)} M`, key: 'Enter' },
  ]).flat()
}

/** Effective bits as the demo asks for them, then a resolution that cannot be built with them, and back. */
function stoppedEdits(enob: number, key: 'ArrowUp' | 'ArrowDown'): { before: Edit; edit: Edit; after: Edit }[] {
  return Array.from({ length: stops }, (_, i) => ({
    before: { path: 'converter.enob_bits', text: (enob - 0.001 * i).toFixed(3), key: 'Enter' },
    edit: { path: resolution, text: null, key },
    after: { path: resolution, text: null, key: key === 'ArrowUp' ? 'ArrowDown' : 'ArrowUp' },
  }))
}

/** Resolves when no request has been under way for a moment: the waves of the new plan are drawn, too. */
function quietWatch(page: Page): () => Promise<void> {
  let [pending, since] = [0, Date.now()]
  const count = (by: number) => () => { [pending, since] = [pending + by, Date.now()] }
  page.on('request', count(1))
  page.on('requestfinished', count(-1))
  page.on('requestfailed', count(-1))
  return async () => {
    while (pending > 0 || Date.now() - since < 150) await page.waitForTimeout(25)
  }
}

async function enter({ page, wire, quiet }: Desk, { path, text, key }: Edit): Promise<Timed> {
  await quiet()
  const target = await field(page, path)
  await target.focus()
  if (text !== null) await target.fill(text)
  const cpu = cpuNow()
  await target.press(key)
  const { key: pressed, reply, picture, changed } = await page.evaluate(nextPicture)
  const cpu_ms = cpuNow() - cpu
  await quiet()
  const last = wire.last()?.reply
  if (!last?.ok) throw new Error(`${path} ${text ?? key}: ${last?.error.message ?? 'no reply'}`)
  return {
    picture: { wall_ms: picture - pressed, cpu_ms },
    reply: reply === null ? null : { wall_ms: reply - pressed, cpu_ms: null },
    changed, stops: last.value.result.findings.some(({ severity }) => severity === 'stop'),
  }
}

function rowsOf(name: string, all: readonly Timed[]): Row[] {
  return [
    rowOf(`${name}: key to picture`, all.map(({ picture }) => picture)),
    rowOf(`${name}: of which until the reply is there`, all.flatMap(({ reply }) => (reply === null ? [] : [reply]))),
  ]
}

/** One demo: 24 changes that can be built, effective bits left to their default, and three that cannot. */
async function measureDemo(page: Page, url: string, index: number): Promise<Measured> {
  const { converter, ...rest } = structuredClone(demos[index].document) as PlanInput
  const { enob_bits = converter.resolution_bits - 0.6, ...open } = converter
  const start: PlanInput = { ...rest, converter: open }
  const desk: Desk = { page, wire: await openWindow(page, url, start), quiet: quietWatch(page) }
  await desk.quiet()
  await page.evaluate(watchPictures)
  const timed: Timed[] = []
  for (const edit of edits(start)) timed.push(await enter(desk, edit))
  const stopped: Timed[] = []
  for (const { before, edit, after } of stoppedEdits(enob_bits, converter.architecture === 'flash' ? 'ArrowUp' : 'ArrowDown')) {
    await enter(desk, before)
    stopped.push(await enter(desk, edit))
    await enter(desk, after)
  }
  const name = `${converter.resolution_bits} bit ${converter.architecture === 'sar' ? 'SAR' : 'flash'} (demo ${index + 1})`
  const said = (all: readonly Timed[]) => `${all.filter(({ changed }) => changed).length} of ${all.length} new pictures differ in pixels, ${all.filter((one) => one.stops).length} of the plans stop`
  return {
    rows: [...rowsOf(name, timed), rowOf(`${name}: key to picture, not feasible, remedies found`, stopped.map(({ picture }) => picture))],
    notes: [`  demo ${index + 1}: ${said(timed)}; not feasible: ${said(stopped)}`],
  }
}

/** Keystroke to picture in the built window, served by the loopback host of this process. */
export async function measureEdits(): Promise<Measured> {
  await prepareBrowser()
  const host = await startLoopback()
  const browser = await chromium.launch({ executablePath: browserPath(), args: browserArguments, headless: true })
  const all: Measured[] = []
  try {
    for (const index of demos.keys()) {
      const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, locale: 'en-GB', timezoneId: 'UTC' })
      all.push(await measureDemo(await context.newPage(), host.url, index))
      await context.close()
    }
    return {
      rows: all.flatMap(({ rows }) => rows),
      notes: [...all.flatMap(({ notes }) => notes), `  browser ${browser.version()}; CPU is that of the host and its workers, without the browser`],
    }
  } finally {
    await browser.close()
    await host.close()
  }
}
