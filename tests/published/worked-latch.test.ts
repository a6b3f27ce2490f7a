import { describe, expect, it } from 'vitest'
import { builtInCard } from '../../main/documents/cards'
import { analyseLatch } from '../../main/planner/latch/analysis'
import { conditionsOf } from '../../main/planner/latch/condition'
import { cycleEnergy, evaluateFully } from '../../main/planner/latch/cycle'
import { strongArm } from '../../main/planner/latch/strong-arm'
import { transientDelay } from '../../main/planner/latch/transient'
import { pairSpread } from '../../main/planner/models/offset/mismatch'
import { decisionDelay } from '../../main/planner/models/timing/metastability'
import { workedLatches, type WorkedLatch } from '../independent/cases'

/** The worked latches name what one card asks of a pair too. */
type Expected = WorkedLatch['expect'] & {
  sigma_vt_v: { input: number; cross_n: number; cross_p: number; reset: number }
  sigma_kp: { input: number; cross_n: number }
}

const within = (value: number, expected: number, share: number, what: string) =>
  expect(Math.abs(value / expected - 1), `${what}: ${value} instead of ${expected}`).toBeLessThanOrEqual(share)

function engineOf(worked: WorkedLatch) {
  const card = builtInCard(worked.card)!
  const [condition] = conditionsOf(card, ['typical'])
  const { widths, common_mode_v: commonMode, load_f: load, clock_rise_s: clockRise } = worked
  const circuit = strongArm({ card, condition, widths, commonMode, load, clockRise, trimCapacitance: 0 })
  const analysis = analyseLatch(circuit, 1e-6)
  if (typeof analysis === 'string') throw new RangeError(analysis)
  return { card, circuit, analysis }
}

/** Tolerances are those written beside the cases, see worked-cases.json. */
describe.each(workedLatches().map((worked) => ({ card: worked.card, worked })))('worked strong-arm latch, $card (computed independently, not published)', ({ worked }) => {
  const wanted = worked.expect as Expected
  const { card, circuit, analysis } = engineOf(worked)
  const overdrives = Object.entries(wanted.delay_s).map(([name, delay]): [string, number, number] => [name, parseFloat(name) * 1e-3, delay])

  it('capacitances', () => {
    const { X, O, tail, clock_gates } = wanted.capacitance_f
    const found = [...circuit.sideCapacitance, ...circuit.sharedCapacitance, circuit.clockGates]
    ;[X, O, tail, clock_gates].forEach((expected, i) => within(found[i], expected, 1e-3, `capacitance ${i}`))
  })

  it('regeneration 1 %, integration 0.5 ps', () => {
    within(analysis.tau, wanted.tau_s, 0.01, 'τ')
    expect(Math.abs(analysis.integration - wanted.integration_s)).toBeLessThan(0.5e-12)
  })

  it.each(overdrives)('delay at %s by the transient, 1 %', (_, overdrive, delay) => {
    within(transientDelay(circuit, overdrive, 1e-6)!, delay, 0.01, 'delay')
  })

  it.each(overdrives.filter(([, overdrive]) => overdrive <= 1e-3))('delay at %s by the formula, 1 %', (_, overdrive, delay) => {
    within(decisionDelay(analysis.integration, analysis.tau, circuit.supply, overdrive), delay, 0.01, 'delay')
  })

  it('delay at 10 mV by the formula: late by at most 15 %, never early', () => {
    const late = decisionDelay(analysis.integration, analysis.tau, circuit.supply, 1e-2) / wanted.delay_s['10mV']
    expect(late).toBeGreaterThan(0.99)
    expect(late).toBeLessThan(1.15)
  })

  it('threshold weights: input 1 %, others 0.005, reset pairs below 0.01', () => {
    const { input, cross_n, cross_p, reset_x, reset_o } = analysis.thresholdWeight
    within(input!, wanted.offset_weight_vt.input, 0.01, 'input')
    expect(Math.abs(cross_n! - wanted.offset_weight_vt.cross_n)).toBeLessThanOrEqual(0.005)
    expect(Math.abs(cross_p! - wanted.offset_weight_vt.cross_p)).toBeLessThanOrEqual(0.005)
    expect(Math.max(Math.abs(reset_x!), Math.abs(reset_o!))).toBeLessThan(0.01)
  })

  it('current-factor weights, 3 %', () => {
    within(analysis.gainWeight.input!, wanted.offset_weight_kp_v.input, 0.03, 'input')
    within(analysis.gainWeight.cross_n!, wanted.offset_weight_kp_v.cross_n, 0.03, 'cross n')
  })

  it('spread of every pair, to the digits given', () => {
    const of = (coefficient: number, name: 'input' | 'cross_n' | 'cross_p' | 'reset_x') => {
      const { width, length } = circuit.devices.find((d) => d.pair === name)!.device
      return pairSpread(coefficient, width, length)
    }
    const { sigma_vt_v: vt, sigma_kp: kp } = wanted
    within(of(card.n.avt_v_m, 'input'), vt.input, 3e-4, 'V_T input')
    within(of(card.n.avt_v_m, 'cross_n'), vt.cross_n, 3e-4, 'V_T cross n')
    within(of(card.p.avt_v_m, 'cross_p'), vt.cross_p, 3e-4, 'V_T cross p')
    within(of(card.p.avt_v_m, 'reset_x'), vt.reset, 3e-4, 'V_T reset')
    within(of(card.n.abeta_m, 'input'), kp.input, 3e-4, 'k_p input')
    within(of(card.n.abeta_m, 'cross_n'), kp.cross_n, 3e-4, 'k_p cross n')
  })

  it('noise, 4 %', () => within(analysis.noise, wanted.noise_v, 0.04, 'noise'))

  it('energy of a cycle at 5 mV, 3 %', () => {
    const { state } = evaluateFully(circuit, 5e-3, analysis.tau)
    within(cycleEnergy(circuit, state, analysis.tau).energy, wanted.energy_j, 0.03, 'energy')
  })
})
