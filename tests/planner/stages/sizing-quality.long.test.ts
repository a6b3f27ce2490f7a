import { expect, it } from 'vitest'
import { logger, mast, sounder } from '../plans'
import { benchOf, found, searchAtRandom } from './look'

it.each([['first demo', sounder], ['second demo', mast], ['third demo', logger]])('2000 designs at random that look cheaper: %s', (_, document) => {
  const bench = benchOf(document)
  const { looked, best } = searchAtRandom(bench, 2000, 17)
  expect(looked).toBe(2000)
  expect(best === null ? Infinity : best.cost / found(bench).cost, JSON.stringify(best?.design)).toBeGreaterThan(0.9)
})
