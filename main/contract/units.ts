/** Units as a person writes and reads them: SI prefixes, spellings of a unit, numbers for the eye. */

const exponents: Readonly<Record<string, number>> = {
  a: -18, f: -15, p: -12, n: -9, u: -6, 'µ': -6, 'μ': -6, m: -3, k: 3, K: 3, M: 6, G: 9, T: 12,
}
const shown: Readonly<Record<number, string>> = {
  [-18]: 'a', [-15]: 'f', [-12]: 'p', [-9]: 'n', [-6]: 'µ', [-3]: 'm', 0: '', 3: 'k', 6: 'M', 9: 'G', 12: 'T',
}
const spellings: Readonly<Record<string, readonly string[]>> = {
  'S/s': ['S/s', 'Sa/s', 'sps', 'Sps', 'SPS', 'Hz'],
  Hz: ['Hz'],
  V: ['Vpp', 'V'],
  s: ['sec', 's'],
  'Ω': ['Ω', '\u2126', 'ohms', 'ohm', 'Ohm'],
  bit: ['bits', 'bit'],
  LSB: ['LSB', 'lsb'],
  '/sample': ['/sample', 'per sample'],
}
/** First atoms that carry an SI prefix when shown. */
const prefixable = /^(V|W|F|s|m|Hz|S|J|A|Ω|C|H)($|[/·√])/
const squared = /^(V|A|m)²($|[/·])/
const wordEnd = /^(?![\p{L}\p{N}_²])/u
const maximumDigits = 17

/** A prefix and unit found after a number: how long the text is, the power of ten, and whether a unit was there. */
export interface Suffix {
  readonly length: number
  readonly exponent: number
  readonly kind: 'prefix' | 'unit' | 'percent'
}

function spellingsOf(unit: string): readonly string[] {
  const listed = spellings[unit]
  if (listed) return listed
  if (unit === '') return []
  const plain = unit.replace('²', '2')
  return plain === unit ? [unit] : [unit, plain, unit.replace('²', '^2')]
}

function unitAt(rest: string, unit: string): Suffix | null {
  const factor = squared.test(unit) ? 2 : 1
  for (const spelling of spellingsOf(unit)) {
    for (const prefix of ['', ...Object.keys(exponents)]) {
      const text = prefix + spelling
      if (rest.startsWith(text) && wordEnd.test(rest.slice(text.length))) {
        return { length: text.length, exponent: factor * (exponents[prefix] ?? 0), kind: 'unit' }
      }
    }
  }
  return null
}

/**
 * The prefix, unit or percent sign at the start of a text, for a field whose unit is known.
 *
 * The unit itself wins over a prefix of the same letter: `4 m` in a field of metres is four metres.
 *
 * @param rest  what follows a number, without leading blanks
 * @param unit  SI unit of the field, '' for pure numbers
 * @returns     null when nothing there belongs to the number
 */
export function suffixAt(rest: string, unit: string): Suffix | null {
  const found = unitAt(rest, unit)
  if (found) return found
  if (rest.startsWith('%')) return { length: 1, exponent: -2, kind: 'percent' }
  const letter = rest.slice(0, 1)
  const exponent = Object.hasOwn(exponents, letter) ? exponents[letter] : undefined
  return exponent !== undefined && wordEnd.test(rest.slice(1)) ? { length: 1, exponent, kind: 'prefix' } : null
}

interface Decimal { readonly negative: boolean; readonly digits: string; readonly exponent: number }

/** Digits beyond which a double is only the noise of its binary form. */
const trusted = 15

/**
 * value = ± d.ddd · 10^exponent, rounded to so many digits; all that are needed without a count. Half a digit is rounded
 * up from the decimal form, so that 937.5 µV is 938 µV whichever way it was computed.
 */
