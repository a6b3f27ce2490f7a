import { chargeUnit } from './circuit'
import { buildCircuit } from './netlists'
import { run } from './run'
import type { Setting } from './setting'

/** Start of the ramp to half a clock rise before the next 50 % crossing: where the next decision would start. */
const fullCycle = (setting: Setting, overdrive_v: number, evaluateTime: number, resetTime: number) => {
  const circuit = buildCircuit(setting)
  const state = circuit.start.slice()
  const half = setting.clock_rise_s / 2
  run(circuit, state, -half, evaluateTime + resetTime - half, { overdrive_v, fall_s: evaluateTime })
  return { circuit, state }
}

/**
 * Energy of one cycle, V_DD·Q_supply + C_ck·V_DD², started from the reset state.
 *
 * @param setting       the circuit
 * @param overdrive     v [V]
 * @param evaluateTime  between the 50 % crossings of the rising and the falling edge [s], ≥ clock rise
 * @param resetTime     from there to the next rising edge's 50 % crossing [s], ≥ clock rise
 * @returns             [J]
 */
export const energyPerCycle = (setting: Setting, overdrive: number, evaluateTime: number, resetTime: number): number => {
  const { circuit, state } = fullCycle(setting, overdrive, evaluateTime, resetTime)
  return setting.vdd_v * state[circuit.size] * chargeUnit + circuit.netlist.clockGates_f * setting.vdd_v ** 2
}

/**
 * What a reset leaves of a decision: differences of the internal and output nodes, half a clock rise before the next 50 % crossing.
 *
 * @param setting       the circuit
 * @param resetTime     between 50 % crossings [s], ≥ clock rise
 * @param overdrive     of the decision that went before [V]
 * @param evaluateTime  given to it [s]; the default settles it
 * @returns             signed, positive side minus negative side [V]
 */
export const resetLeftover = (
  setting: Setting, resetTime: number, overdrive = 5e-3, evaluateTime = 40 * setting.clock_rise_s,
): { internal_v: number; output_v: number } => {
  const { circuit, state } = fullCycle(setting, overdrive, evaluateTime, resetTime)
  const { internal, output } = circuit.netlist
  return { internal_v: state[internal[0]] - state[internal[1]], output_v: state[output[0]] - state[output[1]] }
}
