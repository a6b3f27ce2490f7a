import type { Circuit } from './circuit'
import { currentsToSlopes, drive } from './circuit'
import { fillCurrents, fillCurrentsAndNoise, thermalEnergyAt } from './device'
import { buildCircuit } from './netlists'
import { normalNumbers } from './random'
import { never, outputDifference, timeOfLevel } from './run'
import type { Setting } from './setting'

const stepsPerRise = 40
const gainProbe = 1e-5

interface Walker {
  circuit: Circuit
  state: Float64Array
  predicted: Float64Array
  first: Float64Array
  second: Float64Array
  kick: Float64Array
  density: Float64Array
}

const walkerOf = (circuit: Circuit): Walker => {
  const length = circuit.size + 1
  const room = () => new Float64Array(length)
  return { circuit, state: room(), predicted: room(), first: room(), second: room(), kick: room(), density: new Float64Array(circuit.table.count) }
}

/** Charge steps of all devices over one time step, turned into node voltages: √(2kT(γ·g_g + g_d)·h) each, opposite at its two ends. */
const fillKick = (walker: Walker, step: number, normal: () => number): void => {
  const { circuit, kick, density } = walker
  const { table, size, perFarad } = circuit
  kick.fill(0)
  for (let i = 0; i < table.count; i++) {
    const charge = Math.sqrt(density[i] * step) * normal()
    const drain = table.drain[i]
    const source = table.source[i]
    if (drain < size) kick[drain] -= charge * perFarad[drain]
    if (source < size) kick[source] += charge * perFarad[source]
  }
}

/** One stochastic Heun step; without a generator the same step free of noise. */
const advance = (walker: Walker, time: number, step: number, overdrive_v: number, normal: (() => number) | undefined): void => {
  const { circuit, state, predicted, first, second, kick, density } = walker
  const { size, volts, table, currents } = circuit
  for (let node = 0; node < size; node++) volts[node] = state[node]
  drive(circuit, time, overdrive_v, never)
  fillCurrentsAndNoise(table, volts, currents, density)
  currentsToSlopes(circuit, first)
  if (normal) fillKick(walker, step, normal)
  for (let node = 0; node < size; node++) volts[node] = predicted[node] = state[node] + step * first[node] + kick[node]
  drive(circuit, time + step, overdrive_v, never)
  fillCurrents(table, volts, currents)
  currentsToSlopes(circuit, second)
  for (let node = 0; node < size; node++) state[node] += 0.5 * step * (first[node] + second[node]) + kick[node]
}

/** Output difference at the reading time of one run [V]. */
const oneRun = (walker: Walker, steps: number, step: number, overdrive_v: number, normal: (() => number) | undefined): number => {
  const { circuit, state } = walker
  const { internal, output, capacitance_f } = circuit.netlist
  state.set(circuit.start)
  if (normal) {
    const energy = thermalEnergyAt(circuit.setting.temperature_k)
    for (const node of internal) state[node] += Math.sqrt(energy / capacitance_f[node]) * normal()
    for (const node of output) state[node] += Math.sqrt(energy / capacitance_f[node]) * normal()
  }
  const start = -circuit.setting.clock_rise_s / 2
  for (let i = 0; i < steps; i++) advance(walker, start + i * step, step, overdrive_v, normal)
  return outputDifference(circuit, state)
}

/**
 * Input-referred noise of one decision, from stochastic runs of the full circuit at zero input.
 * The rms output difference at a fixed time of the linear region, over the noise-free gain at that time with the same steps.
 *
 * @param setting  the circuit
 * @param runs     number of runs; the relative error of the result is 1/√(2·runs)
 * @param seed     integer
 * @param readGain read when a tiny input has grown this often; by 50 later noise no longer counts, and the outputs are still linear
 * @returns        σ_n [V]
 */
export const noiseSigma = (setting: Setting, runs: number, seed: number, readGain = 50): number => {
  const circuit = buildCircuit(setting)
  const span = timeOfLevel(circuit, 1e-9, readGain * 1e-9) + setting.clock_rise_s / 2
  const steps = Math.ceil((stepsPerRise * span) / setting.clock_rise_s)
  const step = span / steps
  const walker = walkerOf(circuit)
  const gain = oneRun(walker, steps, step, gainProbe, undefined) / gainProbe
  const normal = normalNumbers(seed)
  let sum = 0
  for (let i = 0; i < runs; i++) {
    const output = oneRun(walker, steps, step, 0, normal)
    sum += output * output
  }
  return Math.sqrt(sum / runs) / Math.abs(gain)
}
