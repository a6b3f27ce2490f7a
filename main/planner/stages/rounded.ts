const significant = 7

function roundedValue(value: unknown): unknown {
  if (typeof value === 'number') return Number.isInteger(value) ? value : Number(value.toPrecision(significant))
  if (Array.isArray(value)) return value.map(roundedValue)
  if (value === null || typeof value !== 'object') return value
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, roundedValue(inner)]))
}

/** Numbers to seven significant digits, beyond any model's truth: keeps a bank of 1023 comparators under a megabyte. */
export const rounded = <T>(value: T): T => roundedValue(value) as T
