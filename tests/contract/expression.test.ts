import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { parseQuantity, parseSetValue } from '../../main/contract/expression'
import { quantities } from '../../main/contract/quantities'
import { formatExact, formatSi } from '../../main/contract/units'

function valueOf(text: string, unit: string): number {
  const reading = parseQuantity(text, unit)
  if (!reading.ok) throw new Error(`${text}: ${reading.message}`)
  return reading.value
}

describe('what a person types', () => {
  test.each([
    ['2G', 'S/s', 2e9], ['2 GS/s', 'S/s', 2e9], ['2 GHz', 'S/s', 2e9], ['2e9', 'S/s', 2e9], ['28 nm', 'm', 28e-9], ['28n', 'm', 28e-9],
    ['4 m', 'm', 4], ['4 mm', 'm', 4e-3], ['150f', 's', 150e-15], ['150 fs', 's', 150e-15], ['1/3', '', 1 / 3], ['0.9*0.95', '', 0.9 * 0.95],
    ['99 %', '', 0.99], ['99%', '', 0.99], ['50 % * 600 mV', 'V', 0.3], ['1e-12', '/sample', 1e-12], ['1e-12 /sample', '/sample', 1e-12],
    ['1e−12', '/sample', 1e-12], ['600 mV', 'V', 0.6], ['2^10', '', 1024], ['-2^2', '', -4], ['2^-2', '', 0.25], ['2^3^2', '', 512],
    ['−5', '', -5], ['--5', '', 5], ['(1 + 2) * 3', '', 9], ['(2/3) V', 'V', 2 / 3], ['sqrt(4)', '', 2], ['sqrt(4) mV', 'V', 2e-3],
    ['min(3, 2, 7)', '', 2], ['max(1 mV, 2 mV)', 'V', 2e-3], ['ln(exp(2))', '', 2], ['2*pi', '', 2 * Math.PI], ['π', '', Math.PI],
    ['1 V - 400 mV', 'V', 0.6], ['600m + 20 mV', 'V', 0.62], ['1 V / 2 V', 'V', 0.5], ['4.5 µm', 'm', 4.5e-6], ['4.5 μm', 'm', 4.5e-6],
    ['4.5u', 'm', 4.5e-6], ['.5', '', 0.5], ['5.', '', 5], ['2k', 'Ω', 2000], ['2 kΩ', 'Ω', 2000], ['2K', 'Ω', 2000], ['2 kohm', 'Ω', 2000],
    ['6 bits', 'bit', 6], ['0.5 LSB', 'LSB', 0.5], ['0.5 dB', 'dB', 0.5], ['3×2÷4', '', 1.5], ['0.0114 mm²', 'm²', 1.14e-8], ['5 µm^2', 'm²', 5e-12],
  ])('%s in %s', (text, unit, value) => {
    expect(valueOf(text, unit)).toBeCloseTo(value, 12)
    expect(Math.abs(valueOf(text, unit) - value)).toBeLessThanOrEqual(4e-16 * Math.abs(value))
  })

  test.each([
    ['', 'V', 0], ['   ', 'V', 0], ['abc', 'V', 0], ['2 x', 'V', 2], ['2 GHz', 'V', 2], ['1,5', '', 1], ['(1', '', 2], ['1)', '', 1],
    ['1/0', '', 2], ['1 V * 2 V', 'V', 0], ['5 %', 'V', 0], ['1 +', '', 3], ['sqrt 2', '', 5], ['sqrt(1 V)', 'V', 0], ['ln(0-1)', '', 0],
    ['1e999', '', 0], ['2^(1 V)', 'V', 2], ['constructor', '', 0], ['__proto__', '', 0], ['toString(1)', '', 0], ['10^400', '', 0], ['(-8)^(1/2)', '', 0],
    ['1 2', '', 2], ['NaN', '', 0], ['Infinity', '', 0],
  ])('refuses “%s” in %s at %i', (text, unit, at) => {
    const reading = parseQuantity(text, unit)
    expect(reading).toMatchObject({ ok: false, at })
    expect(!reading.ok && reading.message.length).toBeGreaterThan(8)
  })

  test('deep nesting ends in a message, not in a full stack', () => {
    expect(parseQuantity('('.repeat(400), '').ok).toBe(false)
    expect(parseQuantity('-'.repeat(400) + '1', '').ok).toBe(false)
    expect(parseQuantity('1'.repeat(100_000), '').ok).toBe(false)
  })

  test('never gives anything but a finite number or a message', () => {
    const pieces = fc.constantFrom('1', '2.5', 'e', '-', '+', '*', '/', '^', '(', ')', ' ', 'm', 'V', '%', 'G', 'sqrt', 'ln', 'min', ',', 'pi', '1e300', '0')
    fc.assert(fc.property(fc.array(pieces, { maxLength: 12 }), (parts) => {
      const reading = parseQuantity(parts.join(''), 'V')
      return reading.ok ? Number.isFinite(reading.value) : reading.message !== '' && reading.at >= 0
    }), { seed: 1, numRuns: 3000 })
  })
})

