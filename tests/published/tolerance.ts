import { expect } from 'vitest'

/**
 * How closely a computed number has to meet an outside value. A tolerance has a kind, never a bare number:
 *
 * - `printed`        half a unit of the last printed digit (keep the value as a string: '0.1129', '8.213e-11')
 * - `highPrecision`  at most 1e-12 relative
 * - `crossCheck`     another computation or library: a relative bound with the reason for it
 * - `exactLaw`       limits and symmetries: rounding error only (1e-12 relative, or a stated absolute floor)
 * - `silicon`        a published measurement, as a factor either way
 * - `frozen`         regression only (1e-9 relative), never counted as evidence
 */
export type Tolerance =
  | { kind: 'printed' }
  | { kind: 'highPrecision' }
  | { kind: 'crossCheck'; relative: number; with: string; reason: string }
  | { kind: 'exactLaw'; law: string; absolute?: number }
  | { kind: 'silicon'; factor: number }
  | { kind: 'frozen' }

/** One outside value as it lies in tests/published/*.json; `value` keeps its digits. */
export interface PublishedValue {
  value: string
  tolerance: Tolerance
}

const highPrecisionRelative = 1e-12
const frozenRelative = 1e-9
/** Room for the binary form of a decimal number that lies exactly half a unit away. */
const binaryRoom = 1 + 1e-9

/** Half a unit of the last printed digit: '0.1129' → 0.00005, '8.213e-11' → 5e-15, '1363' → 0.5. */
export function halfUnitOfLastDigit(printed: string): number {
  const match = /^[+-]?\d+(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/.exec(printed.trim())
  if (!match) throw new Error(`not a printed decimal number: '${printed}'`)
  return 0.5 * Number(`1e${Number(match[2] ?? 0) - (match[1] ?? '').length}`)
}

/** The number is what the source prints, to half a unit of its last digit. */
export function expectPrinted(actual: number, printed: string, what = 'value'): void {
  const room = halfUnitOfLastDigit(printed)
  expectNear(actual, Number(printed), room * binaryRoom, `${what}: printed ${printed} (half a unit is ${room})`)
}

/** At most 1e-12 relative from a value known to more digits than a double holds. */
export function expectHighPrecision(actual: number, expected: string | number, what = 'value'): void {
  expectRelative(actual, Number(expected), highPrecisionRelative, `${what}: high precision`)
}

/** Another computation or library says so: `relative` is the bound, `reason` why it is this wide and whose value it is. */
export function expectCrossCheck(actual: number, expected: string | number, relative: number, reason: string): void {
  if (reason === '') throw new Error('a cross-check names the other computation and the reason of its bound')
  expectRelative(actual, Number(expected), relative, `cross-check, ${reason}`)
}

/** A limit, a symmetry, an identity: rounding error only, or a stated absolute floor where the law's value is 0. */
export function expectExactLaw(actual: number, expected: number, law: string, absolute = 0): void {
  expectNear(actual, expected, Math.max(absolute, highPrecisionRelative * Math.abs(expected)), `law: ${law}`)
}

/** A published measurement: within `factor` either way, `factor` > 1. */
export function expectSilicon(actual: number, measured: string | number, factor: number, what = 'value'): void {
  const ratio = actual / Number(measured)
  const note = `${what}: ${actual} against ${measured} measured, factor ${factor}`
  expect(ratio, note).toBeGreaterThanOrEqual(1 / factor)
  expect(ratio, note).toBeLessThanOrEqual(factor)
}

/** Regression only: the program still says what it said (1e-9 relative). Never evidence that it is right. */
export function expectFrozen(actual: number, frozen: string | number, what = 'value'): void {
  expectRelative(actual, Number(frozen), frozenRelative, `${what}: frozen`)
}

/** Hold a number against an entry of a published-values file, by the kind of its tolerance. */
export function expectPublished(actual: number, entry: PublishedValue, what = 'value'): void {
  const { value, tolerance } = entry
  switch (tolerance.kind) {
    case 'printed': return expectPrinted(actual, value, what)
    case 'highPrecision': return expectHighPrecision(actual, value, what)
    case 'crossCheck':
      return expectCrossCheck(actual, value, tolerance.relative, `${what}: ${tolerance.with}: ${tolerance.reason}`)
    case 'exactLaw': return expectExactLaw(actual, Number(value), `${what}: ${tolerance.law}`, tolerance.absolute)
    case 'silicon': return expectSilicon(actual, value, tolerance.factor, what)
    case 'frozen': return expectFrozen(actual, value, what)
  }
}

function expectRelative(actual: number, expected: number, relative: number, note: string): void {
  expectNear(actual, expected, relative * Math.abs(expected), `${note} (${relative} relative)`)
}

function expectNear(actual: number, expected: number, room: number, note: string): void {
  const message = `${note}: got ${actual}, expected ${expected} ± ${room}`
  expect(Number.isFinite(actual), message).toBe(true)
  expect(Math.abs(actual - expected), message).toBeLessThanOrEqual(room)
}
