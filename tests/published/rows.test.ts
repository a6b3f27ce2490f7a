import { capacitanceOffset } from '../../main/planner/models/offset/node-capacitance'
import { describe, expect, it } from 'vitest'
import { thermalVoltage } from '../../main/planner/constants'
import { effectiveBits, jitterPower, quantisationPower, samplingPower, sndr } from '../../main/planner/models/budget/error-power'
import { feedthroughCapacitance } from '../../main/planner/models/input/load'
import { waldenFigure } from '../../main/planner/models/merit/figures'
import { mosDevice, mosEvaluate, mosNoise, mosPoint, type MosDevice } from '../../main/planner/models/mos/device'
import { pairSpread, tapVariance } from '../../main/planner/models/offset/mismatch'
import { trimCapacitanceChange, trimStep } from '../../main/planner/models/offset/trim'
import { decisionDelay, metastableOverdrive, neededOverdrive, tauLimit } from '../../main/planner/models/timing/metastability'
import { cardNamed } from '../planner/latch/bench'
import { plainWidths, planned, sarOf } from '../planner/plans'
import { ladderFeedthrough } from './ladder'
import rows from './rows.json'
import { expectCrossCheck, expectPrinted, expectSilicon } from './tolerance'

describe('time (seen)', () => {
  it(`regeneration: ${rows.regeneration.source}`, () => {
    const { given: { time_s, growth }, tauPs } = rows.regeneration
    const supply = 1
    const overdrive = supply / (2 * growth)
    expectPrinted(1e12 * tauLimit(time_s, 0, supply, overdrive), tauPs, 'τ')
    expectPrinted(1e12 * decisionDelay(0, 1e-12 * Number(tauPs), supply, overdrive), '600', 'time in ps')
  })

  it(`metastable fraction: ${rows.metastability.source}`, () => {
    const { given: { tau_s, time_s }, fraction, withOneMoreLatch } = rows.metastability
    const lsb = 0.01
    /** Error rate whose overdrive n latches just bring to half an LSB. */
    const unresolved = (latches: number) => {
      const small = metastableOverdrive(1e-9, lsb)
      return small / neededOverdrive(small, lsb, latches, time_s, tau_s)
    }
    expectPrinted(unresolved(1), fraction, 'one latch')
    expectPrinted(unresolved(2), withOneMoreLatch, 'one more')
  })
})

describe('error power (seen)', () => {
  it(`sampled noise: ${rows.sampledNoise.source}`, () => {
    const { at1pFMicrovolt, amplitude_v, capacitancePf } = rows.sampledNoise
    const oneSide = (capacitance: number) => samplingPower(300, 2 * capacitance)
    expectPrinted(1e6 * Math.sqrt(oneSide(1e-12)), at1pFMicrovolt, 'at 1 pF')
    const at1pF = sndr(2 * amplitude_v, oneSide(1e-12))
    for (const [decibel, printed] of Object.entries(capacitancePf)) expectPrinted(10 ** ((Number(decibel) - at1pF) / 10), printed, `${decibel} dB`)
  })

  it(`jitter: ${rows.jitter.source}`, () => {
    const { given: { jitter_s, frequency_hz }, snrDb } = rows.jitter
    expectPrinted(sndr(0.8, jitterPower(frequency_hz, jitter_s, 0.8)), snrDb, 'SNR')
  })

  it(`quantisation: ${rows.quantisation.source}`, () => {
    const { sqnrDb, tolerance } = rows.quantisation
    for (const [bits, printed] of Object.entries(sqnrDb)) {
      expectCrossCheck(sndr(1, quantisationPower(2 ** -Number(bits))), printed, tolerance.relative, `${bits} bit: ${tolerance.with}: ${tolerance.reason}`)
    }
  })

  it.each(rows.walden.rows)(`figure of merit $femtojoule fJ: ${rows.walden.source}`, ({ power_w, rate_hz, sndr_db, femtojoule }) => {
    const enob = effectiveBits(1, 1 / 8 / 10 ** (sndr_db / 10))
    expectPrinted(1e15 * waldenFigure(power_w, enob, rate_hz), femtojoule)
  })
})

/** A device without mobility and length terms, as the sources have it. */
function idealDevice(slope: number, gamma = 1, width = 1e-6): MosDevice {
  const kind = { threshold: 0.4, kp: 4e-4, slope, thetaAtMinimum: 0, lambdaAtMinimum: 0, gamma, minimumLength: 1e-7, thermal: thermalVoltage(300) }
  return mosDevice(kind, width, 1e-7)
}

