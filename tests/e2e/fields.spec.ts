import type { Page } from '@playwright/test'
import { conditionsOf, sections } from '../../app/rooms/brief/sections'
import { quantityOf } from '../../app/text/labels'
import { dropAt, putAt, sameJson, valueAt } from '../../app/state/paths'
import { choices, laterValues, type Choice } from '../../main/contract/choices'
import type { PlanInput } from '../../main/contract/plan'
import { resolutionRange, type Quantity } from '../../main/contract/quantities'
import { formatExact } from '../../main/contract/units'
import { expect, test } from './host'
import { choose, field, openWindow, smallFlash, smallSar, type, unfoldAll, type Wire } from './window'

const texts = ['title', 'author', 'revision', 'notes']
const later = (path: string): readonly string[] => (Object.hasOwn(choices, path) ? ((choices as Record<string, Choice>)[path].later ?? []) : [])

/** A value a field may have that it has not now. */
function another(path: string, quantity: Quantity, now: unknown): number {
  if (path === 'converter.resolution_bits') return now === 5 ? 6 : 5
  if (quantity.integer) return typeof now === 'number' ? (now < quantity.max ? now + 1 : now - 1) : quantity.min + 4
  if (typeof now !== 'number') return quantity.unit === 'Hz' ? 2e6 : 6e-12
  const moved = Number((now === 0 ? Math.min(quantity.max, 1e-15) : now * 1.04).toPrecision(3))
  return moved <= quantity.max ? moved : Number((now * 0.97).toPrecision(3))
}

/** The start for a group of fields: the document in which they have an effect, or null while that is still to come. */
function startFor(path: string): PlanInput | null {
  const base: PlanInput = structuredClone(path.startsWith('converter.sar.') ? smallSar : smallFlash)
  const conditions = conditionsOf(path)
  const second = conditions.some(({ is }) => is === 'double_tail') ? { second_tail_m: 2e-6, second_input_m: 1e-6 } : {}
  for (const condition of conditions) {
    if (later(condition.path).includes(condition.is)) return null
    putAt(base, condition.path, condition.is)
    if (condition.path === 'comparator.sizing' && condition.is === 'manual') {
      putAt(base, 'comparator.widths', { input_m: 2e-6, cross_n_m: 1.5e-6, cross_p_m: 1.5e-6, tail_m: 2e-6, reset_m: 5e-7, ...second })
    }
  }
  return base
}

const paths = sections.flatMap(({ fields }) => fields)
const groups = paths.reduce((found, path) => {
  const start = startFor(path)
  const key = JSON.stringify(start)
  return start === null ? found : found.set(key, [...(found.get(key) ?? []), path])
}, new Map<string, string[]>())

async function plannedWith(wire: Wire, wanted: Map<string, unknown>): Promise<void> {
  await expect.poll(() => {
    const last = wire.last()
    if (!last?.reply.ok) return last === null ? 'nothing yet' : JSON.stringify(last.reply)
    const { plan } = last.reply.value.result
    return [...wanted].filter(([path, value]) => !sameJson(valueAt(plan, path), value)).map(([path, value]) => `${path} ${JSON.stringify(value)}`)
  }, { timeout: 60_000 }).toEqual([])
}

async function editQuantity(page: Page, wire: Wire, path: string, quantity: Quantity): Promise<number | null> {
  const last = wire.last()
  const now = last?.reply.ok ? valueAt(last.reply.value.result.plan, path) : undefined
  const value = another(path, quantity, now)
  if (laterValues.some((one) => one.path === path && one.later(value, last?.document))) return null
  await type(page, path, formatExact(value, quantity.unit))
  return value
}

async function editOther(page: Page, path: string): Promise<unknown> {
  if (texts.includes(path)) {
    const target = await field(page, path)
    await target.fill(`Another ${path}`)
    await target.blur()
    return `Another ${path}`
  }
  if (path === 'process.card') {
    await choose(page, path, 'Generic 40 nm planar')
    return 'generic-40'
  }
  if (path === 'corners') {
    await page.getByText('Fast', { exact: true }).click()
    return ['typical', 'fast']
  }
  const target = await field(page, path)
  if (laterValues.some((one) => one.path === path)) await expect(target).toBeDisabled()
  return undefined
}

