import { expect, type Download, type Locator, type Page } from '@playwright/test'
import { readFile } from 'node:fs/promises'
import type { PlanInput } from '../../main/contract/plan'
import type { Result } from '../../main/contract/result'
import type { Reply } from '../../main/contract/errors'

type PlanReply = Reply<{ result: Result; revision: number }>

/** What the page asked the planner for and got, as it went over the wire. */
export interface Wire {
  /** The plan of the newest result that is shown, and the document it was asked with. */
  last(): { readonly document: PlanInput; readonly reply: PlanReply } | null
  /** Waits until nothing is being planned. */
  settled(): Promise<void>
  readonly requests: readonly string[]
}

/**
 * Opens the window of a host and waits for the first bank. Pickers are taken away so that files go by upload and download.
 *
 * @param start  the plan that is on the desk first, in place of the first demo
 */
export async function openWindow(page: Page, url: string, start?: PlanInput): Promise<Wire> {
  const wire = listen(page)
  page.on('filechooser', () => undefined)
  if (start) {
    const demos = [{ id: 'start', title: start.title ?? '', document: start }]
    await page.route('**/api/demos.list', (route) => route.fulfill({ json: { ok: true, value: { demos } } }))
  }
  await page.addInitScript(() => {
    Reflect.deleteProperty(window, 'showOpenFilePicker')
    Reflect.deleteProperty(window, 'showSaveFilePicker')
  })
  await page.goto(url)
  await expect(page.getByRole('grid', { name: 'Comparators' })).toBeVisible({ timeout: 60_000 })
  return wire
}

function listen(page: Page): Wire {
  const requests: string[] = []
  let newest: { document: PlanInput; reply: PlanReply } | null = null
  let revision = -1
  page.on('request', (request) => { requests.push(request.url()) })
  page.on('response', async (response) => {
    if (!response.url().endsWith('/api/plan.run')) return
    const asked = response.request().postDataJSON() as { document: PlanInput; revision: number }
    const reply = await response.json().catch(() => null) as PlanReply | null
    if (reply === null || asked.revision < revision || (!reply.ok && reply.error.code === 'cancelled')) return
    revision = asked.revision
    newest = { document: asked.document, reply }
  })
  return {
    requests,
    last: () => newest,
    settled: async () => {
      await expect(page.locator('.bank-state .busy')).toHaveCount(0, { timeout: 60_000 })
      await page.waitForTimeout(50)
    },
  }
}

/** The field of a path of the plan. Its section is unfolded when it is not. */
export async function field(page: Page, path: string): Promise<Locator> {
  const found = page.locator(`[data-path="${path}"]`)
  if (!(await found.isVisible().catch(() => false))) await unfoldAll(page)
  return found
}

/** Unfolds every section of the brief. */
export async function unfoldAll(page: Page): Promise<void> {
  for (;;) {
    const folded = page.locator('.fold-button[aria-expanded="false"]')
    if (await folded.count() === 0) return
    await folded.first().click()
  }
}

/** Types into a quantity's field and enters it. */
export async function type(page: Page, path: string, text: string): Promise<void> {
  const target = await field(page, path)
  await target.focus()
  await target.fill(text)
  await target.press('Enter')
}

/** Chooses an option of a choice's field. */
export async function choose(page: Page, path: string, option: string): Promise<void> {
  await (await field(page, path)).click()
  await page.getByRole('option', { name: option, exact: true }).click()
}

/** Opens a plan as a file of that name. */
export async function openFile(page: Page, name: string, text: string): Promise<void> {
  const chooser = page.waitForEvent('filechooser')
  await page.keyboard.press('Control+o')
  await (await chooser).setFiles({ name, mimeType: 'application/json', buffer: Buffer.from(text) })
}

export const openPlan = (page: Page, plan: PlanInput, name = 'test.bank.json') => openFile(page, name, JSON.stringify(plan))

/** The bytes of what the browser stored. */
export async function bytesOf(download: Download): Promise<Buffer> {
  return readFile(await download.path())
}

/** A figure of the totals, by its label. */
export const total = (page: Page, label: string): Locator => page.locator('.total', { has: page.locator('.small', { hasText: new RegExp(`^${label}`) }) }).locator('.total-figure')

/** A small flash, planned quickly. */
export const smallFlash: PlanInput = {
  schema: 'latchwright.plan/1', title: 'Small flash',
  converter: { architecture: 'flash', resolution_bits: 4, sample_rate_hz: 5e8, full_scale_v: 0.6, common_mode_v: 0.62 },
}

/** A small SAR, planned quickly. */
export const smallSar: PlanInput = {
  schema: 'latchwright.plan/1', title: 'Small SAR',
  converter: { architecture: 'sar', resolution_bits: 8, sample_rate_hz: 1e7, full_scale_v: 0.6, common_mode_v: 0.6 },
}
