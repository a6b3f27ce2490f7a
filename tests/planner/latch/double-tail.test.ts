import { describe, expect, it } from 'vitest'
import { conditionsOf } from '../../../main/planner/latch/condition'
import { cycleEnergy, evaluateFully } from '../../../main/planner/latch/cycle'
import { doubleTail } from '../../../main/planner/latch/double-tail'
import { transientDelay } from '../../../main/planner/latch/transient'
import { decisionDelay } from '../../../main/planner/models/timing/metastability'
import { energyPerCycle } from '../../independent/cycle'
import { delayAt, offsetEquivalent } from '../../independent/decision'
import { noiseSigma } from '../../independent/noise'
import type { Setting } from '../../independent/setting'
import settled from '../../published/double-tail-case.json'
import { expectPrinted } from '../../published/tolerance'
import { analysed, cardNamed } from './bench'

/** The latch of the settled case at two cards and two common modes. */
function bothSides(cardId: string, commonMode: number) {
  const card = cardNamed(cardId)
  const [condition] = conditionsOf(card, ['typical'])
  const widths = { ...settled.widths, input_length_m: card.l_min_m }
  const circuit = doubleTail({ card, condition, widths, commonMode, load: settled.load_f, clockRise: settled.clock_rise_s, trimCapacitance: 0 })
  const setting: Setting = {
    topology: 'double_tail', card, vdd_v: card.vdd_v, temperature_k: 300, widths, load_f: settled.load_f, clock_rise_s: settled.clock_rise_s,
    common_mode_v: commonMode, trim_cap_f: 0,
  }
  return { circuit, setting, analysis: analysed(circuit) }
}

/** Input that balances 10 mV of V_T difference, from the independent full circuit [V/V]. */
const weightOf = (setting: Setting, pair: 'input' | 'second_input' | 'cross_n' | 'cross_p') => offsetEquivalent(setting, { what: 'vt', pair, amount: 0.01 })

describe('the double tail gives the figures it was specified with', () => {
  const { circuit, analysis } = bothSides(settled.card, settled.common_mode_v)

  it('delays of the full circuit', () => {
    expectPrinted(transientDelay(circuit, 1e-4, 1e-6)! * 1e12, settled.expect.delay_ps['0.1mV'])
    expectPrinted(transientDelay(circuit, 1e-3, 1e-6)! * 1e12, settled.expect.delay_ps['1mV'])
    expectPrinted(transientDelay(circuit, 1e-2, 1e-6)! * 1e12, settled.expect.delay_ps['10mV'])
  })

  it('weights of the second stage', () => {
    expectPrinted(analysis.thresholdWeight.cross_p!, settled.expect.offset_weight_vt.cross_p)
    expectPrinted(analysis.thresholdWeight.second_input!, settled.expect.offset_weight_vt.second_input)
    expectPrinted(analysis.thresholdWeight.cross_n!, settled.expect.offset_weight_vt.cross_n)
  })
})

describe.each([['generic-28', 0.5], ['generic-28', 0.6], ['generic-65', 0.6], ['generic-65', 0.75]] as const)('the double tail and the independent full circuit, %s at %f V', (card, commonMode) => {
  const { circuit, setting, analysis } = bothSides(card, commonMode)

  it('delays: 2 % by the formula, 1 % by the transient', () => {
    for (const v of [1e-4, 1e-3]) {
      expect(Math.abs(decisionDelay(analysis.integration, analysis.tau, circuit.supply, v) / delayAt(setting, v) - 1), `formula at ${v} V`).toBeLessThan(0.02)
    }
    for (const v of [1e-4, 1e-3, 1e-2, 5e-2]) {
      expect(Math.abs(transientDelay(circuit, v, 1e-6)! / delayAt(setting, v) - 1), `transient at ${v} V`).toBeLessThan(0.01)
    }
  })

  it('offset of 10 mV in each pair: 1 % of it, or of 10 mV where it hardly counts', () => {
    for (const pair of ['input', 'second_input', 'cross_n', 'cross_p'] as const) {
      const independent = weightOf(setting, pair)
      expect(Math.abs(analysis.thresholdWeight[pair]! - independent), pair).toBeLessThan(Math.max(0.01 * Math.abs(independent), 0.002))
    }
  })

  it('noise: 3 % of seeded stochastic runs', () => {
    expect(Math.abs(analysis.noise / noiseSigma(setting, 5000, 5) - 1)).toBeLessThan(0.03)
  })

  it('energy of a cycle: 3 %', () => {
    const { state } = evaluateFully(circuit, 5e-3, analysis.tau)
    const { energy } = cycleEnergy(circuit, state, analysis.tau)
    expect(Math.abs(energy / energyPerCycle(setting, 5e-3, 30 * settled.clock_rise_s, 30 * settled.clock_rise_s) - 1)).toBeLessThan(0.03)
  })
})
