import { describe, expect, it } from 'vitest'
import { changed, flashOf, logger, mast, sounder } from '../plans'
import { benchOf, found, judge, searchAtRandom, steps } from './look'

const typical = { corners: ['typical'] }

/** The demos, and plans whose sizing ends elsewhere: at other limits, objectives and cards. */
const documents: Readonly<Record<string, unknown>> = {
  'first demo': sounder,
  'second demo': mast,
  'third demo': logger,
  'smallest area': changed(sounder, { ...typical, 'comparator.objective': 'area' }),
  'offset by size': changed(sounder, { 'converter.resolution_bits': 4, 'converter.enob_bits': 3.5, 'comparator.offset_method': 'size' }),
  'more trim bits than needed': changed(sounder, { 'comparator.trim_bits': 8, 'converter.sample_rate_hz': 1e9 }),
  'a trimmed search': changed(logger, { 'comparator.offset_method': 'trim' }),
  'another card': flashOf(5, 4e9, { 'comparator.offset_method': 'trim', 'process.card': 'generic-16' }),
}

describe.each(Object.keys(documents))('sizing: %s', (name) => {
  const bench = benchOf(documents[name])
  const here = found(bench)

  it('meets every limit', () => expect(here.use).toBeLessThanOrEqual(1))

  it('no tenth more or less of any one unknown is feasible and 3 % cheaper', () => {
    for (const { name: step, widths, bits } of steps(bench)) {
      const there = judge(bench, widths, bits)
      expect(there === null ? Infinity : there.cost / here.cost, step).toBeGreaterThan(0.97)
    }
  })

  it('200 designs at random that look cheaper: none is feasible and 10 % cheaper', () => {
    const { drawn, looked, best } = searchAtRandom(bench, 200, 3)
    expect(looked === 200 || drawn === 20_000).toBe(true)
    expect(best === null ? Infinity : best.cost / here.cost, JSON.stringify(best?.design)).toBeGreaterThan(0.9)
  })
})
