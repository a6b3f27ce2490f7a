import type { Page } from '@playwright/test'
import { expect, test } from './host'
import { bytesOf, openWindow, smallFlash } from './window'

const focusedPath = (page: Page) => page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['path'] ?? '')
const focusedRoom = (page: Page) => page.evaluate(() => document.activeElement?.closest<HTMLElement>('[data-room]')?.dataset['room'] ?? '')

async function tabTo(page: Page, path: string): Promise<void> {
  for (let step = 0; step < 80 && (await focusedPath(page)) !== path; step += 1) await page.keyboard.press('Tab')
  expect(await focusedPath(page)).toBe(path)
}

test('from the first screen to the sheet without a pointer', async ({ page, host }) => {
  test.setTimeout(150_000)
  const wire = await openWindow(page, host.url)
  await wire.settled()
  await tabTo(page, 'converter.sample_rate_hz')
  await page.keyboard.type('1.5G')
  await page.keyboard.press('Enter')
  await tabTo(page, 'comparator.offset_method')
  await page.keyboard.press('Enter')
  await page.getByRole('listbox').waitFor()
  await page.keyboard.type('Size')
  await page.keyboard.press('Enter')
  await expect.poll(() => wire.last()?.document.comparator?.offset_method, { timeout: 60_000 }).toBe('size')
  expect(wire.last()?.document.converter.sample_rate_hz).toBe(1.5e9)
  await page.keyboard.press('Control+z')
  await expect.poll(() => wire.last()?.document.comparator?.offset_method, { timeout: 60_000 }).not.toBe('size')
  await wire.settled()
  await page.keyboard.press('F6')
  expect(await focusedRoom(page)).toBe('bank')
  await page.keyboard.press('Home')
  await page.keyboard.press('ArrowRight')
  await expect(page.locator('#bank-cell')).toContainText('Comparator 2,')
  await page.keyboard.press('F6')
  expect(await focusedRoom(page)).toBe('below')
  await expect(page.getByRole('tab', { name: 'Waves' })).toBeFocused()
  await page.keyboard.press('Shift+F6')
  expect(await focusedRoom(page)).toBe('bank')
  const download = page.waitForEvent('download')
  await page.keyboard.press('Control+e')
  expect((await bytesOf(await download)).subarray(0, 5).toString()).toBe('%PDF-')
})

test('F6 goes round all rooms and comes back to where the keyboard was', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await tabTo(page, 'converter.lanes')
  const seen: string[] = []
  for (let step = 0; step < 6; step += 1) {
    await page.keyboard.press('F6')
    seen.push(await focusedRoom(page))
  }
  expect(new Set(seen)).toEqual(new Set(['bar', 'brief', 'bank', 'below', 'totals', 'ledger']))
  expect(await focusedPath(page)).toBe('converter.lanes')
})

test('the bank is walked and zoomed with keys alone', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  const grid = page.getByRole('grid', { name: 'Comparators' })
  await grid.press('Home')
  await expect(grid).toHaveAttribute('aria-activedescendant', 'bank-cell')
  const cell = page.locator('#bank-cell')
  const row = Number(await page.locator('.bank-grid [role=row]').getAttribute('aria-rowindex'))
  await grid.press('ArrowUp')
  expect(Number(await page.locator('.bank-grid [role=row]').getAttribute('aria-rowindex'))).toBe(row - 1)
  const small = await cell.boundingBox()
  await grid.press('+')
  await expect.poll(async () => (await cell.boundingBox())?.width ?? 0).toBeGreaterThan((small?.width ?? 0) * 1.4)
  await grid.press('End')
  const frame = await page.locator('.bank-frame').boundingBox()
  const last = await cell.boundingBox()
  expect(last?.y).toBeGreaterThanOrEqual(frame?.y ?? 0)
  expect((last?.x ?? 0) + (last?.width ?? 0)).toBeLessThanOrEqual((frame?.x ?? 0) + (frame?.width ?? 0))
  await grid.press('0')
  await expect.poll(async () => (await cell.boundingBox())?.width ?? 0).toBeCloseTo(small?.width ?? 0, 0)
})

test('F1 lists the keys, and Escape goes back', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await page.keyboard.press('F1')
  const dialog = page.getByRole('dialog', { name: 'Keyboard' })
  await expect(dialog).toContainText('Ctrl+E')
  await page.keyboard.press('Escape')
  await expect(dialog).toHaveCount(0)
})
