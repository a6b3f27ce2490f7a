import type { Device, DeviceTable } from './device'
import { fillCurrents, packDevices } from './device'
import type { Imbalance, NodePair, Pair, Setting } from './setting'

/** Nodes that a source drives, numbered behind the free nodes of a circuit. */
export const driven = { ground: 0, supply: 1, clock: 2, inverse: 3, inputP: 4, inputN: 5 } as const
const drivenCount = 6

/** A topology written down: free nodes with capacitance and start, transistors, and what hangs on the clock. */
export interface Netlist {
  nodes: readonly string[]
  capacitance_f: readonly number[]
  start_v: readonly number[]
  devices: readonly Device[]
  clockGates_f: number
  internal: readonly [number, number]
  output: readonly [number, number]
}

export interface Circuit {
  netlist: Netlist
  table: DeviceTable
  setting: Setting
  size: number
  /** one over capacitance; the entry behind the last node integrates the supply charge, in units of chargeUnit */
  perFarad: Float64Array
  start: Float64Array
  volts: Float64Array
  currents: Float64Array
}

/** Unit of the supply charge carried as one more state, so that it is of the order of a node voltage [C]. */
export const chargeUnit = 1e-14

const pairOf = (devices: readonly Device[], pairs: Readonly<Partial<Record<Pair, readonly [number, number]>>>, pair: Pair) => {
  const members = pairs[pair]
  if (!members) throw new RangeError(`this circuit has no pair ${pair}`)
  return members.map((member) => devices[member])
}

/** Puts half of a difference on each side, in place. */
export const unbalance = (
  netlist: { devices: Device[]; capacitance_f: number[]; start_v: number[] } & Pick<Netlist, NodePair>,
  pairs: Readonly<Partial<Record<Pair, readonly [number, number]>>>,
  imbalances: readonly Imbalance[],
): void => {
  for (const imbalance of imbalances) {
    const half = imbalance.amount / 2
    if ('pair' in imbalance) {
      const [positive, negative] = pairOf(netlist.devices, pairs, imbalance.pair)
      const key = imbalance.what === 'vt' ? 'vtShift_v' : 'kpFactor'
      positive[key] += half
      negative[key] -= half
    } else {
      const [positive, negative] = netlist[imbalance.nodes]
      const values = imbalance.what === 'start' ? netlist.start_v : netlist.capacitance_f
      const unit = imbalance.what === 'start' ? 1 : values[positive]
      values[positive] += half * unit
      values[negative] -= half * unit
    }
  }
}

export const assemble = (netlist: Netlist, setting: Setting): Circuit => {
  const size = netlist.nodes.length
  const volts = new Float64Array(size + drivenCount)
  volts[size + driven.supply] = setting.vdd_v
  return {
    netlist,
    setting,
    size,
    table: packDevices(netlist.devices, setting.card, setting.vdd_v, setting.temperature_k),
    perFarad: Float64Array.from([...netlist.capacitance_f.map((farad) => 1 / farad), 1 / chargeUnit]),
    start: Float64Array.from([...netlist.start_v, 0]),
    volts,
    currents: new Float64Array(netlist.devices.length),
  }
}

/** Linear ramps: up around time 0, down around fall_s. The rising one ends at +rise/2. */
export const clockAt = (time_s: number, setting: Setting, fall_s: number): number => {
  const position = time_s < fall_s / 2 ? time_s : fall_s - time_s
  return setting.vdd_v * Math.min(1, Math.max(0, position / setting.clock_rise_s + 0.5))
}

/** Sets the driven nodes for one instant. */
export const drive = (circuit: Circuit, time_s: number, overdrive_v: number, fall_s: number): void => {
  const { volts, size, setting } = circuit
  const clock = clockAt(time_s, setting, fall_s)
  volts[size + driven.clock] = clock
  volts[size + driven.inverse] = setting.vdd_v - clock
  volts[size + driven.inputP] = setting.common_mode_v + overdrive_v / 2
  volts[size + driven.inputN] = setting.common_mode_v - overdrive_v / 2
}

/** Adds the device currents to the free nodes as slopes [V/s]; the supply's own current goes into the last entry. */
export const currentsToSlopes = (circuit: Circuit, slopes: Float64Array): void => {
  const { table, currents, perFarad, size } = circuit
  slopes.fill(0)
  for (let i = 0; i < table.count; i++) {
    const current = table.polarity[i] * currents[i]
    const drain = table.drain[i]
    const source = table.source[i]
    if (drain < size) slopes[drain] -= current
    if (source < size) slopes[source] += current
    if (source === size + driven.supply) slopes[size] -= current
  }
  for (let node = 0; node <= size; node++) slopes[node] *= perFarad[node]
}

/** The differential equation of the circuit at one overdrive and one clock pattern. */
export const slopesOf = (circuit: Circuit, overdrive_v: number, fall_s: number) =>
  (time_s: number, state: Float64Array, slopes: Float64Array): void => {
    for (let node = 0; node < circuit.size; node++) circuit.volts[node] = state[node]
    drive(circuit, time_s, overdrive_v, fall_s)
    fillCurrents(circuit.table, circuit.volts, circuit.currents)
    currentsToSlopes(circuit, slopes)
  }
