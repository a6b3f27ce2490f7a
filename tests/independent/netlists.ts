import type { Circuit, Netlist } from './circuit'
import { assemble, driven, unbalance } from './circuit'
import type { Device } from './device'
import type { Imbalance, Setting } from './setting'

/** Capacitance per metre of width: gate, drain or source, and the Miller part of a cross-coupled device [F/m]. */
const perWidth = ({ card }: Setting) => {
  const { cox_f_m2: oxide, fringe_f_m: fringe, junction_f_m: junction } = card.cap
  return { gate: oxide * card.l_min_m + 2 * fringe, drain: junction + fringe, miller: fringe }
}

const deviceMaker = (setting: Setting) =>
  (kind: 'n' | 'p', width_m: number, gate: number, drain: number, source: number, length_m = setting.card.l_min_m): Device =>
    ({ kind, width_m, length_m, gate, drain, source, vtShift_v: 0, kpFactor: 1 })

const thresholdAt = (setting: Setting, kind: 'n' | 'p') =>
  setting.card[kind].vt_v - setting.card[kind].vt_temp_v_k * (setting.temperature_k - 300)

/** Source of an input pair that just cuts off with the clock low. */
const inputTailStart = (setting: Setting) =>
  Math.max(0, (setting.common_mode_v - thresholdAt(setting, 'n')) / setting.card.n.slope)

const strongArmCapacitance = (setting: Setting) => {
  const { widths: w, card, trim_cap_f, load_f } = setting
  const c = perWidth(setting)
  const internal = (w.input_m + w.cross_n_m + w.reset_m) * c.drain + card.cap.wire_f + trim_cap_f + w.extra_cap_f
  const output = (w.cross_n_m + w.cross_p_m) * (c.drain + c.gate + c.miller) + w.reset_m * c.drain + card.cap.wire_f + load_f
  const tail = (2 * w.input_m + w.tail_m) * c.drain + card.cap.wire_f
  return { internal, output, tail, clockGates: (w.tail_m + 4 * w.reset_m) * c.gate }
}

/** Nodes Xp Xn Op On T, numbered 0 to 4; the side p discharges when the positive input is the higher one. */
const strongArmDevices = (setting: Setting): Device[] => {
  const [xp, xn, op, on, t] = [0, 1, 2, 3, 4]
  const at = (name: keyof typeof driven) => 5 + driven[name]
  const { widths: w } = setting
  const make = deviceMaker(setting)
  return [
    make('n', w.input_m, at('inputP'), xp, t, w.input_length_m),
    make('n', w.input_m, at('inputN'), xn, t, w.input_length_m),
    make('n', w.cross_n_m, on, op, xp),
    make('n', w.cross_n_m, op, on, xn),
    make('p', w.cross_p_m, on, op, at('supply')),
    make('p', w.cross_p_m, op, on, at('supply')),
    make('p', w.reset_m, at('clock'), xp, at('supply')),
    make('p', w.reset_m, at('clock'), xn, at('supply')),
    make('p', w.reset_m, at('clock'), op, at('supply')),
    make('p', w.reset_m, at('clock'), on, at('supply')),
    make('n', w.tail_m, at('clock'), t, at('ground')),
  ]
}

const strongArm = (setting: Setting, imbalances: readonly Imbalance[]): Netlist => {
  const c = strongArmCapacitance(setting)
  const high = setting.vdd_v
  const netlist = {
    nodes: ['Xp', 'Xn', 'Op', 'On', 'T'],
    capacitance_f: [c.internal, c.internal, c.output, c.output, c.tail],
    start_v: [high, high, high, high, inputTailStart(setting)],
    devices: strongArmDevices(setting),
    clockGates_f: c.clockGates,
    internal: [0, 1] as const,
    output: [2, 3] as const,
  }
  unbalance(netlist, { input: [0, 1], cross_n: [2, 3], cross_p: [4, 5], reset_internal: [6, 7], reset_output: [8, 9] }, imbalances)
  return netlist
}

