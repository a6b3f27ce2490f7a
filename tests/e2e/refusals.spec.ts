import { laterValues } from '../../main/contract/choices'
import { putAt } from '../../app/state/paths'
import { quantityOf } from '../../app/text/labels'
import { expect, test } from './host'
import { choose, field, openFile, openWindow, smallFlash, smallSar, type } from './window'

const nonsense = [
  ['converter.sample_rate_hz', '2 bananas', /not understood/], ['converter.sample_rate_hz', '2g', /not understood/],
  ['converter.resolution_bits', '6.5', /whole numbers/], ['converter.resolution_bits', '40', /Not in the range 2 bit to 10 bit/],
  ['converter.yield', '101 %', /Not in the range/], ['converter.full_scale_v', '1/0', /divides by zero/], ['converter.lanes', '-3', /Not in the range/],
  ['converter.jitter_s', '<img src=x>', /not understood/], ['converter.sample_rate_hz', '', /Type a number/],
] as const

test('nonsense is refused beside its field, kept as it was typed, and leaves the plan alone', async ({ page, host }) => {
  const wire = await openWindow(page, host.url, smallFlash)
  for (const [path, text, said] of nonsense) {
    await test.step(`“${text}” in ${path}`, async () => {
      const target = await field(page, path)
      await type(page, path, text)
      await target.blur()
      await expect(target).toHaveValue(text)
      await expect(target).toHaveAttribute('aria-invalid', 'true')
      await expect(page.locator('.field', { has: target }).locator('.mistake')).toHaveText(said)
      expect(wire.last()?.document).toEqual(smallFlash)
      await target.focus()
      await target.press('Escape')
      await target.blur()
      await expect(target).not.toHaveAttribute('aria-invalid', 'true')
    })
  }
})

test('Enter says at once what is wrong, and Undo shows the value of the document in the field with the keyboard', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  const target = await field(page, 'converter.sample_rate_hz')
  await type(page, 'converter.sample_rate_hz', '5')
  await expect(target).toBeFocused()
  await expect(target).toHaveAttribute('aria-invalid', 'true')
  await expect(page.locator('.field', { has: target }).locator('.mistake')).toContainText('Did you mean 5 MS/s? Type 5M.')
  await target.press('Escape')
  await type(page, 'converter.sample_rate_hz', '250M')
  await target.press('Control+z')
  await expect(target).toHaveValue('500 MS/s')
  await target.press('Control+Shift+z')
  await expect(target).toHaveValue('250 MS/s')
})

test('what was typed stays while its section is folded and another plan step is undone', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  await type(page, 'converter.lanes', 'two')
  await type(page, 'converter.resolution_bits', '5')
  await page.getByRole('button', { name: 'Converter 1 to mend' }).click()
  await page.getByRole('button', { name: 'Undo “resolution 5 bit”' }).click()
  await page.getByRole('button', { name: 'Converter 1 to mend' }).click()
  await expect(page.locator('[data-path="converter.lanes"]')).toHaveValue('two')
})

test('what is understood is said while it is typed', async ({ page, host }) => {
  await openWindow(page, host.url, smallFlash)
  const target = await field(page, 'converter.full_scale_v')
  await target.focus()
  await target.fill('2/3*0.9')
  await expect(page.locator('.echo')).toHaveText('= 600.0 mV')
  await target.fill('600 m')
  await expect(page.locator('.echo')).toHaveText('= 600.0 mV')
})

test('a brief that cannot be planned keeps the last picture and says so, until it is mended', async ({ page, host }) => {
  const plan = structuredClone(smallFlash)
  putAt(plan, 'converter.resolution_bits', 3)
  putAt(plan, 'converter.enob_bits', 2.4)
  const wire = await openWindow(page, host.url, plan)
  await expect(page.getByText('7 comparators along the ladder')).toBeVisible()
  await choose(page, 'converter.architecture', 'SAR')
  const target = await field(page, 'converter.resolution_bits')
  await expect(page.locator('.field', { has: target }).locator('.mistake')).toContainText('4')
  await expect(page.getByText('of the last valid brief').first()).toBeVisible()
  await expect(page.getByText('7 comparators along the ladder')).toBeVisible()
  await type(page, 'converter.resolution_bits', '5')
  await expect(page.getByText('of the last valid brief')).toHaveCount(0)
  await wire.settled()
  await expect(page.getByText('one comparator, 5 cycles')).toBeVisible()
})

for (const { path } of laterValues.filter((one) => quantityOf(one.path))) {
  test(`what is still to come in ${path} is refused by name`, async ({ page, host }) => {
    await openWindow(page, host.url, smallSar)
    await type(page, path, '2')
    const target = await field(page, path)
    await expect(page.locator('.field', { has: target }).locator('.mistake')).toContainText('for now')
    await expect(page.getByText('one comparator, 8 cycles')).toBeVisible()
  })
}

const broken = [
  ['not JSON at all', 'hello', /not opened/], ['another program’s JSON', '{"a": 1}', /not opened/],
  ['a plan with a wrong value', JSON.stringify({ ...smallFlash, converter: { ...smallFlash.converter, lanes: 'two' } }), /lanes/],
] as const
for (const [what, text, said] of broken) {
  test(`${what} is not opened, and the plan on the desk stays`, async ({ page, host }) => {
    await openWindow(page, host.url, smallFlash)
    const title = await page.getByRole('heading', { level: 1 }).textContent()
    await openFile(page, 'broken.bank.json', text)
    await expect(page.getByRole('alert')).toContainText(said)
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(title ?? '')
    await page.getByRole('button', { name: 'Close the notice' }).click()
    await expect(page.getByRole('alert')).toHaveCount(0)
  })
}