/** Gate voltage of an inversion coefficient: ln²(1 + e^a) = IC, source grounded. */
const gateFor = (inversion: number, slope: number): number => 0.4 + slope * 2 * thermalVoltage(300) * Math.log(Math.expm1(Math.sqrt(inversion)))

function saturated(device: MosDevice, inversion: number) {
  const point = mosPoint()
  mosEvaluate(device, gateFor(inversion, device.slope), 5, 0, point)
  return point
}

describe('device', () => {
  it.each(Object.entries(rows.inversion.transconductance))('g_m n U_T/I at inversion coefficient %s (derived)', (inversion, printed) => {
    const slope = 1.3
    const { gateG, current } = saturated(idealDevice(slope), Number(inversion))
    expectPrinted((gateG * slope * thermalVoltage(300)) / current, printed)
  })

  it(`current in moderate inversion (seen): ${rows.moderateInversion.source}`, () => {
    const { given: { transconductance_s, inversion, slope }, microampere } = rows.moderateInversion
    const probe = saturated(idealDevice(slope), inversion)
    const sized = saturated(idealDevice(slope, 1, (1e-6 * transconductance_s) / probe.gateG), inversion)
    expect(sized.gateG / transconductance_s).toBeCloseTo(1, 9)
    expectPrinted(1e6 * sized.current, microampere)
  })

  it(`noise of an integrating input pair (derived): ${rows.integratedNoise.source}`, () => {
    const { given: { transconductance_s, time_s, gamma, temperature_k }, millivolt } = rows.integratedNoise
    const probe = saturated(idealDevice(1, gamma), 30)
    const device = idealDevice(1, gamma, (1e-6 * transconductance_s) / probe.gateG)
    // One-sided density of one device is the two-sided density of the pair's difference.
    const charge = mosNoise(device, saturated(device, 30), temperature_k) * time_s
    expectPrinted((1e3 * Math.sqrt(charge)) / (transconductance_s * time_s), millivolt)
  })

  it(`mismatch of a pair (seen): ${rows.pairMismatch.source}`, () => {
    const { given, thresholdMv, factorPercent, silicon } = rows.pairMismatch
    const square = (coefficient: number) => pairSpread(coefficient, 1e-6, 1e-6)
    expectPrinted(1e3 * square(1e-9 * Number(thresholdMv)), thresholdMv, 'of one square micrometre')
    const { n } = cardNamed(given.card)
    expectSilicon(1e3 * square(n.avt_v_m), thresholdMv, silicon.factor, 'card, threshold')
    expectSilicon(1e2 * square(n.abeta_m), factorPercent, silicon.factor, 'card, current factor')
  })
})

describe('offset', () => {
  it(`unequal node capacitance, V_T for each unit of it (seen): ${rows.unequalCapacitance.source}`, () => {
    const { given: { threshold_v, ratio }, linearMv, exactMv } = rows.unequalCapacitance
    // Half of the ratio moved from one node to the other makes nodes that differ by it.
    const moved = trimStep(ratio / 2, threshold_v, 1)
    expectPrinted(1e3 * moved, linearMv, 'linear')
    expectPrinted(1e3 * capacitanceOffset(threshold_v, 1 + ratio), exactMv, 'exact')
    expect(trimCapacitanceChange(1, moved, threshold_v)).toBeCloseTo(ratio, 12)
  })

  it(`one LSB at three sigma (seen): ${rows.threeSigma.source}`, () => {
    const { given: { bits, fullScale_v }, sigmaMv } = rows.threeSigma
    const { comparators } = planned(sarOf(bits, 1e7, {
      'converter.full_scale_v': fullScale_v, 'converter.sar.range_loss': 2 ** -bits, 'comparator.sizing': 'manual', 'comparator.widths': plainWidths,
    }))
    expectPrinted(1e3 * comparators[0].limits.offset_v, sigmaMv)
  })
})

describe('ladder (derived)', () => {
  it.each(Object.entries(rows.ladder.midScaleLsb))('spread of the middle tap, %s bit', (bits, printed) => {
    const codes = 2 ** Number(bits)
    expectPrinted(Math.sqrt(tapVariance(1, rows.ladder.elementSigma, codes, codes / 2)), printed)
  })

  it(`feedthrough in the middle: ${rows.feedthrough.source}`, () => {
    const { frequencyResistanceCapacitance: product, share, taps, nodal } = rows.feedthrough
    const [frequency, resistance] = [1e9, 200]
    const capacitance = feedthroughCapacitance(9, frequency, resistance)
    expectPrinted((2 ** -9 * product) / (frequency * resistance * capacitance), share)
    expectCrossCheck(ladderFeedthrough(taps, frequency, resistance, capacitance), 2 ** -9, nodal.relative, `${nodal.with}: ${nodal.reason}`)
  })
})
