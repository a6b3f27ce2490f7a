import type { Page } from '@playwright/test'
import { expect, test } from './host'
import { bytesOf, field, openPlan, openWindow, smallFlash, total, type } from './window'

async function saved(page: Page, keys: string) {
  const download = page.waitForEvent('download')
  await page.keyboard.press(keys)
  return download
}

test('what is saved is what was typed, and opens again as the same plan', async ({ page, host }) => {
  const wire = await openWindow(page, host.url, smallFlash)
  await openPlan(page, smallFlash)
  await type(page, 'converter.full_scale_v', '1/2 * 1.2 V - 0.1')
  await expect(page.getByTestId('saved-state')).toHaveText('not saved')
  const download = await saved(page, 'Control+s')
  expect(download.suggestedFilename()).toBe('test.bank.json')
  await expect(page.getByTestId('saved-state')).toHaveText(/^saved \d\d:\d\d$/)
  const text = (await bytesOf(download)).toString()
  expect(JSON.parse(text)).toEqual({ ...smallFlash, converter: { ...smallFlash.converter, full_scale_v: 0.5 } })
  await type(page, 'converter.resolution_bits', '5')
  await expect(page.getByTestId('saved-state')).toHaveText(/^changed since/)
  await page.keyboard.press('Control+z')
  await expect(page.getByTestId('saved-state')).toHaveText(/^saved/)
  await wire.settled()
  const power = await total(page, 'power').textContent()
  await openPlan(page, JSON.parse(text) as typeof smallFlash, 'again.bank.json')
  await expect(page.getByTestId('saved-state')).toHaveText('as opened')
  await wire.settled()
  await expect(total(page, 'power')).toHaveText(power ?? '')
})

test('text under way is entered before it is saved', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  const rate = await field(page, 'converter.sample_rate_hz')
  await rate.focus()
  await rate.fill('400M')
  const download = await saved(page, 'Control+s')
  expect(JSON.parse((await bytesOf(download)).toString())).toMatchObject({ converter: { sample_rate_hz: 4e8 } })
})

test('a new plan is named after its title when it is saved as a file', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await type(page, 'title', 'Tide gauge: façade/2')
  const download = await saved(page, 'Control+Shift+s')
  expect(download.suggestedFilename()).toMatch(/^Tide-gauge-.*-2\.bank\.json$/)
})

test('a plan file that is dropped on the window is opened', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await page.evaluate((text) => {
    const data = new DataTransfer()
    data.items.add(new File([text], 'dropped.bank.json', { type: 'application/json' }))
    window.dispatchEvent(new DragEvent('drop', { dataTransfer: data, bubbles: true, cancelable: true }))
  }, JSON.stringify({ ...smallFlash, title: 'Dropped' }))
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Dropped')
  await expect(page.getByText('in dropped.bank.json')).toBeVisible()
})

test('changes that are not saved are asked about before another plan takes their place', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await openPlan(page, smallFlash)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Small flash')
  await type(page, 'converter.resolution_bits', '5')
  await openPlan(page, { ...smallFlash, title: 'Other' })
  const dialog = page.getByRole('dialog', { name: 'Leave changes behind?' })
  await dialog.getByRole('button', { name: 'Stay here' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Small flash')
  await openPlan(page, { ...smallFlash, title: 'Other' })
  await dialog.getByRole('button', { name: 'Leave them' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Other')
})

test('what was not saved is offered after the page is gone and back', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await openPlan(page, smallFlash)
  await type(page, 'title', 'Kept through a crash')
  await expect.poll(() => page.evaluate(() => window.localStorage.getItem('latchwright.recovery'))).toContain('Kept through a crash')
  page.on('dialog', (dialog) => void dialog.accept())
  await page.reload()
  await expect(page.getByText('“Kept through a crash” was not saved')).toBeVisible()
  await page.getByRole('button', { name: 'Restore' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Kept through a crash')
  await expect(page.getByTestId('saved-state')).toHaveText('not saved')
})

test('leaving the page with changes asks first, without them it does not', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  const asked: string[] = []
  page.on('dialog', (dialog) => {
    asked.push(dialog.type())
    void dialog.accept()
  })
  await page.reload()
  expect(asked).toEqual([])
  await type(page, 'title', 'Changed')
  await expect(page.getByTestId('saved-state')).toHaveText('not saved')
  await page.reload()
  expect(asked).toEqual(['beforeunload'])
})

for (const paper of ['A4', 'Letter']) {
  test(`the sheet comes as a PDF on ${paper}`, async ({ page, host }) => {
    const wire = await openWindow(page, host.url, smallFlash)
    await wire.settled()
    if (paper === 'Letter') {
      await page.getByRole('button', { name: /^Paper of the sheet/ }).click()
      await page.getByRole('menuitemradio', { name: 'Letter' }).click()
    }
    const download = await saved(page, 'Control+e')
    expect(download.suggestedFilename()).toMatch(/\.pdf$/)
    const bytes = (await bytesOf(download)).toString('latin1')
    expect(bytes.startsWith('%PDF-')).toBe(true)
    expect(bytes).toMatch(paper === 'A4' ? /MediaBox \[0 0 595\.28 841\.89\]/ : /MediaBox \[0 0 612(\.00)? 792(\.00)?\]/)
  })
}

test('nothing the window does leaves its host', async ({ page, host }) => {
  const wire = await openWindow(page, host.url)
  await openPlan(page, smallFlash)
  await wire.settled()
  for (const tab of ['Budget', 'Corners', 'Findings', 'Workings', 'Waves']) await page.getByRole('tab', { name: new RegExp(`^${tab}`) }).click()
  await saved(page, 'Control+e')
  const { origin } = new URL(host.url)
  expect(wire.requests.filter((url) => !url.startsWith(`${origin}/`) && !/^(data|blob):/.test(url))).toEqual([])
})
