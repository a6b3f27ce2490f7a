import { all, create, type Complex } from 'mathjs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { builtInCards } from '../../../main/documents/cards'
import { boltzmann, thermalVoltage } from '../../../main/planner/constants'
import { mosCurrent, mosDevice, mosEvaluate, mosKind, mosNoise, mosPoint, type MosDevice } from '../../../main/planner/models/mos/device'

type Volts = readonly [gate: number, drain: number, source: number]

const math = create(all)
const complex = (re: number, im = 0): Complex => math.complex(re, im)

const someDevice = fc.record({
  card: fc.constantFrom(...builtInCards),
  kind: fc.constantFrom('n' as const, 'p' as const),
  temperature: fc.constantFrom(233, 300, 398),
  width: fc.double({ min: 1e-7, max: 1e-4, noNaN: true }),
  longer: fc.double({ min: 1, max: 5, noNaN: true }),
}).map(({ card, kind, temperature, width, longer }) =>
  mosDevice(mosKind(card[kind], card.l_min_m, temperature, 0.02, 0.93), width, card.l_min_m * longer))
const volt = fc.double({ min: -0.3, max: 1.4, noNaN: true })
const someVolts = fc.tuple(volt, volt, volt)
const runs = { numRuns: 400, seed: 5 }

const evaluated = (device: MosDevice, [gate, drain, source]: Volts) => {
  const point = mosPoint()
  mosEvaluate(device, gate, drain, source, point)
  return point
}

const equation = math.compile('scale * (ell(a)^2 - ell(b)^2) * (1 + lambda * (vd - vs)) / (1 + theta * ell(a))')
const ell = math.compile('log(1 + exp(x))')

/** The published equation in complex numbers: the imaginary part of I(v + ih)/h is the derivative without any difference taken. */
function complexCurrent(device: MosDevice, [gate, drain, source]: readonly Complex[]): Complex {
  const against = (terminal: Complex) => math.evaluate('((vg - vt) / n - v) * half', {
    vg: gate, vt: device.threshold, n: device.slope, v: terminal, half: device.halfInverse,
  }) as Complex
  return equation.evaluate({
    ell: (x: Complex): Complex => ell.evaluate({ x }) as Complex,
    a: against(source), b: against(drain), vd: drain, vs: source, scale: device.scale, lambda: device.lambda, theta: device.theta,
  }) as Complex
}

const smallest = 1e-30

function complexSlope(device: MosDevice, volts: Volts, terminal: number): number {
  return complexCurrent(device, volts.map((v, i) => complex(v, i === terminal ? smallest : 0))).im / smallest
}

/** Central difference of order 8. */
function difference(device: MosDevice, volts: Volts, terminal: number): number {
  const h = 1.5e-3
  const at = (steps: number) => mosCurrent(device, ...(volts.map((v, i) => (i === terminal ? v + steps * h : v)) as unknown as Volts))
  const weights = [4 / 5, -1 / 5, 4 / 105, -1 / 280]
  return weights.reduce((sum, weight, i) => sum + weight * (at(i + 1) - at(-i - 1)), 0) / h
}

describe('derivatives of the device equation', () => {
  it('are analytic: equal to the complex step, in every region', () => {
    fc.assert(fc.property(someDevice, someVolts, (device, volts) => {
      const { gateG, drainG, sourceG, current } = evaluated(device, volts)
      const scale = Math.abs(gateG) + Math.abs(drainG) + Math.abs(sourceG)
      const room = 1e-9 * scale + 1e-25
      ;[gateG, drainG, sourceG].forEach((slope, i) => expect(Math.abs(slope - complexSlope(device, volts, i))).toBeLessThanOrEqual(room))
      expect(Math.abs(current - complexCurrent(device, volts.map((v) => complex(v))).re)).toBeLessThanOrEqual(1e-9 * Math.abs(current) + 0.1 * room)
    }), runs)
  })

  it('are those of the current that the transient uses: equal to high-order differences', () => {
    fc.assert(fc.property(someDevice, someVolts, (device, volts) => {
      const { gateG, drainG, sourceG, current } = evaluated(device, volts)
      const scale = Math.abs(gateG) + Math.abs(drainG) + Math.abs(sourceG)
      const room = 1e-6 * scale + 1e-24
      ;[gateG, drainG, sourceG].forEach((slope, i) => expect(Math.abs(slope - difference(device, volts, i))).toBeLessThanOrEqual(room))
      expect(current).toBeCloseTo(mosCurrent(device, ...volts), 14)
    }), runs)
  })
})

describe('laws of the device equation', () => {
  it('the bulk is the reference: source and drain by δ and the gate by nδ change nothing', () => {
    fc.assert(fc.property(someDevice, someVolts, (device, volts) => {
      const { gateG, drainG, sourceG } = evaluated(device, volts)
      expect(Math.abs(device.slope * gateG + drainG + sourceG)).toBeLessThanOrEqual(1e-10 * (Math.abs(drainG) + Math.abs(sourceG)) + 1e-25)
    }), runs)
  })

  it('no voltage along the channel, no current; turned round, it flows back', () => {
    fc.assert(fc.property(someDevice, someVolts, (device, [gate, drain, source]) => {
      expect(mosCurrent(device, gate, drain, drain)).toBe(0)
      expect(Math.sign(mosCurrent(device, gate, drain, source)) * Math.sign(drain - source)).not.toBe(-1)
    }), runs)
  })

  it('never breaks, however far the voltages', () => {
    const device = mosDevice(mosKind(builtInCards[0].n, 1e-7, 233, 0, 1), 1e-6, 1e-7)
    for (const far of [-1e3, -50, 50, 1e3]) {
      for (const volts of [[far, 0, 0], [0, far, 0], [0, 0, far], [far, far, 0]] satisfies Volts[]) {
        expect(Object.values(evaluated(device, volts)).every(Number.isFinite), String(volts)).toBe(true)
        expect(Number.isFinite(mosCurrent(device, volts[0], volts[1], volts[2]))).toBe(true)
      }
    }
  })

  it('weak inversion: a decade for each n·U_T·ln 10, strong inversion: a square', () => {
    const kind = { ...mosKind(builtInCards[0].n, 1e-7, 300, 0, 1), thetaAtMinimum: 0, lambdaAtMinimum: 0 }
    const device = mosDevice(kind, 1e-6, 1e-7)
    const decade = device.slope * thermalVoltage(300) * Math.LN10
    const deep = device.threshold - 0.8
    expect(mosCurrent(device, deep, 1, 0) / mosCurrent(device, deep - decade, 1, 0)).toBeCloseTo(10, 3)
    const square = (over: number) => mosCurrent(device, device.threshold + over, 50, 0)
    expect(square(8) / square(4)).toBeCloseTo(4, 6)
    expect(square(8) / ((kind.kp * 10 * 8 ** 2) / (2 * device.slope))).toBeCloseTo(1, 6)
  })

  it('at rest along the channel, noise is that of a conductance: 4kT·g (its sign is never lost)', () => {
    fc.assert(fc.property(someDevice, volt, volt, (device, gate, level) => {
      const point = evaluated(device, [gate, level, level])
      const density = mosNoise(device, point, 300)
      expect(density).toBeGreaterThanOrEqual(0)
      expect(Math.abs(density - 4 * boltzmann * 300 * (point.drainG + device.gamma * Math.max(point.gateG, 0)))).toBeLessThanOrEqual(1e-9 * density)
    }), runs)
  })
})
