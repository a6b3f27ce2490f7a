import { describe, expect, test } from 'vitest'
import { settingOf, workedLatches } from './cases'
import { energyPerCycle } from './cycle'
import { delayAt, integrationTime, offsetEquivalent, regenerationTime } from './decision'
import { capacitances } from './netlists'
import { noiseSigma } from './noise'
import type { Pair } from './setting'

const within = (value: number, expected: number, share: number) => expect(Math.abs(value / expected - 1)).toBeLessThanOrEqual(share)

describe('worked cases (computed independently, not published)', () => {
  test('there are two', () => expect(workedLatches()).toHaveLength(2))

  describe.each(workedLatches().map((worked) => ({ card: worked.card, worked })))('strong-arm latch, $card', ({ worked }) => {
    const setting = settingOf(worked)
    const wanted = worked.expect
    const vtWeight = (pair: Pair) => offsetEquivalent(setting, { what: 'vt', pair, amount: 10e-3 })
    const kpWeight = (pair: Pair) => offsetEquivalent(setting, { what: 'kp', pair, amount: 0.02 })

    test('capacitances', () => {
      const found = capacitances(setting)
      within(found.internal, wanted.capacitance_f.X, 1e-3)
      within(found.output, wanted.capacitance_f.O, 1e-3)
      within(found.tail, wanted.capacitance_f.tail, 1e-3)
      within(found.clockGates, wanted.capacitance_f.clock_gates, 1e-3)
    })

    test('regeneration 1 %, integration 0.5 ps', () => {
      within(regenerationTime(setting), wanted.tau_s, 0.01)
      expect(Math.abs(integrationTime(setting) - wanted.integration_s)).toBeLessThan(0.5e-12)
    })

    test.each(Object.entries(wanted.delay_s))('delay at %s, 1 %', (overdrive, delay) => {
      within(delayAt(setting, parseFloat(overdrive) * 1e-3), delay, 0.01)
    })

    test('threshold weights: input 1 %, others 0.005, reset pairs below 0.01', () => {
      within(vtWeight('input'), wanted.offset_weight_vt.input, 0.01)
      expect(Math.abs(vtWeight('cross_n') - wanted.offset_weight_vt.cross_n)).toBeLessThan(0.005)
      expect(Math.abs(vtWeight('cross_p') - wanted.offset_weight_vt.cross_p)).toBeLessThan(0.005)
      expect(Math.abs(vtWeight('reset_internal'))).toBeLessThan(0.01)
      expect(Math.abs(vtWeight('reset_output'))).toBeLessThan(0.01)
    })

    test('current-factor weights, 3 %', () => {
      within(kpWeight('input'), wanted.offset_weight_kp_v.input, 0.03)
      within(kpWeight('cross_n'), wanted.offset_weight_kp_v.cross_n, 0.03)
    })

    test('noise, 4 %', () => within(noiseSigma(setting, 8000, 7), wanted.noise_v, 0.04))

    test('energy of a cycle, 3 %', () => {
      const phase = 15 * setting.clock_rise_s
      within(energyPerCycle(setting, 5e-3, phase, phase), wanted.energy_j, 0.03)
    })
  })
})
