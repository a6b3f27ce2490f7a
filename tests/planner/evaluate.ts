import { all, create } from 'mathjs'

const math = create(all)
const scope = { ln: Math.log }

/** Value of the `numbers` of a working: the arithmetic of a school book, ln the natural logarithm. */
export function valueOf(numbers: string): number {
  const value: unknown = math.evaluate(numbers, { ...scope })
  if (typeof value !== 'number') throw new TypeError(`${numbers} is no number`)
  return value
}
