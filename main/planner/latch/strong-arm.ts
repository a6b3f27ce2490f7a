import { drainPerWidth, gatePerWidth, overlapPerWidth } from '../models/mos/capacitance'
import { mosDevice } from '../models/mos/device'
import { clock, ground, input, opposite, own, shared, supply, type Circuit, type CircuitDevice } from './circuit'
import type { LatchSetting } from './setting'

const X = 0
const O = 1
const T = 0

function devices({ card, condition, widths: w }: LatchSetting): CircuitDevice[] {
  const short = card.l_min_m
  return [
    { pair: 'input', polarity: 'n', device: mosDevice(condition.n, w.input_m, w.input_length_m), gate: input, drain: own(X), source: shared(T) },
    { pair: 'cross_n', polarity: 'n', device: mosDevice(condition.n, w.cross_n_m, short), gate: opposite(O), drain: own(O), source: own(X) },
    { pair: 'cross_p', polarity: 'p', device: mosDevice(condition.p, w.cross_p_m, short), gate: opposite(O), drain: own(O), source: supply },
    { pair: 'reset_x', polarity: 'p', device: mosDevice(condition.p, w.reset_m, short), gate: clock, drain: own(X), source: supply },
    { pair: 'reset_o', polarity: 'p', device: mosDevice(condition.p, w.reset_m, short), gate: clock, drain: own(O), source: supply },
    { pair: null, polarity: 'n', device: mosDevice(condition.n, w.tail_m, short), gate: clock, drain: shared(T), source: ground },
  ]
}

/**
 * The strong-arm latch: input pair over a clocked tail, cross-coupled n pair on its drains X, cross-coupled p pair
 * on the outputs O, p reset devices on X and O. Side nodes X, O; shared node T. Capacitances linear, to ground.
 */
export function strongArm(setting: LatchSetting): Circuit {
  const { card, condition, widths: w } = setting
  const gate = gatePerWidth(card, card.l_min_m)
  const drain = drainPerWidth(card)
  const wire = card.cap.wire_f
  const inner = (w.input_m + w.cross_n_m + w.reset_m) * drain + wire + setting.trimCapacitance + w.extra_cap_f
  const output = (w.cross_n_m + w.cross_p_m) * (drain + gate + overlapPerWidth(card)) + w.reset_m * drain + wire + setting.load
  const tail = (2 * w.input_m + w.tail_m) * drain + wire
  return {
    sideNodes: ['x', 'o'],
    sharedNodes: ['tail'],
    inner: X,
    output: O,
    sideCapacitance: [inner, output],
    sharedCapacitance: [tail],
    sideStart: [condition.supply, condition.supply],
    sharedStart: [Math.max(0, (setting.commonMode - condition.n.threshold) / condition.n.slope)],
    sharedDecided: [0],
    devices: devices(setting),
    supply: condition.supply,
    commonMode: setting.commonMode,
    clockRise: setting.clockRise,
    temperature: condition.temperature,
    clockGates: (w.tail_m + 4 * w.reset_m) * gate,
  }
}
