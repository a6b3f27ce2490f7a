/**
 * Capacitance that must move from one inner node to the other for a range ±R: ΔC = C·R/|w_C| [F].
 * @param capacitance C of the inner node, trim included [F];  @param weight w_C, volts of input per unit relative difference [V]
 */
export const trimCapacitanceChange = (capacitance: number, range: number, weight: number): number => (capacitance * range) / Math.abs(weight)

/** One unit moved across changes the input by 2·unit·|w_C|/C [V]. */
export const trimStep = (unit: number, weight: number, capacitance: number): number => (2 * unit * Math.abs(weight)) / capacitance

/** Trim capacitance on each side at balance: half of the 2^b units [F]. */
export const balancedTrim = (bits: number, unit: number): number => (2 ** bits * unit) / 2

/** Standard deviation of a residual uniform over one step: step/√12 [V]. */
export const uniformSpread = (step: number): number => step / Math.sqrt(12)
