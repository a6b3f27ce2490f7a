import { formatSi } from '../contract/units'

export const dash = '—'

/** A bare number to so many significant digits, with a true minus. */
export function plain(value: number, digits: number): string {
  if (value === 0) return '0'
  const text = Math.abs(value) >= 10 ** digits ? String(Number(value.toPrecision(digits))) : value.toPrecision(digits)
  return text.replace('-', '−')
}

/**
 * `188 of 233 ps`: what is reached and what it may be, in the unit of the limit.
 *
 * @param reached  SI value, null when it could not be had
 * @param limit    SI value, null where there is no limit
 * @param unit     SI unit
 */
export function ofLimit(reached: number | null, limit: number | null, unit: string, digits = 3): string {
  const shown = formatSi(limit, unit, digits)
  if (limit === null) return formatSi(reached, unit, digits)
  if (reached === null) return `${dash} of ${shown}`
  if (limit === 0) return `${formatSi(reached, unit, digits)} of ${shown}`
  const scale = 10 ** Math.round(Math.log10(limit / Number(shown.split(' ')[0].replace('−', '-'))))
  const scaled = reached / scale
  const sameUnit = reached === 0 || (Math.abs(scaled) >= 1e-3 && Math.abs(scaled) < 1e5)
  const first = sameUnit ? plain(scaled, digits) : formatSi(reached, unit, digits)
  return `${first} of ${shown}`
}

/** Reached ÷ limit: 1 is at the limit. */
export function useOf(use: number | null): string {
  if (use === null) return dash
  if (use > 0 && use < 0.005) return '<0.01'
  return use >= 10 ? plain(use, 3) : use.toFixed(2).replace('-', '−')
}

/** The least and the largest of a bank's values, however many there are. */
export const spread = (values: readonly number[]): [number, number] =>
  [values.reduce((least, value) => Math.min(least, value), Infinity), values.reduce((most, value) => Math.max(most, value), -Infinity)]

/** `4.21 mV` or, where it differs, `4.02 … 4.21 mV`. */
export function spanOf(values: readonly number[], unit: string, digits = 3): string {
  const [low, high] = spread(values)
  const [first, last] = [formatSi(low, unit, digits), formatSi(high, unit, digits)]
  if (first === last) return first
  const [number, name] = first.split(' ')
  return last.endsWith(` ${name}`) ? `${number} … ${last}` : `${first} … ${last}`
}

/** A date as the sheet shows it, always UTC. */
export const dateOf = (date: Date): string => `${date.toISOString().slice(0, 10)} UTC`

/** `3 comparators`, `1 comparator`. */
export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`

/** `front_sampler` as a person reads it. */
export const humanise = (key: string): string => key.charAt(0).toUpperCase() + key.slice(1).replace(/_/g, ' ')
