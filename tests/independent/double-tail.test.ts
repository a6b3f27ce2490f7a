import { describe, expect, test } from 'vitest'
import { doubleTail } from './cases'
import { delayAt, offsetEquivalent } from './decision'
import type { Pair } from './setting'

/** Half a unit of the last printed digit. */
const printed = (value: number, digits: string) =>
  expect(Math.abs(value - Number(digits))).toBeLessThanOrEqual(0.5 * 10 ** -(digits.split('.')[1]?.length ?? 0))

describe('double-tail latch (computed when it was specified, not published)', () => {
  test.each(Object.entries(doubleTail.expect.delay_ps))('delay at %s', (overdrive, digits) => {
    printed(delayAt(doubleTail.setting, parseFloat(overdrive) * 1e-3) * 1e12, digits)
  })

  test.each(Object.entries(doubleTail.expect.offset_weight_vt))('threshold weight of %s', (pair, digits) => {
    printed(offsetEquivalent(doubleTail.setting, { what: 'vt', pair: pair as Pair, amount: 10e-3 }), digits)
  })

  test('the input pair weighs one', () => {
    expect(offsetEquivalent(doubleTail.setting, { what: 'vt', pair: 'input', amount: 10e-3 })).toBeCloseTo(1, 6)
  })
})