describe('what is shown', () => {
  test.each([
    [4.86e-3, 'W', '4.86 mW'], [1.14e-8, 'm²', '0.0114 mm²'], [2.5e-12, 'm²', '2.50 µm²'], [999e-12, 'm²', '999 µm²'], [-0.0123, 'V', '−12.3 mV'],
    [0, 'V', '0 V'], [2e9, 'S/s', '2.00 GS/s'], [999.7e-3, 'V', '1.00 V'], [63, '', '63'], [6, 'bit', '6 bit'], [5.4, 'bit', '5.40 bit'],
    [1e-12, '/sample', '1.00e−12 /sample'], [0.99, '', '0.990'], [1023, '', '1023'], [1.23e-6, 'V²', '1.23 mV²'],
    [2.85e-4, 'A/V²', '285 µA/V²'], [1e-25, 'J', '1.00e−25 J'], [300, 'K', '300 K'],
  ])('%d %s is %s', (value, unit, text) => {
    expect(formatSi(value, unit)).toBe(text)
  })

  test('nothing that is not a number is shown as one', () => {
    for (const value of [null, undefined, NaN, Infinity, -Infinity]) {
      expect(formatSi(value, 'V')).toBe('—')
      expect(formatExact(value, 'V')).toBe('—')
    }
  })

  test.each([[1.5e-13, 's', '150 fs'], [2e9, 'S/s', '2 GS/s'], [0.6, 'V', '600 mV'], [1e-12, '/sample', '1e-12 /sample'], [0.999999999, '', '0.999999999']])(
    '%d %s exactly is %s', (value, unit, text) => {
      expect(formatExact(value, unit)).toBe(text)
    })
})

const units = [...new Set(Object.values(quantities).map((quantity) => quantity.unit)), 'm²', 'V²', 'W', 'J']

test.each(units)('format and read back: %s', (unit) => {
  const magnitude = fc.double({ min: 1e-24, max: 1e15, noNaN: true })
  fc.assert(fc.property(magnitude, fc.boolean(), (size, negative) => {
    const value = negative ? -size : size
    expect(valueOf(formatExact(value, unit), unit)).toBe(value)
    const seen = valueOf(formatSi(value, unit, 4), unit)
    expect(Math.abs(seen - value)).toBeLessThanOrEqual(5.001e-4 * size)
  }), { seed: 7, numRuns: 400 })
})

test('--set values', () => {
  expect(parseSetValue('2G')).toBe(2e9)
  expect(parseSetValue('150f')).toBe(150e-15)
  expect(parseSetValue('-3m')).toBe(-3e-3)
  expect(parseSetValue('7')).toBe(7)
  expect(parseSetValue('null')).toBe(null)
  expect(parseSetValue('true')).toBe(true)
  expect(parseSetValue('["slow"]')).toEqual(['slow'])
  expect(parseSetValue('"7"')).toBe('7')
  expect(parseSetValue('flash')).toBe('flash')
  expect(parseSetValue('2 GHz')).toBe('2 GHz')
  expect(parseSetValue('')).toBe('')
})