test('every field of the brief is part of a group that is edited, or waits for what is still to come', () => {
  const waiting = paths.filter((path) => startFor(path) === null)
  expect(waiting.every((path) => conditionsOf(path).some((condition) => later(condition.path).includes(condition.is)))).toBe(true)
  expect([...groups.values()].flat().length + waiting.length).toBe(paths.length)
})

for (const [start, all] of groups) {
  const fields = all.filter((path) => !Object.hasOwn(choices, path) && path !== 'overrides')
  if (fields.length === 0) continue
  test(`quantities and words reach the plan: ${fields.length} fields from ${fields[0]}`, async ({ page, host }) => {
    test.setTimeout(240_000)
    const wire = await openWindow(page, host.url, JSON.parse(start) as PlanInput)
    await wire.settled()
    await unfoldAll(page)
    const wanted = new Map<string, unknown>()
    for (const path of fields) {
      const quantity = quantityOf(path)
      const value = quantity ? await editQuantity(page, wire, path, quantity) : await editOther(page, path)
      if (value !== undefined && value !== null) wanted.set(path, value)
    }
    expect(wanted.size).toBeGreaterThan(0)
    await plannedWith(wire, wanted)
    const written = wire.last()?.document
    for (const [path, value] of wanted) expect(valueAt(written, path), path).toEqual(value)
    await undoAll(page)
    await expect.poll(() => sameJson(wire.last()?.document, JSON.parse(start))).toBe(true)
  })
}

async function undoAll(page: Page): Promise<void> {
  const undo = page.getByRole('button', { name: /^Undo/ })
  while (await undo.isEnabled()) await undo.click()
}

test('a field that is cleared goes back to its default', async ({ page, host }) => {
  const plan = structuredClone(smallFlash)
  putAt(plan, 'converter.inl_lsb', 0.7)
  const wire = await openWindow(page, host.url, plan)
  await expect(await field(page, 'converter.inl_lsb')).toHaveValue('0.7')
  await type(page, 'converter.inl_lsb', '')
  await plannedWith(wire, new Map([['converter.inl_lsb', 0.5]]))
  dropAt(plan, 'converter.inl_lsb')
  expect(wire.last()?.document).toEqual(plan)
})

async function chooseEach(page: Page, wire: Wire, path: string, choice: Choice): Promise<void> {
  for (const [value, label] of Object.entries(choice.options)) {
    await (await field(page, path)).click()
    const option = page.getByRole('option', { name: label, exact: true })
    if (choice.later?.includes(value)) {
      await expect(option).toHaveAttribute('aria-disabled', 'true')
      await expect(option).toContainText('not available yet')
      await page.keyboard.press('Escape')
    } else {
      await option.click()
      await plannedWith(wire, new Map([[path, value]]))
    }
  }
}

for (const [start, fields] of groups) {
  const own = Object.entries(choices as Record<string, Choice>).filter(([path]) => fields.includes(path) && path !== 'converter.architecture')
  if (own.length === 0) continue
  test(`every option reaches the plan, or says that it is not available yet: ${own.map(([, { label }]) => label).join(', ')}`, async ({ page, host }) => {
    test.setTimeout(240_000)
    const wire = await openWindow(page, host.url, JSON.parse(start) as PlanInput)
    await unfoldAll(page)
    for (const [path, choice] of own) await test.step(path, () => chooseEach(page, wire, path, choice))
  })
}

test('the architecture changes the block that is shown, and keeps the other', async ({ page, host }) => {
  const plan = structuredClone(smallFlash)
  putAt(plan, 'converter.flash.ladder_ohm', 150)
  const wire = await openWindow(page, host.url, plan)
  await choose(page, 'converter.architecture', 'SAR')
  await plannedWith(wire, new Map([['converter.architecture', 'sar']]))
  await unfoldAll(page)
  await expect(page.locator('[data-path="converter.sar.unit_cap_f"]')).toBeVisible()
  await expect(page.locator('[data-path="converter.flash.ladder_ohm"]')).toHaveCount(0)
  expect(valueAt(wire.last()?.document, 'converter.flash.ladder_ohm')).toBe(150)
  expect(resolutionRange.sar[0]).toBeLessThanOrEqual(4)
})