const doubleTailCapacitance = (setting: Setting) => {
  const { widths: w, card, trim_cap_f, load_f } = setting
  const c = perWidth(setting)
  const second = w.second_input_m ?? 0
  const secondTail = w.second_tail_m ?? 0
  const wire = card.cap.wire_f
  return {
    internal: (w.input_m + w.reset_m) * c.drain + second * c.gate + wire + trim_cap_f + w.extra_cap_f,
    output: (w.cross_n_m + w.cross_p_m) * (c.drain + c.gate + c.miller) + second * c.drain + wire + load_f,
    tail: (2 * w.input_m + w.tail_m) * c.drain + wire,
    secondTail: (2 * w.cross_p_m + secondTail) * c.drain + wire,
    clockGates: (w.tail_m + secondTail + 2 * w.reset_m + secondTail / 4) * c.gate,
  }
}

/** Nodes Dp Dn Op On T1 T2, numbered 0 to 5; the output on side p rises when the positive input is the higher one. */
const doubleTailDevices = (setting: Setting): Device[] => {
  const [dp, dn, op, on, t1, t2] = [0, 1, 2, 3, 4, 5]
  const at = (name: keyof typeof driven) => 6 + driven[name]
  const { widths: w } = setting
  const make = deviceMaker(setting)
  const second = w.second_input_m ?? 0
  return [
    make('n', w.input_m, at('inputP'), dp, t1, w.input_length_m),
    make('n', w.input_m, at('inputN'), dn, t1, w.input_length_m),
    make('n', second, dp, op, at('ground')),
    make('n', second, dn, on, at('ground')),
    make('n', w.cross_n_m, on, op, at('ground')),
    make('n', w.cross_n_m, op, on, at('ground')),
    make('p', w.cross_p_m, on, op, t2),
    make('p', w.cross_p_m, op, on, t2),
    make('p', w.reset_m, at('clock'), dp, at('supply')),
    make('p', w.reset_m, at('clock'), dn, at('supply')),
    make('n', w.tail_m, at('clock'), t1, at('ground')),
    make('p', w.second_tail_m ?? 0, at('inverse'), t2, at('supply')),
  ]
}

const doubleTail = (setting: Setting, imbalances: readonly Imbalance[]): Netlist => {
  const c = doubleTailCapacitance(setting)
  const high = setting.vdd_v
  const cutOff = high - (high - thresholdAt(setting, 'p')) / setting.card.p.slope
  const netlist = {
    nodes: ['Dp', 'Dn', 'Op', 'On', 'T1', 'T2'],
    capacitance_f: [c.internal, c.internal, c.output, c.output, c.tail, c.secondTail],
    start_v: [high, high, 0, 0, inputTailStart(setting), cutOff],
    devices: doubleTailDevices(setting),
    clockGates_f: c.clockGates,
    internal: [0, 1] as const,
    output: [2, 3] as const,
  }
  unbalance(netlist, { input: [0, 1], second_input: [2, 3], cross_n: [4, 5], cross_p: [6, 7], reset_internal: [8, 9] }, imbalances)
  return netlist
}

/**
 * Builds the full circuit, both sides, of a setting.
 *
 * @param setting     what it is made of
 * @param imbalances  differences between the sides, none by default
 * @throws RangeError for a pair that the topology does not have
 */
export const buildCircuit = (setting: Setting, imbalances: readonly Imbalance[] = []): Circuit =>
  assemble(setting.topology === 'double_tail' ? doubleTail(setting, imbalances) : strongArm(setting, imbalances), setting)

/** Node capacitances per side, of the tails, and of everything the clock drives [F]. */
export const capacitances = (setting: Setting): { internal: number; output: number; tail: number; secondTail?: number; clockGates: number } =>
  setting.topology === 'double_tail' ? doubleTailCapacitance(setting) : strongArmCapacitance(setting)
