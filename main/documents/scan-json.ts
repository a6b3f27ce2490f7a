import { mostProblems, shortKey } from './path-text'

/** Where a JSON text stops being JSON, and what may stand there. */
export interface Broken { readonly at: number; readonly allowed: string; readonly hint: string }

export interface Scan {
  readonly broken: Broken | null
  readonly tooDeep: boolean
  /** Dotted paths of keys that stand twice in one object, the first few; JSON.parse would hide all but the last. */
  readonly repeated: readonly string[]
}

type Wanted = 'value' | 'value_or_end' | 'key' | 'key_or_end' | 'colon' | 'comma_or_end' | 'nothing'
interface Frame { readonly path: string; readonly keys: Set<string> | null; key: string; index: number }
interface Scanner {
  readonly text: string
  readonly stack: Frame[]
  readonly repeated: Set<string>
  at: number
  wanted: Wanted
}

const wantedText: Readonly<Record<Wanted, string>> = {
  value: 'a value', value_or_end: 'a value or “]”', key: 'a key in double quotes', key_or_end: 'a key in double quotes or “}”',
  colon: '“:” after the key', comma_or_end: '“,” or a closing bracket', nothing: 'nothing more after the document',
}
const literalPattern = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?(?![\w.+-])|(?:true|false|null)(?!\w)/y
const escapePattern = /\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4})/y
const blankPattern = /[ \t\n\r]*/y

function hintFor(scanner: Scanner): string {
  const rest = scanner.text.slice(scanner.at, scanner.at + 12)
  if (rest === '') return 'The text ends too early; is the file complete?'
  if (rest.startsWith('//') || rest.startsWith('/*') || rest.startsWith('#')) return 'JSON has no comments; use the “notes” field.'
  if (/^[}\]]/.test(rest) && (scanner.wanted === 'key' || scanner.wanted === 'value')) return 'Take out the comma before it.'
  if (/^['“”‘’]/.test(rest)) return 'Text stands in plain double quotes.'
  if (/^-?(NaN|Infinity|nan|inf)/.test(rest)) return 'Only finite numbers can be written.'
  if (/^[-+.\d]/.test(rest)) return 'Write numbers like 2e9, 0.5 or -3, without prefix or unit.'
  if (scanner.wanted === 'comma_or_end') return 'Is a comma missing?'
  return 'Mend the text there.'
}

const broken = (scanner: Scanner, hint = hintFor(scanner)): Broken => ({ at: scanner.at, allowed: wantedText[scanner.wanted], hint })

function pattern(scanner: Scanner, regex: RegExp): string | null {
  regex.lastIndex = scanner.at
  const match = regex.exec(scanner.text)
  if (!match) return null
  scanner.at += match[0].length
  return match[0]
}

/** Past a string whose opening quote comes next; null and the place of the fault when it is not one. */
function string(scanner: Scanner): string | null {
  const start = scanner.at
  scanner.at += 1
  while (scanner.at < scanner.text.length) {
    const code = scanner.text.charCodeAt(scanner.at)
    if (code === 0x22) {
      scanner.at += 1
      return JSON.parse(scanner.text.slice(start, scanner.at)) as string
    }
    if (code < 0x20) return null
    if (code !== 0x5c) scanner.at += 1
    else if (pattern(scanner, escapePattern) === null) return null
  }
  return null
}

const pathOf = (frame: Frame, step: string | number): string => (frame.path === '' ? shortKey(step) : `${frame.path}.${shortKey(step)}`)

function open(scanner: Scanner, object: boolean): void {
  const parent = scanner.stack.at(-1)
  const path = parent ? pathOf(parent, parent.keys ? parent.key : parent.index) : ''
  scanner.stack.push({ path, keys: object ? new Set() : null, key: '', index: 0 })
  scanner.wanted = object ? 'key_or_end' : 'value_or_end'
  scanner.at += 1
}

function afterValue(scanner: Scanner): void {
  scanner.wanted = scanner.stack.length === 0 ? 'nothing' : 'comma_or_end'
}

function value(scanner: Scanner, sign: string): Broken | null {
  if (sign === '{' || sign === '[') {
    open(scanner, sign === '{')
    return null
  }
  if (sign === '"') {
    if (string(scanner) === null) return broken(scanner, 'Text has no line breaks or tabs in it and ends with a double quote; a backslash starts an escape.')
  } else if (pattern(scanner, literalPattern) === null) return broken(scanner)
  afterValue(scanner)
  return null
}

function key(scanner: Scanner, frame: Frame, sign: string): Broken | null {
  const name = sign === '"' ? string(scanner) : null
  if (name === null) return broken(scanner)
  if (frame.keys?.has(name) && scanner.repeated.size <= mostProblems) scanner.repeated.add(pathOf(frame, name))
  frame.keys?.add(name)
  frame.key = name
  scanner.wanted = 'colon'
  return null
}

function close(scanner: Scanner): void {
  scanner.stack.pop()
  scanner.at += 1
  afterValue(scanner)
}

function punctuation(scanner: Scanner, frame: Frame, sign: string): Broken | null {
  if (scanner.wanted === 'colon' ? sign !== ':' : sign !== ',') return broken(scanner)
  if (sign === ',') frame.index += 1
  scanner.wanted = sign === ',' && frame.keys ? 'key' : 'value'
  scanner.at += 1
  return null
}

function step(scanner: Scanner, sign: string): Broken | null {
  const { wanted } = scanner
  const frame = scanner.stack.at(-1)
  const mayEnd = wanted === 'key_or_end' || wanted === 'value_or_end' || wanted === 'comma_or_end'
  if (frame && mayEnd && sign === (frame.keys ? '}' : ']')) {
    close(scanner)
    return null
  }
  if (wanted === 'value' || wanted === 'value_or_end') return value(scanner, sign)
  if (!frame || wanted === 'nothing') return broken(scanner)
  return wanted === 'key' || wanted === 'key_or_end' ? key(scanner, frame, sign) : punctuation(scanner, frame, sign)
}

/**
 * Goes through a JSON text once, without recursion, before it is parsed.
 *
 * @param text     the document
 * @param deepest  how many brackets may be open at once
 */
export function scanJson(text: string, deepest: number): Scan {
  const scanner: Scanner = { text, stack: [], repeated: new Set(), at: 0, wanted: 'value' }
  for (;;) {
    pattern(scanner, blankPattern)
    const sign = text.charAt(scanner.at)
    if (sign === '' && scanner.wanted === 'nothing') return { broken: null, tooDeep: false, repeated: [...scanner.repeated] }
    const fault = sign === '' ? broken(scanner) : step(scanner, sign)
    if (fault) return { broken: fault, tooDeep: false, repeated: [...scanner.repeated] }
    if (scanner.stack.length > deepest) return { broken: null, tooDeep: true, repeated: [...scanner.repeated] }
  }
}

/** Line and column, both from 1, of a place in a text. */
export function lineAndColumn(text: string, at: number): { line: number; column: number } {
  const before = text.slice(0, at).split('\n')
  return { line: before.length, column: (before.at(-1)?.length ?? 0) + 1 }
}