function decimalOf(value: number, digits?: number): Decimal {
  const wanted = digits === undefined ? undefined : Math.max(1, Math.min(digits, maximumDigits))
  const plain = wanted === undefined || wanted >= trusted
  const exact = plain ? value.toExponential(wanted === undefined ? undefined : wanted - 1) : halfUp(value.toExponential(trusted - 1), wanted)
  const [mantissa, exponent] = exact.split('e')
  return { negative: value < 0, digits: mantissa.replace(/[-.]/g, ''), exponent: Number(exponent) }
}

/** A number in exponential form with fewer digits, half a digit rounded away from zero. */
function halfUp(text: string, digits: number): string {
  const [mantissa, exponent] = text.split('e')
  const sign = mantissa.startsWith('-') ? '-' : ''
  const all = mantissa.replace(/[-.]/g, '')
  const kept = String(Number(all.slice(0, digits)) + (all[digits] >= '5' ? 1 : 0))
  const carried = kept.length > digits
  const shownDigits = carried ? kept.slice(0, digits) : kept
  return `${sign}${shownDigits[0]}.${shownDigits.slice(1)}e${Number(exponent) + (carried ? 1 : 0)}`
}

/** Digits with the point after so many of them, filled with zeros on either side. */
function placePoint(digits: string, before: number): string {
  if (before <= 0) return `0.${'0'.repeat(-before)}${digits}`
  if (before >= digits.length) return digits + '0'.repeat(before - digits.length)
  return `${digits.slice(0, before)}.${digits.slice(before)}`
}

function scientific({ digits, exponent }: Decimal, minus: string): string {
  return `${placePoint(digits, 1)}e${exponent < 0 ? minus : ''}${Math.abs(exponent)}`
}

/** The power of ten that a unit is shown with, or null when the number stands plain. */
function displayExponent(exponent: number, unit: string): number | null {
  if (unit === 'm²') return exponent >= -9 ? -6 : -12
  if (squared.test(unit)) return fit(Math.floor((exponent + 3) / 6) * 6, 2)
  return prefixable.test(unit) ? fit(Math.floor(exponent / 3) * 3, 1) : null
}

function fit(exponent: number, factor: number): number | null {
  return shown[exponent / factor] === undefined ? null : exponent
}

function withUnit(number: string, prefix: string, unit: string): string {
  return unit === '' ? number : `${number} ${prefix}${unit}`
}

function compose(decimal: Decimal, unit: string, minus: string): string {
  const sign = decimal.negative ? minus : ''
  const scale = displayExponent(decimal.exponent, unit)
  if (scale !== null) {
    const prefix = shown[squared.test(unit) ? scale / 2 : scale]
    const before = decimal.exponent - scale + 1
    const number = before > 7 || before < -4 ? null : placePoint(decimal.digits, before)
    if (number !== null) return sign + withUnit(number, prefix, unit)
  }
  const plain = decimal.exponent >= -4 && decimal.exponent < 7
  return sign + withUnit(plain ? placePoint(decimal.digits, decimal.exponent + 1) : scientific(decimal, minus), '', unit)
}

/**
 * A number for the eye: significant digits, SI prefix, a true minus sign; areas in mm² or µm².
 * Small whole numbers of pure units stay whole ("63", "6 bit").
 *
 * @param value   SI value; null and whatever is not finite is shown as "—"
 * @param unit    SI unit, '' for pure numbers
 * @param digits  significant digits, 1 to 17
 */
export function formatSi(value: number | null | undefined, unit: string, digits = 3): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return '—'
  if (value === 0) return withUnit('0', '', unit)
  const whole = Number.isInteger(value) && Math.abs(value) < 1e6 && !prefixable.test(unit) && !squared.test(unit)
  return compose(decimalOf(value, whole ? undefined : digits), unit, '−')
}

/**
 * The full value as it may be typed back or pasted elsewhere: every digit, SI prefix, plain ASCII minus.
 * `parseQuantity(formatExact(v, unit), unit)` is v, to the last bit.
 */
export function formatExact(value: number | null | undefined, unit: string): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return '—'
  if (value === 0) return withUnit('0', '', unit)
  return compose(decimalOf(value), unit, '-')
}
