import type { Card } from './setting'

const boltzmann = 1.380649e-23
const electronCharge = 1.602176634e-19

/** One transistor of a netlist; node numbers index the voltage array. Source is the terminal of V_S in the equation. */
export interface Device {
  kind: 'n' | 'p'
  width_m: number
  length_m: number
  gate: number
  drain: number
  source: number
  vtShift_v: number
  kpFactor: number
}

/** Netlist packed in typed arrays, so that a step allocates nothing. */
export interface DeviceTable {
  count: number
  gate: Int32Array
  drain: Int32Array
  source: Int32Array
  /** +1 for n; −1 for p, whose voltages are counted downward from the supply */
  polarity: Float64Array
  origin: Float64Array
  threshold: Float64Array
  slope: Float64Array
  halfPerThermal: Float64Array
  scale: Float64Array
  lambda: Float64Array
  theta: Float64Array
  gamma: Float64Array
  thermalEnergy: number
}

export const thermalEnergyAt = (temperature_k: number): number => boltzmann * temperature_k

export const packDevices = (devices: readonly Device[], card: Card, vdd_v: number, temperature_k: number): DeviceTable => {
  const thermal = (boltzmann * temperature_k) / electronCharge
  const kind = (device: Device) => card[device.kind]
  const shorter = (device: Device) => card.l_min_m / device.length_m
  const reals = (value: (device: Device) => number) => Float64Array.from(devices, value)
  const nodes = (value: (device: Device) => number) => Int32Array.from(devices, value)
  const kp = (device: Device) => kind(device).kp_a_v2 * Math.pow(temperature_k / 300, -1.5) * device.kpFactor
  return {
    count: devices.length,
    gate: nodes((device) => device.gate),
    drain: nodes((device) => device.drain),
    source: nodes((device) => device.source),
    polarity: reals((device) => (device.kind === 'n' ? 1 : -1)),
    origin: reals((device) => (device.kind === 'n' ? 0 : vdd_v)),
    threshold: reals((device) => kind(device).vt_v - kind(device).vt_temp_v_k * (temperature_k - 300) + device.vtShift_v),
    slope: reals((device) => kind(device).slope),
    halfPerThermal: reals(() => 1 / (2 * thermal)),
    scale: reals((device) => (2 * kind(device).slope * kp(device) * thermal * thermal * device.width_m) / device.length_m),
    lambda: reals((device) => kind(device).lambda_per_v * shorter(device)),
    theta: reals((device) => kind(device).theta_per_v * shorter(device) * 2 * kind(device).slope * thermal),
    gamma: reals((device) => kind(device).gamma),
    thermalEnergy: boltzmann * temperature_k,
  }
}

/** I_D of every device [A], counted positive from its drain to its source in its own direction of voltages. */
export const fillCurrents = (table: DeviceTable, volts: Float64Array, current: Float64Array): void => {
  for (let i = 0; i < table.count; i++) {
    const sign = table.polarity[i]
    const origin = table.origin[i]
    const source = origin + sign * volts[table.source[i]]
    const drain = origin + sign * volts[table.drain[i]]
    const pinch = (origin + sign * volts[table.gate[i]] - table.threshold[i]) / table.slope[i]
    const forward = Math.log1p(Math.exp((pinch - source) * table.halfPerThermal[i]))
    const backward = Math.log1p(Math.exp((pinch - drain) * table.halfPerThermal[i]))
    const charge = forward * forward - backward * backward
    current[i] = (table.scale[i] * charge * (1 + table.lambda[i] * (drain - source))) / (1 + table.theta[i] * forward)
  }
}

/** Currents, and the two-sided thermal density 2kT(γ·g_g + g_d) of each device [A²/Hz], conductances not below 0. */
export const fillCurrentsAndNoise = (table: DeviceTable, volts: Float64Array, current: Float64Array, density: Float64Array): void => {
  for (let i = 0; i < table.count; i++) {
    const sign = table.polarity[i]
    const origin = table.origin[i]
    const half = table.halfPerThermal[i]
    const source = origin + sign * volts[table.source[i]]
    const drain = origin + sign * volts[table.drain[i]]
    const pinch = (origin + sign * volts[table.gate[i]] - table.threshold[i]) / table.slope[i]
    const expForward = Math.exp((pinch - source) * half)
    const expBackward = Math.exp((pinch - drain) * half)
    const forward = Math.log1p(expForward)
    const backward = Math.log1p(expBackward)
    const slopeForward = expForward / (1 + expForward)
    const twiceBackward = (2 * backward * expBackward) / (1 + expBackward)
    const charge = forward * forward - backward * backward
    const modulation = 1 + table.lambda[i] * (drain - source)
    const mobility = 1 + table.theta[i] * forward
    const scale = table.scale[i] / mobility
    const rise = 2 * forward * slopeForward - twiceBackward - (charge * table.theta[i] * slopeForward) / mobility
    const gateConductance = (scale * modulation * rise * half) / table.slope[i]
    const drainConductance = scale * (twiceBackward * half * modulation + charge * table.lambda[i])
    current[i] = scale * charge * modulation
    density[i] = 2 * table.thermalEnergy * (table.gamma[i] * Math.max(gateConductance, 0) + Math.max(drainConductance, 0))
  }
}
