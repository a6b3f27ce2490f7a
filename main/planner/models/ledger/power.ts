import { cardTemperature } from '../../constants'

/** Gates a block counts, in card gates; common practice. */
export const gates = { fullAdder: 6, captureLatch: 4, sarCycle: 12 } as const
/** Part of a block's gates that switch per operation; common practice. */
export const activity = { logic: 0.5, latch: 1 } as const
/** Wire of the clock along the bank [F/m]; common practice. */
export const clockWirePerLength = 2e-10

/** Switched logic: gates·activity·E_gate·(V/V_card)²·f [W]. */
export const logicPower = (count: number, active: number, gateEnergy: number, supplyRatio: number, rate: number): number =>
  count * active * gateEnergy * supplyRatio ** 2 * rate

/** Full adders of a ones counter over M−1 inputs: M − 1 − N. */
export const onesCounterAdders = (codes: number, bits: number): number => codes - 1 - bits

/** Clock tree: (⅓·ΣC_gates + 4/3·C_wire)·V_DD²·f [W]; buffers tapered by 4, the gates themselves paid per decision. */
export const clockPower = (gateCap: number, wireCap: number, supply: number, rate: number): number =>
  (gateCap / 3 + (4 / 3) * wireCap) * supply ** 2 * rate

/** Reference ladder across full scale, fed from the supply: V_DD·V_FS/R [W]. */
export const ladderPower = (supply: number, fullScale: number, resistance: number): number => (supply * fullScale) / resistance

/** Subthreshold leakage: ½·ΣW·I_leak·2^((T−300)/14)·V_DD [W]; doubling every 14 K is common practice. */
export const leakagePower = (width: number, perWidth: number, temperature: number, supply: number): number =>
  0.5 * width * perWidth * 2 ** ((temperature - cardTemperature) / 14) * supply

/** Ideal class-B driver of both sides: f_in·C·V_FS·V_DD [W]. @param capacitance per side [F] */
export const driverPower = (frequency: number, capacitance: number, fullScale: number, supply: number): number =>
  frequency * capacitance * fullScale * supply

/** Capacitive DAC: f_s·E·C_u·V_ref² [W]. @param energy E, mean switching energy in C_u·V_ref² */
export const dacPower = (rate: number, energy: number, unit: number, reference: number): number => rate * energy * unit * reference ** 2
