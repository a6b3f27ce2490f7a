import type { CardDevice } from '../../../contract/cards'
import { boltzmann, cardTemperature, thermalVoltage } from '../../constants'

/** One transistor ready to be evaluated: everything that does not change with voltage is folded in. */
export interface MosDevice {
  readonly width: number
  readonly length: number
  readonly threshold: number
  readonly slope: number
  /** 2 n k_p U_T² W/L [A]. */
  readonly scale: number
  /** 1 / (2 U_T) [1/V]. */
  readonly halfInverse: number
  readonly lambda: number
  /** θ · 2 n U_T, the weight of ℓ(a) in the mobility term. */
  readonly theta: number
  readonly gamma: number
}

/** Current and derivatives of a device at one point: A, A/V. */
export interface MosPoint { current: number; gateG: number; drainG: number; sourceG: number }
export const mosPoint = (): MosPoint => ({ current: 0, gateG: 0, drainG: 0, sourceG: 0 })

/** Parameters of a device kind at a corner: the card's values after shifts and temperature. */
export interface MosKind {
  readonly threshold: number
  readonly kp: number
  readonly slope: number
  readonly thetaAtMinimum: number
  readonly lambdaAtMinimum: number
  readonly gamma: number
  readonly minimumLength: number
  readonly thermal: number
}

/**
 * Card values brought to a corner and temperature: k_p ∝ (T/300)^−1.5, V_T(T) = V_T − vt_temp·(T − 300).
 *
 * @param thresholdShift added to V_T [V];  @param gain factor on k_p
 */
export function mosKind(device: CardDevice, minimumLength: number, temperature: number, thresholdShift: number, gain: number): MosKind {
  return {
    threshold: device.vt_v + thresholdShift - device.vt_temp_v_k * (temperature - cardTemperature),
    kp: device.kp_a_v2 * gain * (temperature / cardTemperature) ** -1.5,
    slope: device.slope,
    thetaAtMinimum: device.theta_per_v,
    lambdaAtMinimum: device.lambda_per_v,
    gamma: device.gamma,
    minimumLength,
    thermal: thermalVoltage(temperature),
  }
}

/** A device of given width and length [m]; λ and θ scale with L_min/L. */
export function mosDevice(kind: MosKind, width: number, length: number): MosDevice {
  const shorter = kind.minimumLength / length
  return {
    width,
    length,
    threshold: kind.threshold,
    slope: kind.slope,
    scale: (2 * kind.slope * kind.kp * kind.thermal ** 2 * width) / length,
    halfInverse: 1 / (2 * kind.thermal),
    lambda: kind.lambdaAtMinimum * shorter,
    theta: kind.thetaAtMinimum * shorter * 2 * kind.slope * kind.thermal,
    gamma: kind.gamma,
  }
}

/** ln(1 + e) for e ≥ 0: three terms of the series where the logarithm would lose digits (error below 1e-12). */
function logOnePlus(e: number): number {
  return e < 1e-4 ? e * (1 - e * (0.5 - e / 3)) : Math.log(1 + e)
}

/** ℓ(x) = ln(1 + eˣ) without overflow. */
function softplus(x: number): number {
  return x > 36 ? x : logOnePlus(Math.exp(x))
}

/**
 * Drain current, bulk-referred, valid and smooth in all regions:
 *
 * I = 2 n k_p U_T² (W/L) · [ℓ(a)² − ℓ(b)²] · (1 + λ(V_D − V_S)) / (1 + θ·2nU_T·ℓ(a)),
 * a = (V_P − V_S)/2U_T, b = (V_P − V_D)/2U_T, V_P = (V_G − V_T)/n
 *
 * After Enz, Krummenacher, Vittoz 1995 (interpolation ln²(1 + eˣ)); first-order mobility and length terms.
 * p devices: pass voltages measured downward from the supply.
 */
export function mosCurrent(device: MosDevice, gate: number, drain: number, source: number): number {
  const pinch = (gate - device.threshold) / device.slope
  const forward = softplus((pinch - source) * device.halfInverse)
  const reverse = softplus((pinch - drain) * device.halfInverse)
  return (device.scale * (forward * forward - reverse * reverse) * (1 + device.lambda * (drain - source))) / (1 + device.theta * forward)
}

/** The same current with its analytic derivatives to gate, drain and source voltage, written into `into`. */
export function mosEvaluate(device: MosDevice, gate: number, drain: number, source: number, into: MosPoint): void {
  const { halfInverse, lambda, theta } = device
  const pinch = (gate - device.threshold) / device.slope
  const a = (pinch - source) * halfInverse
  const b = (pinch - drain) * halfInverse
  const expA = Math.exp(a < 36 ? a : 36)
  const expB = Math.exp(b < 36 ? b : 36)
  const forward = a < 36 ? logOnePlus(expA) : a
  const reverse = b < 36 ? logOnePlus(expB) : b
  const logisticA = expA / (1 + expA)
  const logisticB = expB / (1 + expB)
  const mobility = 1 / (1 + theta * forward)
  const early = 1 + lambda * (drain - source)
  const charge = forward * forward - reverse * reverse
  const common = device.scale * mobility
  const slopeA = common * early * (2 * forward * logisticA - charge * theta * logisticA * mobility) * halfInverse
  const slopeB = common * early * 2 * reverse * logisticB * halfInverse
  const output = common * charge * lambda
  into.current = common * charge * early
  into.gateG = (slopeA - slopeB) / device.slope
  into.drainG = slopeB + output
  into.sourceG = -slopeA - output
}

/**
 * One-sided thermal noise density of the drain current [A²/Hz]: S = 4kT(γ·g_g + g_d), with g_g and g_d not below 0.
 */
export function mosNoise(device: MosDevice, point: MosPoint, temperature: number): number {
  return 4 * boltzmann * temperature * (device.gamma * Math.max(point.gateG, 0) + Math.max(point.drainG, 0))
}
