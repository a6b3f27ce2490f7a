import { mosCurrent, mosEvaluate, mosPoint, type MosDevice } from '../models/mos/device'
import type { Circuit, CircuitDevice, Terminal } from './circuit'

/** One device instance wired into the voltage vector. */
export interface Element {
  readonly device: MosDevice
  readonly pChannel: boolean
  readonly gate: number
  readonly drain: number
  readonly source: number
  /** How many such devices feed the drain's and the source's node: 2 where a pair meets a shared node or the supply in the half circuit. */
  readonly drainCopies: number
  readonly sourceCopies: number
}

/**
 * A circuit laid out as one vector of voltages: the states first, then the ideal sources.
 * `half`: one side and the shared nodes, both sides equal. `full`: plus side, minus side, shared nodes.
 */
export interface Network {
  readonly size: number
  readonly voltage: Float64Array
  /** 1/C of each state, 0 for the ideal sources [1/F]. */
  readonly inverse: Float64Array
  readonly elements: readonly Element[]
  readonly start: Float64Array
  readonly at: { readonly input: readonly number[]; readonly clock: number; readonly clockBar: number; readonly supply: number }
}

type Side = 0 | 1

interface Layout { sides: number; nodes: number; shared: number }

function indexOf(terminal: Terminal, side: Side, { sides, nodes, shared }: Layout): number {
  const size = sides * nodes + shared
  switch (terminal.at) {
    case 'own': return side * nodes + terminal.node
    case 'opposite': return (sides === 1 ? 0 : 1 - side) * nodes + terminal.node
    case 'shared': return sides * nodes + terminal.node
    case 'input': return size + side
    case 'clock': return size + 2
    case 'clock_bar': return size + 3
    case 'supply': return size + 4
    case 'ground': return size + 5
  }
}

/** Lays out a circuit; inputs at the common mode, clock low. */
export function network(circuit: Circuit, kind: 'half' | 'full'): Network {
  const layout = { sides: kind === 'half' ? 1 : 2, nodes: circuit.sideNodes.length, shared: circuit.sharedNodes.length }
  const size = layout.sides * layout.nodes + layout.shared
  const sides: Side[] = kind === 'half' ? [0] : [0, 1]
  const copies = (d: CircuitDevice, terminal: Terminal) => (kind === 'half' && d.pair !== null && terminal.at !== 'own' ? 2 : 1)
  const elements = circuit.devices.flatMap((d) => (d.pair === null ? [0 as Side] : sides).map((side) => ({
    device: d.device,
    pChannel: d.polarity === 'p',
    gate: indexOf(d.gate, side, layout),
    drain: indexOf(d.drain, side, layout),
    source: indexOf(d.source, side, layout),
    drainCopies: copies(d, d.drain),
    sourceCopies: copies(d, d.source),
  })))
  const voltage = new Float64Array(size + 6)
  voltage[size] = voltage[size + 1] = circuit.commonMode
  voltage[size + 3] = voltage[size + 4] = circuit.supply
  const inverse = new Float64Array(size + 6)
  const capacitance = [...sides.flatMap(() => circuit.sideCapacitance), ...circuit.sharedCapacitance]
  capacitance.forEach((value, i) => { inverse[i] = 1 / value })
  return {
    size, voltage, inverse, elements,
    start: Float64Array.from([...sides.flatMap(() => circuit.sideStart), ...circuit.sharedStart]),
    at: { input: [size, size + 1], clock: size + 2, clockBar: size + 3, supply: size + 4 },
  }
}

/** `high`: no edge, the clock stays high. */
export type ClockEdge = 'rising' | 'falling' | 'high'

/** Clock voltage on a linear ramp whose 50 % crossing is at time 0. */
export function setClock(net: Network, t: number, rise: number, edge: ClockEdge): void {
  const supply = net.voltage[net.at.supply]
  const ramp = Math.min(1, Math.max(0, t / rise + 0.5))
  const level = edge === 'high' ? supply : (edge === 'rising' ? ramp : 1 - ramp) * supply
  net.voltage[net.at.clock] = level
  net.voltage[net.at.clockBar] = supply - level
}

/** dV/dt of the states for the voltages that stand in `net.voltage`, written into `into`; returns the supply current [A]. */
export function nodeRates(net: Network, into: Float64Array): number {
  const { voltage: v, inverse, elements, size } = net
  const supply = v[net.at.supply]
  let drawn = 0
  for (let i = 0; i < size; i++) into[i] = 0
  for (const e of elements) {
    const raw = e.pChannel
      ? -mosCurrent(e.device, supply - v[e.gate], supply - v[e.drain], supply - v[e.source])
      : mosCurrent(e.device, v[e.gate], v[e.drain], v[e.source])
    // `raw` flows from drain to source.
    if (e.drain < size) into[e.drain] -= raw * inverse[e.drain] * e.drainCopies
    if (e.source < size) into[e.source] += raw * inverse[e.source] * e.sourceCopies
    else if (e.source === net.at.supply) drawn -= raw * e.sourceCopies
  }
  return drawn
}

/** dV_clock/dt inside a step that starts at t [V/s]. */
export function clockSlope(net: Network, t: number, rise: number, edge: ClockEdge): number {
  if (edge === 'high' || t >= rise / 2 - 1e-9 * rise || t < -rise / 2) return 0
  return ((edge === 'rising' ? 1 : -1) * net.voltage[net.at.supply]) / rise
}

const point = mosPoint()

/**
 * Jacobian of the rates and of the supply current, row by row, `columns` wide; row `size` is the supply current.
 * `inTime` gets what a clock slope [V/s] adds.
 */
export function nodeDerivatives(net: Network, slope: number, columns: number, jacobian: Float64Array, inTime: Float64Array): void {
  const { voltage: v, inverse, elements, size } = net
  const top = v[net.at.supply]
  jacobian.fill(0)
  inTime.fill(0)
  for (const e of elements) {
    if (e.pChannel) mosEvaluate(e.device, top - v[e.gate], top - v[e.drain], top - v[e.source], point)
    else mosEvaluate(e.device, v[e.gate], v[e.drain], v[e.source], point)
    const clocked = e.gate === net.at.clock ? point.gateG * slope : e.gate === net.at.clockBar ? -point.gateG * slope : 0
    const enter = (row: number, weight: number) => {
      const at = row * columns
      if (e.gate < size) jacobian[at + e.gate] += weight * point.gateG
      if (e.drain < size) jacobian[at + e.drain] += weight * point.drainG
      if (e.source < size) jacobian[at + e.source] += weight * point.sourceG
      inTime[row] += weight * clocked
    }
    if (e.drain < size) enter(e.drain, -inverse[e.drain] * e.drainCopies)
    if (e.source < size) enter(e.source, inverse[e.source] * e.sourceCopies)
    else if (e.source === net.at.supply && columns > size) enter(size, -e.sourceCopies)
  }
}
