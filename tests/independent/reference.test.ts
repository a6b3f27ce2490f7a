import { describe, expect, test } from 'vitest'
import { settingOf, workedLatches } from './cases'
import { resetLeftover } from './cycle'
import { delayAt, offsetEquivalent } from './decision'
import type { Device } from './device'
import { fillCurrents, fillCurrentsAndNoise, packDevices, thermalEnergyAt } from './device'
import { integrate } from './dormandPrince'
import { noiseSigma } from './noise'
import { normalNumbers } from './random'

const setting = settingOf(workedLatches()[0])

describe('device', () => {
  const device = (kind: 'n' | 'p'): Device =>
    ({ kind, width_m: 2e-6, length_m: 6e-8, gate: 0, drain: 1, source: 2, vtShift_v: 0, kpFactor: 1 })
  const currentOf = (kind: 'n' | 'p', volts: number[]) => {
    const current = new Float64Array(1)
    fillCurrents(packDevices([device(kind)], setting.card, setting.vdd_v, 350), Float64Array.from(volts), current)
    return current[0]
  }

  test.each([
    ['n', [0.6, 0.8, 0.1]], ['n', [0.3, 0.05, 0]], ['n', [0.9, 0.02, 0.01]], ['p', [0.4, 0.2, 1]], ['p', [0.1, 0.95, 1]],
  ] as const)('noise of %s follows the slopes of its current at %j', (kind, volts) => {
    const h = 1e-5
    const sign = kind === 'n' ? 1 : -1
    const slope = (node: number) => {
      const [up, down] = [[...volts], [...volts]]
      up[node] += h
      down[node] -= h
      return (sign * (currentOf(kind, up) - currentOf(kind, down))) / (2 * h)
    }
    const density = new Float64Array(1)
    const table = packDevices([device(kind)], setting.card, setting.vdd_v, 350)
    fillCurrentsAndNoise(table, Float64Array.from(volts), new Float64Array(1), density)
    const expected = 2 * thermalEnergyAt(350) * (setting.card[kind].gamma * slope(0) + slope(1))
    expect(density[0] / expected).toBeCloseTo(1, 6)
  })

  test('no current without a voltage along the channel', () => expect(currentOf('n', [0.7, 0.2, 0.2])).toBe(0))
})

describe('numerics', () => {
  test('an oscillation comes back, and an event is hit', () => {
    const turn = (_: number, y: Float64Array, dy: Float64Array) => {
      dy[0] = y[1]
      dy[1] = -y[0]
    }
    const state = Float64Array.from([1, 0])
    integrate(turn, state, 0, 2 * Math.PI)
    expect(Math.abs(state[0] - 1) + Math.abs(state[1])).toBeLessThan(1e-6)
    const hit = integrate(turn, state, 0, 10, (y) => y[0])
    expect(hit.hit).toBe(true)
    expect(hit.time).toBeCloseTo(Math.PI / 2, 6)
  })

  test('normal numbers have the moments of a normal law and repeat with their seed', () => {
    const normal = normalNumbers(3)
    const values = Array.from({ length: 200_000 }, normal)
    const moment = (power: number) => values.reduce((sum, value) => sum + value ** power, 0) / values.length
    expect(Math.abs(moment(1))).toBeLessThan(0.01)
    expect(Math.abs(moment(2) - 1)).toBeLessThan(0.015)
    expect(Math.abs(moment(4) - 3)).toBeLessThan(0.15)
    expect(normalNumbers(3)()).toBe(values[0])
    expect(normalNumbers(4)()).not.toBe(values[0])
  })
})

describe('laws of the circuit', () => {
  test('a decision does not care which side wins', () => {
    expect(delayAt(setting, -1e-3) / delayAt(setting, 1e-3)).toBeCloseTo(1, 9)
  })

  test('an offset is proportional to a small mismatch', () => {
    const weight = (amount: number) => offsetEquivalent(setting, { what: 'capacitance', nodes: 'internal', amount })
    expect(weight(0.02) / weight(0.005)).toBeCloseTo(1, 2)
  })

  test('what a reset leaves shrinks with its time', () => {
    const left = [2, 3, 5].map((rises) => Math.abs(resetLeftover(setting, rises * setting.clock_rise_s).output_v))
    expect(left[0]).toBeGreaterThan(10 * left[1])
    expect(left[1]).toBeGreaterThan(10 * left[2])
  })

  test('noise has settled where it is read', () => {
    expect(noiseSigma(setting, 3000, 5, 150) / noiseSigma(setting, 3000, 5, 50)).toBeCloseTo(1, 1)
  })
})
