/** A number as it stands in a working: ten significant digits, readable by any evaluator. */
export const digits = (value: number): string => String(Number(value.toPrecision(10)))
