/** Exact SI values of 2019 (BIPM, The International System of Units, 9th edition, table 1). */
export const boltzmann = 1.380649e-23
export const elementaryCharge = 1.602176634e-19
/** Reference temperature of a card [K]. */
export const cardTemperature = 300
export const thermalVoltage = (temperature: number): number => (boltzmann * temperature) / elementaryCharge
