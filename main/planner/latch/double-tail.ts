import { drainPerWidth, gatePerWidth, overlapPerWidth } from '../models/mos/capacitance'
import { mosDevice } from '../models/mos/device'
import { clock, clockBar, ground, input, opposite, own, shared, supply, type Circuit, type CircuitDevice } from './circuit'
import type { LatchSetting } from './setting'

const D = 0
const O = 1
const T1 = 0
const T2 = 1
/** Width of the inverter that makes the second clock, as a part of the second tail's. */
const inverterPart = 0.25

function devices({ card, condition: { n, p }, widths: w }: LatchSetting): CircuitDevice[] {
  const short = card.l_min_m
  return [
    { pair: 'input', polarity: 'n', device: mosDevice(n, w.input_m, w.input_length_m), gate: input, drain: own(D), source: shared(T1) },
    { pair: 'reset_x', polarity: 'p', device: mosDevice(p, w.reset_m, short), gate: clock, drain: own(D), source: supply },
    { pair: 'second_input', polarity: 'n', device: mosDevice(n, w.second_input_m!, short), gate: own(D), drain: own(O), source: ground },
    { pair: 'cross_n', polarity: 'n', device: mosDevice(n, w.cross_n_m, short), gate: opposite(O), drain: own(O), source: ground },
    { pair: 'cross_p', polarity: 'p', device: mosDevice(p, w.cross_p_m, short), gate: opposite(O), drain: own(O), source: shared(T2) },
    { pair: null, polarity: 'n', device: mosDevice(n, w.tail_m, short), gate: clock, drain: shared(T1), source: ground },
    { pair: null, polarity: 'p', device: mosDevice(p, w.second_tail_m!, short), gate: clockBar, drain: shared(T2), source: supply },
  ]
}

/**
 * The double-tail latch: an input stage with its own tail whose outputs D steer a regenerating stage O, which holds O low
 * in reset and whose p tail turns on with the inverted clock. Side nodes D, O; shared nodes T1, T2.
 */
export function doubleTail(setting: LatchSetting): Circuit {
  const { card, condition, widths: w } = setting
  const gate = gatePerWidth(card, card.l_min_m)
  const drain = drainPerWidth(card)
  const wire = card.cap.wire_f
  const second = w.second_input_m!
  const inner = (w.input_m + w.reset_m) * drain + second * gate + wire + setting.trimCapacitance + w.extra_cap_f
  const output = (w.cross_n_m + w.cross_p_m) * (drain + gate + overlapPerWidth(card)) + second * drain + wire + setting.load
  return {
    sideNodes: ['d', 'o'],
    sharedNodes: ['tail', 'tail2'],
    inner: D,
    output: O,
    sideCapacitance: [inner, output],
    sharedCapacitance: [(2 * w.input_m + w.tail_m) * drain + wire, (2 * w.cross_p_m + w.second_tail_m!) * drain + wire],
    sideStart: [condition.supply, 0],
    sharedStart: [
      Math.max(0, (setting.commonMode - condition.n.threshold) / condition.n.slope),
      condition.supply - (condition.supply - condition.p.threshold) / condition.p.slope,
    ],
    sharedDecided: [0, condition.supply],
    devices: devices(setting),
    supply: condition.supply,
    commonMode: setting.commonMode,
    clockRise: setting.clockRise,
    temperature: condition.temperature,
    clockGates: (w.tail_m + w.second_tail_m! + 2 * w.reset_m + inverterPart * w.second_tail_m!) * gate,
  }
}
