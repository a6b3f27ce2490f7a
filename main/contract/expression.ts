import { suffixAt, type Suffix } from './units'

/** What a person typed, read as one number; or what was not understood, and where (from 0). */
export type Reading =
  | { readonly ok: true; readonly value: number }
  | { readonly ok: false; readonly message: string; readonly at: number }

/** A number under way: how often the unit is in it, and whether it is a bare percentage. */
interface Term { readonly value: number; readonly power: number; readonly percent?: boolean }
interface Reader { readonly text: string; readonly unit: string; at: number; depth: number }
interface Complaint { readonly at: number }

const longest = 500
const deepest = 40
const numberPattern = /^(\d+\.?\d*|\.\d+)(?:[eE]([-+−]?\d+))?/
const wordPattern = /^\p{L}[\p{L}\p{N}_]*/u
const constants: Readonly<Record<string, number>> = { pi: Math.PI, 'π': Math.PI }

const functions: Readonly<Record<string, { count: number; apply: (values: number[]) => number; plain: boolean }>> = {
  sqrt: { count: 1, apply: ([x]) => Math.sqrt(x), plain: true },
  ln: { count: 1, apply: ([x]) => Math.log(x), plain: true },
  log: { count: 1, apply: ([x]) => Math.log(x), plain: true },
  log2: { count: 1, apply: ([x]) => Math.log2(x), plain: true },
  log10: { count: 1, apply: ([x]) => Math.log10(x), plain: true },
  exp: { count: 1, apply: ([x]) => Math.exp(x), plain: true },
  abs: { count: 1, apply: ([x]) => Math.abs(x), plain: false },
  min: { count: Infinity, apply: (values) => Math.min(...values), plain: false },
  max: { count: Infinity, apply: (values) => Math.max(...values), plain: false },
}

function complain(reader: Reader, complaint: string, at = reader.at): never {
  throw Object.assign(new Error(complaint), { at } satisfies Complaint)
}

function skipBlanks(reader: Reader): void {
  while (/\s/.test(reader.text.charAt(reader.at))) reader.at += 1
}

function rest(reader: Reader): string {
  skipBlanks(reader)
  return reader.text.slice(reader.at)
}

/** Takes one of the signs when it comes next. */
function take(reader: Reader, signs: string): string | null {
  const sign = rest(reader).charAt(0)
  if (sign === '' || !signs.includes(sign)) return null
  reader.at += 1
  return sign
}

function sum(reader: Reader): Term {
  let left = product(reader)
  for (let sign = take(reader, '+-−'); sign !== null; sign = take(reader, '+-−')) {
    const right = product(reader)
    left = { value: sign === '+' ? left.value + right.value : left.value - right.value, power: samePower(reader, [left, right]) }
  }
  return left
}

function product(reader: Reader): Term {
  let left = signed(reader)
  for (let sign = take(reader, '*/×·÷'); sign !== null; sign = take(reader, '*/×·÷')) {
    const at = reader.at
    const right = signed(reader)
    const divide = sign === '/' || sign === '÷'
    if (divide && right.value === 0) complain(reader, 'This divides by zero', at)
    left = divide
      ? { value: left.value / right.value, power: left.power - right.power }
      : { value: left.value * right.value, power: left.power + right.power }
  }
  return left
}

function signed(reader: Reader): Term {
  const sign = take(reader, '+-−')
  if (sign === null) return raised(reader)
  const term = nested(reader, signed)
  return sign === '+' ? term : { ...term, value: -term.value }
}

function raised(reader: Reader): Term {
  const base = primary(reader)
  if (take(reader, '^') === null) return base
  const at = reader.at
  const exponent = nested(reader, signed)
  if (exponent.power !== 0) complain(reader, 'An exponent has no unit', at)
  return { value: base.value ** exponent.value, power: base.power * exponent.value }
}

/** Guards the stack: parentheses, signs and powers may be nested only so deep. */
function nested(reader: Reader, read: (reader: Reader) => Term): Term {
  reader.depth += 1
  if (reader.depth > deepest) complain(reader, 'This is nested too deeply')
  const term = read(reader)
  reader.depth -= 1
  return term
}

function primary(reader: Reader): Term {
  const number = numberPattern.exec(rest(reader))
  if (number) return literal(reader, number)
  if (take(reader, '(') !== null) {
    const inner = nested(reader, sum)
    closeParenthesis(reader)
    return scaled(reader, inner)
  }
  const word = wordPattern.exec(rest(reader))?.[0]
  if (word === undefined) return complain(reader, expected(reader))
  return named(reader, word)
}

function expected(reader: Reader): string {
  const found = rest(reader).charAt(0)
  return found === '' ? 'Something is missing at the end' : `“${found}” is not understood here`
}

function closeParenthesis(reader: Reader): void {
  if (take(reader, ')') !== null) return
  if (rest(reader).startsWith(',')) complain(reader, 'A comma is not a decimal sign; use a point')
  complain(reader, 'A closing parenthesis is missing')
}

