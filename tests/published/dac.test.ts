import { describe, expect, it } from 'vitest'
import type { DacScheme } from '../../main/planner/models/dac/scheme'
import { meanSwitchingEnergy } from '../../main/planner/models/dac/switching-energy'
import published from './dac.json'
import { expectHighPrecision, expectPrinted } from './tolerance'

const sum = (from: number, to: number, term: (i: number) => number) => {
  let total = 0
  for (let i = from; i <= to; i++) total += term(i)
  return total
}

/**
 * Closed forms of the mean, C_u·V_ref²: conventional and split capacitor after Ginsburg and Chandrakasan (ISCAS 2005) for a differential
 * array, monotonic after Liu et al. (JSSC 45(4), 2010), common-mode based after Zhu et al. (JSSC 45(6), 2010).
 */
const closedForms: Record<DacScheme, (n: number) => number> = {
  conventional: (n) => sum(1, n, (i) => 2 ** (n + 1 - 2 * i) * (2 ** i - 1)),
  split_capacitor: (n) => 2 ** (n - 1) + sum(2, n, (i) => 2 ** (n + 1 - 2 * i) * (2 ** (i - 1) - 1)),
  monotonic: (n) => sum(1, n - 1, (i) => 2 ** (n - 2 - i)),
  common_mode_based: (n) => sum(1, n - 1, (i) => 2 ** (n - 2 - 2 * i) * (2 ** i - 1)),
}

describe('mean switching energy of a capacitive DAC', () => {
  const schemes = Object.keys(closedForms) as DacScheme[]
  it.each(schemes)('%s: 10 bit as quoted', (scheme) => {
    const { bits, values } = published.meanSwitchingEnergy
    expectPrinted(meanSwitchingEnergy(scheme, bits), values[scheme], scheme)
  })

  it.each(schemes)('%s: closed form, 4 to 18 bit', (scheme) => {
    for (let bits = 4; bits <= 18; bits++) expectHighPrecision(meanSwitchingEnergy(scheme, bits), closedForms[scheme](bits), `${scheme}, ${bits} bit`)
  })

  it('monotonic switching saves what its abstract says', () => {
    const { bits, value } = published.monotonicSaving
    const saved = 1 - meanSwitchingEnergy('monotonic', bits) / meanSwitchingEnergy('conventional', bits)
    expectPrinted(100 * saved, value, 'saving in percent')
  })

  it('refuses a resolution without a switched capacitor', () => {
    expect(() => meanSwitchingEnergy('monotonic', 1)).toThrow(RangeError)
    expect(() => meanSwitchingEnergy('monotonic', 4.5)).toThrow(RangeError)
  })
})
