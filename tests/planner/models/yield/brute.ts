/**
 * Yield integrals the plain way, for the tests: no symmetry, no rule for sums, no eigenfunction, no cubics.
 * Trapezoids on fine grids; every threshold and every code is visited.
 */
export interface PlainError {
  density: (x: number) => number
  /** P(|X − off| < limit). */
  inside: (off: number, limit: number) => number
  /** Beyond this there is nothing. */
  reach: number
}

/** 1 − yield of terminal INL; `interior` lists the thresholds 2 … count − 1, `end` the first and the last. */
export function plainTerminalLoss(end: PlainError, interior: PlainError[], limit: number, points: number): number {
  const step = 2 * end.reach / points
  let loss = 0
  for (let i = 0; i <= points; i++) {
    const a = -end.reach + i * step
    for (let j = 0; j <= points; j++) {
      const b = -end.reach + j * step
      let good = 1
      interior.forEach((error, k) => {
        const t = (k + 1) / (interior.length + 1)
        good *= error.inside((1 - t) * a + t * b, limit)
      })
      loss += end.density(a) * end.density(b) * (1 - good)
    }
  }
  return loss * step * step
}

/** 1 − yield of DNL: the iteration g ← f·(K∗g), count − 1 times, with the window a whole number of grid steps. */
export function plainDnlLoss(error: PlainError, window: number, count: number, stepsPerWindow: number): number {
  const step = window / stepsPerWindow
  const half = Math.ceil(error.reach / step)
  const f = Float64Array.from({ length: 2 * half + 1 }, (_, i) => error.density((i - half) * step))
  const total = trapezoid(f)
  let g = Float64Array.from(f, (x) => x / total)
  for (let code = 1; code < count; code++) {
    const upTo = cumulative(g)
    const at = (i: number) => upTo[Math.min(Math.max(i, 0), 2 * half)]
    g = Float64Array.from(f, (x, i) => x / total * (at(i + stepsPerWindow) - at(i - stepsPerWindow)))
  }
  return 1 - trapezoid(g)
}

/** The same with the step halved and the error of second order taken out. */
export function extrapolatedDnlLoss(error: PlainError, window: number, count: number, stepsPerWindow: number): number {
  const coarse = plainDnlLoss(error, window, count, stepsPerWindow)
  const fine = plainDnlLoss(error, window, count, 2 * stepsPerWindow)
  return fine + (fine - coarse) / 3
}

function cumulative(values: Float64Array): Float64Array {
  const sums = new Float64Array(values.length)
  for (let i = 1; i < values.length; i++) sums[i] = sums[i - 1] + 0.5 * (values[i - 1] + values[i])
  return sums
}

function trapezoid(values: Float64Array): number {
  return cumulative(values)[values.length - 1]
}
