/** Round tick values that cover a range: at most `count` and a few more, steps of 1, 2 or 5. */
export function ticksOf(low: number, high: number, count: number): number[] {
  const span = high - low
  if (!(span > 0)) return [low]
  const rough = span / count
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((size) => span / size <= count) ?? 10 * power
  const first = Math.ceil(low / step - 1e-9)
  const last = Math.floor(high / step + 1e-9)
  return Array.from({ length: last - first + 1 }, (_none, index) => Number(((first + index) * step).toPrecision(12)))
}
