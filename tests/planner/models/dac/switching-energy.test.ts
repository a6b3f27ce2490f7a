import { describe, expect, it } from 'vitest'
import { arrayUnits, type DacScheme } from '../../../../main/planner/models/dac/scheme'
import { meanSwitchingEnergy } from '../../../../main/planner/models/dac/switching-energy'
import { expectExactLaw } from '../../../published/tolerance'
import { energyOfCode, meanOverAllCodes } from './capacitor-array'

const schemes: DacScheme[] = ['conventional', 'split_capacitor', 'monotonic', 'common_mode_based']

describe('mean switching energy', () => {
  it.each(schemes)('%s: equals charge balance on every capacitor, averaged over every code', (scheme) => {
    for (let bits = 4; bits <= 11; bits++) {
      expectExactLaw(meanSwitchingEnergy(scheme, bits), meanOverAllCodes(scheme, bits), `${scheme}, ${bits} bit, all codes`)
    }
  })

  it('where a step is the same for both outcomes but for the side, a code costs what its complement does', () => {
    for (const scheme of ['monotonic', 'common_mode_based'] as const) {
      for (let code = 0; code < 32; code++) expectExactLaw(energyOfCode(scheme, 6, code), energyOfCode(scheme, 6, 63 - code), scheme)
    }
  })

  it('going back costs the conventional array more than going on', () => {
    expect(energyOfCode('conventional', 6, 0)).toBeGreaterThan(energyOfCode('conventional', 6, 63))
  })

  it('the schemes keep their order at every resolution', () => {
    for (let bits = 4; bits <= 18; bits++) {
      const energies = schemes.map((scheme) => meanSwitchingEnergy(scheme, bits))
      expect([...energies].sort((a, b) => b - a)).toEqual(energies)
    }
  })
})

it('array of one side: twice as large where the first weight is tested on it', () => {
  expect(schemes.map((scheme) => arrayUnits(scheme, 10))).toEqual([1024, 1024, 512, 512])
})
