import { mosEvaluate, mosNoise, mosPoint, type MosPoint } from '../models/mos/device'
import type { Circuit, CircuitDevice, PairName, Terminal } from './circuit'
import type { Network } from './network'

/** A pair in the differential mode: where its current enters, and which half-circuit voltages drive it. */
interface PairStencil {
  readonly pair: PairName
  readonly source: CircuitDevice
  readonly element: Network['elements'][number]
  /** Effect of one ampere flowing from drain to source on the differences of the side nodes [V/s per A]. */
  readonly enter: readonly [number, number]
  /** +1 for n, −1 for p: the device's own current against the direction drain to source. */
  readonly sense: number
}

/** What one moment of the trajectory contributes; layout of a row of `Moments`. */
export interface DifferentialMode {
  readonly pairs: readonly PairStencil[]
  /** Numbers per moment: A (4, row by row), slopes of the two side nodes (2), then per pair g_g, I, S (3). */
  readonly stride: number
  readonly fill: (net: Network, slopes: Float64Array, into: Float64Array, offset: number) => void
}

const sideNode = (terminal: Terminal): number | null => (terminal.at === 'own' || terminal.at === 'opposite' ? terminal.node : null)

function stencilsOf(circuit: Circuit, net: Network): PairStencil[] {
  return circuit.devices.flatMap((device, i) => {
    if (device.pair === null) return []
    const enter: [number, number] = [0, 0]
    const drain = sideNode(device.drain)
    const source = sideNode(device.source)
    if (drain !== null) enter[drain] -= 1 / circuit.sideCapacitance[drain]
    if (source !== null) enter[source] += 1 / circuit.sideCapacitance[source]
    return [{ pair: device.pair, source: device, element: net.elements[i], enter, sense: device.polarity === 'n' ? 1 : -1 }]
  })
}

function evaluateAt(net: Network, stencil: PairStencil, point: MosPoint): void {
  const { voltage: v } = net
  const { element: e } = stencil
  const top = v[net.at.supply]
  if (e.pChannel) mosEvaluate(e.device, top - v[e.gate], top - v[e.drain], top - v[e.source], point)
  else mosEvaluate(e.device, v[e.gate], v[e.drain], v[e.source], point)
}

/** Adds conductance g of a terminal at a side node to A; an opposite gate enters with the sign −. */
function addConductance(into: Float64Array, offset: number, enter: readonly [number, number], terminal: Terminal, g: number): void {
  const node = sideNode(terminal)
  if (node === null) return
  const signed = terminal.at === 'opposite' ? -g : g
  into[offset + node] += enter[0] * signed
  into[offset + 2 + node] += enter[1] * signed
}

/**
 * The differential mode d(X,O)/dt = A(t)(X,O) + Σ b_j u_j along the balanced trajectory, in full differences.
 *
 * The linearised current of n and p devices alike is g_g·v_g + g_d·v_d + g_s·v_s from drain to source.
 * Method: Kim, Leibowitz, Ren, Madden, IEEE TCAS-I 56(8), 2009.
 */
export function differentialMode(circuit: Circuit, half: Network): DifferentialMode {
  const pairs = stencilsOf(circuit, half)
  const stride = 6 + 3 * pairs.length
  const point = mosPoint()
  const fill = (net: Network, slopes: Float64Array, into: Float64Array, offset: number) => {
    into.fill(0, offset, offset + stride)
    into[offset + 4] = slopes[0]
    into[offset + 5] = slopes[1]
    pairs.forEach((stencil, i) => {
      evaluateAt(net, stencil, point)
      const { enter, source: device } = stencil
      addConductance(into, offset, enter, device.gate, point.gateG)
      addConductance(into, offset, enter, device.drain, point.drainG)
      addConductance(into, offset, enter, device.source, point.sourceG)
      const at = offset + 6 + 3 * i
      into[at] = point.gateG
      into[at + 1] = point.current
      into[at + 2] = mosNoise(stencil.element.device, point, circuit.temperature)
    })
  }
  return { pairs, stride, fill }
}
