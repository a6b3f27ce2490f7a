/** Gate capacitance of an input device: W(c_ox L + 2c_f) [F]. */
export const inputCapacitance = (width: number, perWidth: number): number => width * perWidth

/** Largest capacitance a source may drive for a droop: √(10^(dB/10) − 1)/(2π f R) [F]; first-order low-pass. */
export const droopCapacitance = (attenuationDb: number, frequency: number, resistance: number): number =>
  Math.sqrt(10 ** (attenuationDb / 10) - 1) / (2 * Math.PI * frequency * resistance)

/**
 * Bank capacitance at which feedthrough reaches half an LSB in the middle of the ladder: (π/4)·f·R·C = 2^−N [F].
 * R. van de Plassche, CMOS Integrated Analog-to-Digital and Digital-to-Analog Converters, 2nd ed. (form of the law).
 */
export const feedthroughCapacitance = (bits: number, frequency: number, ladder: number): number => 2 ** -bits / ((Math.PI / 4) * frequency * ladder)

/** Share of the signal that reaches a comparator behind a capacitive array: 1/(1 + C_in/C_DAC). */
export const arrayAttenuation = (inputCap: number, arrayCap: number): number => 1 / (1 + inputCap / arrayCap)

/** Sampling skew whose error on a full-scale sine at level V equals e: e/(2π f √((V_FS/2)² − V²)) [s]. */
export const skewAtLevel = (error: number, frequency: number, fullScale: number, level: number): number =>
  error / (2 * Math.PI * frequency * Math.sqrt((fullScale / 2) ** 2 - level ** 2))

/** Skew between lanes whose mean error power on a full-scale sine equals e²: e·√8/(2π f V_FS) [s]. */
export const skewBetweenLanes = (error: number, frequency: number, fullScale: number): number =>
  (error * Math.sqrt(8)) / (2 * Math.PI * frequency * fullScale)
