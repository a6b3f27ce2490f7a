import { describe, expect, it } from 'vitest'
import { judge, rangeOf, rangeText, stepped } from '../../../app/text/judge'
import { quantities, type Quantity } from '../../../main/contract/quantities'
import { flashTrim, sarTen } from '../fixtures/plans'

describe('what is typed into a field', () => {
  it.each([
    ['converter.sample_rate_hz', '2G', 2e9], ['converter.sample_rate_hz', '1.5 GS/s', 1.5e9], ['converter.full_scale_v', '1/3', 1 / 3],
    ['comparator.widths.input_length_m', '28 nm', 2.8e-8], ['converter.flash.sampling_cap_f', '150f', 1.5e-13], ['converter.yield', '99 %', 0.99],
    ['converter.resolution_bits', '7', 7],
  ])('%s takes %s', (path, text, value) => {
    const judged = judge(path, text, flashTrim)
    expect(judged.ok && judged.value).toBeCloseTo(value, 12 - Math.floor(Math.log10(value)))
  })

  it.each([
    ['converter.sample_rate_hz', '2 bananas', /not understood/], ['converter.resolution_bits', '6.5', /whole/], ['converter.resolution_bits', '11', /2 bit to 10 bit/],
    ['converter.yield', '2', /range/], ['converter.lanes', '-1', /range/], ['converter.full_scale_v', '', /number/i],
  ])('%s refuses %s', (path, text, message) => {
    const judged = judge(path, text, flashTrim)
    expect(judged.ok).toBe(false)
    if (!judged.ok) expect(judged.message).toMatch(message)
  })

  it('knows the range of the resolution of each architecture', () => {
    expect(rangeText('converter.resolution_bits', flashTrim)).toBe('2 bit to 10 bit')
    expect(rangeText('converter.resolution_bits', sarTen)).toBe('4 bit to 18 bit')
  })

  it.each([
    ['5', 2e9, 'Did you mean 5 GS/s? Type 5G.'], ['5', 0.5, null], ['5e-3', 2e9, null], ['0.0001', 2e9, 'Did you mean 100 kS/s? Type 0.0001G.'],
  ])('a bare %s in a sample rate shown as %d asks what was meant', (text, shown, said) => {
    const judged = judge('converter.sample_rate_hz', text, flashTrim, shown)
    expect(judged.ok).toBe(false)
    if (judged.ok) return
    if (said === null) expect(judged.message).not.toMatch(/Did you mean/)
    else expect(judged.message).toContain(said)
  })

  it('asks nothing where the prefix would not help', () => {
    const judged = judge('comparator.widths.input_length_m', '4', flashTrim, 2e-3)
    expect(!judged.ok && judged.message).not.toMatch(/Did you mean/)
    const small = judge('comparator.widths.input_length_m', '28', flashTrim, 3e-8)
    expect(!small.ok && small.message).toContain('Did you mean 28 nm? Type 28n.')
  })

  it('reads "auto" where null has a meaning', () => {
    expect(judge('comparator.trim_bits', 'auto', flashTrim)).toEqual({ ok: true, value: null })
    expect(judge('converter.lanes', 'auto', flashTrim).ok).toBe(false)
  })
})

describe('stepping with the arrow keys', () => {
  it.each([
    ['converter.resolution_bits', 6, 1, false, 7], ['converter.sample_rate_hz', 2e9, 1, false, 2.1e9], ['converter.sample_rate_hz', 1e9, -1, false, 9.9e8],
    ['converter.full_scale_v', 0.6, -1, true, 0.5], ['converter.error_rate', 1e-12, 1, false, 1e-11], ['converter.yield', 0.99, 1, false, 0.999999999],
    ['converter.resolution_bits', 10, 1, false, 10],
  ] as const)('%s from %d', (path, from, direction, large, to) => {
    expect(stepped(path, from, direction, large, flashTrim)).toBe(to)
  })

  it('stays within every range and moves where there is room', () => {
    for (const [path, known] of Object.entries(quantities)) {
      const quantity: Quantity = known
      const [low, high] = rangeOf(path, quantity, flashTrim)
      for (const from of [low, high, Math.max(low, Math.min(high, 1))]) {
        for (const direction of [1, -1] as const) {
          const to = stepped(path, from, direction, false, flashTrim)
          expect(to).toBeGreaterThanOrEqual(low)
          expect(to).toBeLessThanOrEqual(high)
          if (direction === 1 && from < high) expect(to, `${path} up from ${from}`).toBeGreaterThan(from)
          if (direction === -1 && from > low) expect(to, `${path} down from ${from}`).toBeLessThan(from)
        }
      }
    }
  })
})
