import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { expect, test } from './host'
import { openWindow, smallFlash, type, unfoldAll } from './window'

async function expectClean(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']).analyze()
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${target.join(' ')} ${failureSummary ?? ''}`).join(' | ')}`)).toEqual([])
}

const tooFast = { ...smallFlash, converter: { ...smallFlash.converter, sample_rate_hz: 6e10 } }

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(`in ${colorScheme}`, () => {
    test.use({ colorScheme })
    test.setTimeout(180_000)

    test('every room is without a fault', async ({ page, host }) => {
      const wire = await openWindow(page, host.url, smallFlash)
      await wire.settled()
      await unfoldAll(page)
      for (const tab of ['Waves', 'Budget', 'Corners', 'Findings', 'Workings']) {
        await page.getByRole('tab', { name: new RegExp(`^${tab}`) }).click()
        if (tab === 'Waves') await expect(page.locator('.recharts-surface')).toBeVisible()
        await expectClean(page)
      }
      await page.getByRole('button', { name: /^Comparators/ }).first().click()
      await page.getByRole('button', { name: 'Override', exact: true }).click()
      await page.getByRole('button', { name: /^Noise/ }).click()
      await expectClean(page)
    })

    test('mistakes, stops, menus and dialogs are without a fault', async ({ page, host }) => {
      const wire = await openWindow(page, host.url, tooFast)
      await expect.poll(() => wire.last()?.document.converter.sample_rate_hz, { timeout: 60_000 }).toBe(6e10)
      await wire.settled()
      await type(page, 'converter.lanes', 'many')
      await page.getByRole('tab', { name: /^Findings/ }).click()
      await expect(page.locator('.finding[data-severity=stop]')).not.toHaveCount(0)
      await expectClean(page)
      await page.getByRole('button', { name: 'About' }).click()
      await expect(page.getByRole('dialog')).toContainText('Planning estimates, not sign-off')
      await expectClean(page)
      await page.keyboard.press('Escape')
      await page.getByRole('button', { name: 'Plan menu' }).click()
      await expectClean(page)
    })

    test('a narrow window is without a fault and hides nothing', async ({ page, host }) => {
      await page.setViewportSize({ width: 900, height: 600 })
      const wire = await openWindow(page, host.url)
      await wire.settled()
      await expectClean(page)
      await page.getByRole('button', { name: 'Ledger', exact: true }).click()
      await expect(page.getByRole('region', { name: 'Selected comparator' })).toBeVisible()
      await expectClean(page)
      for (const size of [{ width: 720, height: 450 }, { width: 900, height: 600 }, { width: 1440, height: 900 }]) {
        await page.setViewportSize(size)
        expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth), `at ${size.width}`).toBeLessThanOrEqual(0)
      }
    })
  })
}

test('findings are told to readers, politely', async ({ page, host }) => {
  const wire = await openWindow(page, host.url, tooFast)
  await expect.poll(() => wire.last()?.document.converter.sample_rate_hz, { timeout: 60_000 }).toBe(6e10)
  await wire.settled()
  await expect(page.locator('[aria-live=polite]').filter({ hasText: /Planned: .*stop/ })).toHaveCount(1)
})

test('nothing moves for those who asked for less motion', async ({ page, host }) => {
  await page.emulateMedia({ reducedMotion: 'reduce' })
  await openWindow(page, host.url, smallFlash)
  const durations = await page.evaluate(() => [...document.querySelectorAll('*')].map((node) => getComputedStyle(node).transitionDuration))
  expect(durations.filter((duration) => !/^0s(, 0s)*$/.test(duration))).toEqual([])
})
