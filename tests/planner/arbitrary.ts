import fc from 'fast-check'
import { choices } from '../../main/contract/choices'
import { quantities, resolutionRange, type Quantity } from '../../main/contract/quantities'
import { builtInCards } from '../../main/documents/cards'
import { validatePlan } from '../../main/documents/read-plan'
import { changed, flashOf, plainWidths, sarOf, type Changes } from './plans'

const leftToTheBase = ['converter.resolution_bits', 'converter.architecture', 'comparator.sizing', 'comparator.topology']

/** A value anywhere in the range of a quantity: its ends, or any size between them. */
function valueIn({ min, max, integer }: Quantity): fc.Arbitrary<number> {
  if (integer === true) return fc.integer({ min, max })
  const smallest = Math.log(Math.max(min, 1e-30))
  const sized = fc.double({ min: smallest, max: Math.log(max), noNaN: true }).map((x) => Math.min(max, Math.max(min, Math.exp(x))))
  return fc.oneof({ weight: 1, arbitrary: fc.constantFrom(min, max) }, { weight: 4, arbitrary: sized })
}

const someQuantity = fc.constantFrom(...(Object.keys(quantities) as (keyof typeof quantities)[]).filter((path) => !leftToTheBase.includes(path)))
  .chain((path) => valueIn(quantities[path]).map((value): [string, unknown] => [path, value]))

const someChoice = fc.constantFrom(...(Object.keys(choices) as (keyof typeof choices)[]).filter((path) => !leftToTheBase.includes(path)))
  .chain((path) => fc.constantFrom(...Object.keys(choices[path].options)).map((value): [string, unknown] => [path, value]))

const fewChanges = (most: number): fc.Arbitrary<Changes> =>
  fc.uniqueArray(fc.oneof(someQuantity, someChoice), { maxLength: most, selector: ([path]) => path }).map((entries) => Object.fromEntries(entries))

/** Plans that are well formed: one of two plain ones, a card, corners, and up to so many values from anywhere in their ranges. */
export function wellFormed(sizing: 'auto' | 'manual', mostChanges: number, mostBits: { flash: number; sar: number }): fc.Arbitrary<unknown> {
  const base = fc.oneof(
    fc.integer({ min: resolutionRange.flash[0], max: mostBits.flash }).map((bits) => flashOf(bits, 1e9)),
    fc.integer({ min: resolutionRange.sar[0], max: mostBits.sar }).map((bits) => sarOf(bits, 1e7)),
  )
  return fc.tuple(base, fc.constantFrom(...builtInCards), fc.constantFrom('typical', 'slow', 'fast', 'all'), fewChanges(mostChanges))
    .map(([document, card, corner, changes]): unknown => changed(document, {
      'process.card': card.id, corners: [corner],
      'comparator.sizing': sizing, 'comparator.widths': { ...plainWidths, input_length_m: card.l_min_m }, ...changes,
    }))
    .filter((document) => validatePlan(document).ok)
}
