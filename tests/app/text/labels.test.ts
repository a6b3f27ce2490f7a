import { renderToStaticMarkup } from 'react-dom/server'
import { createElement } from 'react'
import { describe, expect, it } from 'vitest'
import { Formula } from '../../../app/text/formula'
import { readableNumbers } from '../../../app/text/numbers'
import { lowered, percent, reachedOfLimit, shortFigure, stepName } from '../../../app/text/labels'

describe('figures in words', () => {
  it('names undo steps after what they do', () => {
    expect(stepName('converter.resolution_bits', 7)).toBe('resolution 7 bit')
    expect(stepName('converter.jitter_s', 1.5e-13)).toBe('jitter 150 fs')
    expect(stepName('converter.inl_method', 'absolute')).toBe('INL method absolute')
    expect(stepName('converter.error_rate', 1e-12)).toBe('error rate 1e−12 /sample')
  })

  it('reads reached of limit in one unit', () => {
    expect(reachedOfLimit(1.88e-10, 2.33e-10, 's')).toBe('188 of 233 ps')
    expect(reachedOfLimit(8.6e-4, 8.2e-4, 'V')).toBe('860 of 820 µV')
    expect(reachedOfLimit(2e-4, 9e-4, 'V')).toBe('200 of 900 µV')
    expect(reachedOfLimit(2e-10, 2.3e-9, 's')).toBe('0.20 of 2.30 ns')
    expect(reachedOfLimit(2.01e-11, 7.5e-3, 'V')).toBe('20.1 pV of 7.50 mV')
    expect(reachedOfLimit(1.16e-10, 1.67e-13, 's')).toBe('116 ps of 167 fs')
    expect(reachedOfLimit(0, 0.005, 'V')).toBe('0 V of 5.00 mV')
    expect(reachedOfLimit(9.999e-11, 1e-10, 's')).toBe('100 of 100 ps')
    expect(reachedOfLimit(null, 1e-3, 'V')).toBe('— of 1.00 mV')
    expect(reachedOfLimit(1e-12, -4e-11, 's')).toBe('1.00 ps of −40.0 ps')
  })

  it('leaves out zeros that only fill up', () => {
    expect(shortFigure(2e9, 'S/s')).toBe('2 GS/s')
    expect(shortFigure(0.6, 'V')).toBe('600 mV')
    expect(shortFigure(0.0666666, 'V')).toBe('66.67 mV')
    expect(shortFigure(1200, 'Ω')).toBe('1.2 kΩ')
  })

  it('keeps the capitals of abbreviations', () => {
    expect(lowered('INL limit')).toBe('INL limit')
    expect(lowered('Sample rate')).toBe('sample rate')
  })

  it('writes uses as percent, far ones as a factor', () => {
    expect(percent(1.04)).toBe('104 %')
    expect(percent(12.34)).toBe('12.3 ×')
    expect(percent(null)).toBe('—')
  })
})

describe('the numbers of a working', () => {
  it.each([
    ['63 * 2000000000', '63 · 2e9'], ['sqrt(0.000004708330884)', '√(4.7083e-6)'], ['0.6^2 / (12 * 4^5.4)', '0.6^2 / (12 · 4^5.4)'],
    ['max(0, 1 - 0.5)', 'max(0, 1 - 0.5)'], ['2.335e-10 - 1.1e-11', '2.335e-10 - 1.1e-11'], ['0.0009174550076^2', '9.1746e-4^2'],
  ])('%s reads %s', (raw, read) => {
    expect(readableNumbers(raw)).toBe(read)
  })
})

describe('formulas', () => {
  const html = (text: string) => renderToStaticMarkup(createElement(Formula, { text }))
  it('puts indices and exponents where they are printed', () => {
    expect(html('V_FS²/(12·4^ENOB).')).toBe('V<sub>FS</sub>²/(12·4<sup>ENOB</sup>).')
    expect(html('2^N codes')).toBe('2<sup>N</sup> codes')
    expect(html('One LSB is V_FS / 2^N.')).toBe('One LSB is V<sub>FS</sub> / 2<sup>N</sup>.')
    expect(html('4^5.2 · a_{i−1}')).toBe('4<sup>5.2</sup> · a<sub>i−1</sub>')
  })
  it('shows text of a document as text', () => {
    expect(html('<b>x</b>')).toBe('&lt;b&gt;x&lt;/b&gt;')
  })
})
