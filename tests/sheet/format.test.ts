import { describe, expect, it } from 'vitest'
import { columnsFit, columnWidths, inScale, pairInScale, scaleOf } from '../../main/sheet/columns'
import { fold, rangeOf } from '../../main/sheet/fold'
import { ofLimit, plain, spanOf, spread, useOf } from '../../main/sheet/format'

describe('numbers of the sheet', () => {
  it('says what is reached in the unit of the limit', () => {
    expect(ofLimit(188e-12, 233e-12, 's')).toBe('188 of 233 ps')
    expect(ofLimit(0.86e-3, 0.82e-3, 'V')).toBe('860 of 820 µV')
    expect(ofLimit(4.9e-4, 2.34e-3, 'V')).toBe('0.490 of 2.34 mV')
    expect(ofLimit(0, 2.34e-3, 'V')).toBe('0 of 2.34 mV')
  })

  it('takes banks of any size', () => {
    const values = Array.from({ length: 300_000 }, (_, i) => ((i * 7919) % 300_000) * 1e-6)
    expect(spread(values)).toEqual([0, 299_999 * 1e-6])
    expect(spanOf(values, 'V')).toBe('0 V … 300 mV')
    expect(scaleOf(values, 'V').name).toBe('mV')
  })

  it('falls back to a unit of its own where the two are far apart', () => {
    expect(ofLimit(2e-15, 3e-9, 's')).toBe('2.00 fs of 3.00 ns')
  })

  it('says what is not there', () => {
    expect(ofLimit(null, 233e-12, 's')).toBe('— of 233 ps')
    expect(ofLimit(188e-12, null, 's')).toBe('188 ps')
    expect(ofLimit(188e-12, 0, 's')).toBe('188 ps of 0 s')
    expect(useOf(null)).toBe('—')
    expect([useOf(0.987), useOf(0.001), useOf(22.41)]).toEqual(['0.99', '<0.01', '22.4'])
  })

  it('keeps a negative limit negative', () => {
    expect(ofLimit(20e-12, -17e-12, 's')).toBe('20.0 of −17.0 ps')
  })

  it('gives three digits, never an exponent for large values', () => {
    expect(plain(1234.5, 3)).toBe('1230')
    expect(plain(-0.0123456, 3)).toBe('−0.0123')
    expect(plain(0, 3)).toBe('0')
  })

  it('spans what differs and nothing else', () => {
    expect(spanOf([944e-6, 962e-6], 'V')).toBe('944 … 962 µV')
    expect(spanOf([944e-6, 2e-3], 'V')).toBe('944 µV … 2.00 mV')
    expect(spanOf([944.1e-6, 944.2e-6], 'V')).toBe('944 µV')
  })
})

describe('columns', () => {
  it('share one unit, that of their largest value', () => {
    const scale = scaleOf([2e-12, null, 233e-12], 's')
    expect(scale.name).toBe('ps')
    expect(inScale(2e-12, scale)).toBe('2.00')
    expect(inScale(null, scale)).toBe('—')
    expect(inScale(0, scale)).toBe('0')
    expect(inScale(3e-18, scale)).toBe('3.00 as')
    expect(pairInScale(188e-12, 233e-12, scale)).toBe('188 of 233')
  })

  it('show small areas in square micrometres and squared units in squares', () => {
    expect(scaleOf([1.9e-9], 'm²')).toEqual({ unit: 'm²', name: 'µm²', factor: 1e12 })
    expect(scaleOf([1.68e-5], 'V²')).toEqual({ unit: 'V²', name: 'mV²', factor: 1e6 })
  })

  it('fill the width they are given, or say that they do not fit', () => {
    const columns = [{ head: 'No.', texts: ['1–63'] }, { head: 'Decision, ps', texts: ['188 of 233'] }]
    expect(columnWidths(columns, 300, 5).reduce((sum, width) => sum + width, 5)).toBeCloseTo(300)
    expect(columnsFit(columns, 300, 5)).toBe(true)
    expect(columnsFit(columns, 40, 5)).toBe(false)
  })
})

describe('folding', () => {
  it('joins neighbours that read alike and keeps their order', () => {
    expect(fold(['a', 'a', 'b', 'a'], (item) => item)).toEqual([
      { first: 'a', last: 'a', count: 2 }, { first: 'b', last: 'b', count: 1 }, { first: 'a', last: 'a', count: 1 },
    ])
    expect(fold([], String)).toEqual([])
  })

  it('names one, or the first and the last', () => {
    expect(rangeOf(7, 7)).toBe('7')
    expect(rangeOf(1, 63)).toBe('1–63')
  })
})