function literal(reader: Reader, [text, mantissa, exponent]: RegExpExecArray): Term {
  reader.at += text.length
  const suffix = takeSuffix(reader)
  const power = Number((exponent ?? '0').replace('−', '-')) + (suffix?.exponent ?? 0)
  return { value: Number(`${mantissa}e${power}`), power: suffix?.kind === 'unit' ? 1 : 0, percent: suffix?.kind === 'percent' }
}

function scaled(reader: Reader, term: Term): Term {
  const at = reader.at
  const suffix = takeSuffix(reader)
  if (suffix === null) return term
  if (suffix.kind === 'unit' && term.power !== 0) complain(reader, 'There is a unit already', at)
  const value = suffix.exponent < 0 ? term.value / 10 ** -suffix.exponent : term.value * 10 ** suffix.exponent
  return { value, power: suffix.kind === 'unit' ? 1 : term.power, percent: suffix.kind === 'percent' }
}

function takeSuffix(reader: Reader): Suffix | null {
  const suffix = suffixAt(rest(reader), reader.unit)
  if (suffix) reader.at += suffix.length
  return suffix
}

function named(reader: Reader, word: string): Term {
  const at = reader.at
  if (Object.hasOwn(constants, word)) {
    reader.at += word.length
    return { value: constants[word], power: 0 }
  }
  const known = Object.hasOwn(functions, word) ? functions[word] : undefined
  if (!known) return complain(reader, `“${word}” is not understood here`)
  reader.at += word.length
  if (take(reader, '(') === null) complain(reader, `${word} needs parentheses`)
  const terms = [nested(reader, sum)]
  while (terms.length < known.count && take(reader, ',') !== null) terms.push(nested(reader, sum))
  closeParenthesis(reader)
  const power = samePower(reader, terms)
  if (known.plain && power !== 0) complain(reader, `${word} takes a number without unit`, at)
  const value = known.apply(terms.map((term) => term.value))
  if (Number.isNaN(value)) complain(reader, `${word} has no value there`, at)
  return scaled(reader, { value, power })
}

/** Bare numbers are taken in SI, so they may stand beside numbers with the unit. */
function samePower(reader: Reader, terms: readonly Term[]): number {
  const powers = new Set(terms.map((term) => term.power).filter((power) => power !== 0))
  if (powers.size > 1) complain(reader, 'These have different units')
  return [...powers][0] ?? 0
}

function whole(reader: Reader): number {
  const term = sum(reader)
  const left = rest(reader)
  if (left.startsWith(',')) complain(reader, 'A comma is not a decimal sign; use a point')
  if (left !== '') complain(reader, `“${(wordPattern.exec(left)?.[0] ?? left.charAt(0))}” is not understood here`)
  if (term.power !== 0 && term.power !== 1) complain(reader, `The units do not come out as ${reader.unit}`, 0)
  if (term.percent && reader.unit !== '' && reader.unit !== '/sample') complain(reader, `A percentage is not a value in ${reader.unit}`, 0)
  if (!Number.isFinite(term.value)) complain(reader, 'The result is not a finite number', 0)
  return term.value
}

/**
 * Reads what a person typed into a field: a number, SI prefixes, the field's unit, arithmetic.
 * `2G`, `2 GS/s`, `28 nm`, `150f`, `1/3`, `0.9*0.95`, `99 %`, `2^10`, `sqrt(2)*600 mV`, `min(1, 2)`.
 *
 * @param text  what was typed
 * @param unit  SI unit of the field, '' for pure numbers
 * @returns     the SI value, always finite; or a message and the place
 */
export function parseQuantity(text: string, unit: string): Reading {
  if (text.trim() === '') return { ok: false, message: 'Type a number.', at: 0 }
  if (text.length > longest) return { ok: false, message: `At most ${longest} characters.`, at: longest }
  try {
    return { ok: true, value: whole({ text, unit, at: 0, depth: 0 }) }
  } catch (error) {
    if (!(error instanceof Error) || !('at' in error)) throw error
    const { message: complaint, at } = error as Error & Complaint
    const inUnit = unit === '' ? '' : ` The unit here is ${unit}.`
    return { ok: false, message: `${complaint} (character ${at + 1}).${inUnit}`, at }
  }
}

/**
 * The value of `--set PATH=VALUE`: JSON; a number with an SI prefix (`2G`, `150f`); or else the text itself.
 */
export function parseSetValue(text: string): unknown {
  try {
    return JSON.parse(text) as unknown
  } catch {
    const match = /^\s*([-+−]?)(\d+\.?\d*|\.\d+)(?:[eE]([-+]?\d+))?\s*([afpnuµμmkKMGT]?)\s*$/.exec(text)
    if (!match) return text
    const [, sign, mantissa, exponent, prefix] = match
    const power = Number(exponent ?? '0') + (prefix === '' ? 0 : (suffixAt(prefix, '')?.exponent ?? 0))
    const value = Number(`${mantissa}e${power}`)
    return sign === '-' || sign === '−' ? -value : value
  }
}
