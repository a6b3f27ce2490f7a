import { expect, it } from 'vitest'
import { unbroken } from '../../../app/text/numbers'

it.each([
  ['12.3 fJ a decision', '12.3\u00a0fJ a decision'], ['2.5 % of the power', '2.5\u00a0% of the power'], ['63 comparators', '63 comparators'],
  ['2 GS/s in 4 lanes', '2\u00a0GS/s in 4 lanes'], ['30 µm² each', '30\u00a0µm² each'], ['3 mm wide', '3\u00a0mm wide'], ['5 V²', '5\u00a0V²'],
])('“%s” does not break between a number and its unit', (text, bound) => {
  expect(unbroken(text)).toBe(bound)
})
