/** A linear row a·d + offset ≤ 0 of a quadratic step, violated at a price per unit (Infinity: never). */
export interface Row { readonly a: Float64Array; readonly offset: number; readonly price: number }

/** Solves M·x = r for a small symmetric positive definite M by Cholesky factors; M is overwritten. */
function solvePositive(m: readonly Float64Array[], r: Float64Array): Float64Array {
  const n = m.length
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = m[i][j]
      for (let k = 0; k < j; k++) sum -= m[i][k] * m[j][k]
      m[i][j] = i === j ? Math.sqrt(Math.max(sum, 1e-300)) : sum / m[j][j]
    }
  }
  const x = Float64Array.from(r)
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) x[i] -= m[i][k] * x[k]
    x[i] /= m[i][i]
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) x[i] -= m[k][i] * x[k]
    x[i] /= m[i][i]
  }
  return x
}

const rounds = 60
const centring = 0.15
const toBoundary = 0.99
const close = 1e-10

/** Slack, margin and multiplier of one row; `give` is the slack that is paid for. */
interface RowState { margin: number; give: number; multiplier: number }

/** Terms of one row in the reduced system: Δλ = (weight·a·Δd + shift). */
function reduced(row: Row, state: RowState, along: number, target: number): { weight: number; shift: number } {
  const { margin, give, multiplier } = state
  const elastic = Number.isFinite(row.price)
  const rest = row.price - multiplier
  const residual = give - along - row.offset - margin
  const scale = margin + (elastic ? (multiplier * give) / rest : 0)
  const shift = target - multiplier * margin - multiplier * ((elastic ? target / rest - give : 0) + residual)
  return { weight: multiplier / scale, shift: shift / scale }
}

const dot = (a: Float64Array, b: Float64Array): number => {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i]
  return sum
}

/** Mean complementarity of all rows. */
function gapOf(rows: readonly Row[], states: readonly RowState[]): number {
  let sum = 0
  let count = 0
  rows.forEach((row, k) => {
    sum += states[k].multiplier * states[k].margin
    count++
    if (Number.isFinite(row.price)) { sum += (row.price - states[k].multiplier) * states[k].give; count++ }
  })
  return count === 0 ? 0 : sum / count
}

/** Largest step that keeps value + step·change above zero. */
const room = (value: number, change: number): number => (change < 0 ? -value / change : Infinity)

/**
 * Step d that minimises ½dᵀBd + gᵀd + Σ price·max(0, a·d + offset), by a primal-dual interior-point method.
 * S. Mehrotra, SIAM J. Optim. 2, 1992 (without the corrector); rows with an infinite price are hard.
 *
 * @returns d and the multipliers of the rows, each in [0, price]
 */
export function quadraticStep(
  b: readonly Float64Array[], gradient: Float64Array, rows: readonly Row[],
): { d: Float64Array; multipliers: Float64Array } {
  const n = gradient.length
  const d = new Float64Array(n)
  const states = rows.map((row): RowState => ({
    margin: Math.max(1, Math.abs(row.offset)) * 0.5,
    give: Number.isFinite(row.price) ? 0.5 : 0,
    multiplier: Number.isFinite(row.price) ? row.price / 2 : 1,
  }))
  for (let round = 0; round < rounds; round++) {
    const gap = gapOf(rows, states)
    const target = centring * gap
    const along = rows.map((row) => dot(row.a, d))
    const terms = rows.map((row, k) => reduced(row, states[k], along[k], target))
    const matrix = b.map((line) => Float64Array.from(line))
    const right = Float64Array.from(gradient, (value, i) => -value - dot(b[i], d))
    rows.forEach(({ a }, k) => {
      for (let i = 0; i < n; i++) {
        right[i] -= a[i] * (states[k].multiplier + terms[k].shift)
        for (let j = 0; j < n; j++) matrix[i][j] += terms[k].weight * a[i] * a[j]
      }
    })
    const change = solvePositive(matrix, right)
    const moves = rows.map((row, k) => moveOf(row, states[k], terms[k], along[k], dot(row.a, change), target))
    const step = Math.min(1, toBoundary * Math.min(...moves.map((move) => move.longest)))
    for (let i = 0; i < n; i++) d[i] += step * change[i]
    moves.forEach((move, k) => {
      states[k].margin += step * move.margin
      states[k].give += step * move.give
      states[k].multiplier += step * move.multiplier
    })
    if (gap < close && step > 0.5) break
  }
  return { d, multipliers: Float64Array.from(states, (state) => state.multiplier) }
}

/** Changes of a row's state for a change of a·d, and how far they may go. */
function moveOf(
  row: Row, state: RowState, term: { weight: number; shift: number }, along: number, change: number, target: number,
): RowState & { longest: number } {
  const multiplier = term.weight * change + term.shift
  const elastic = Number.isFinite(row.price)
  const rest = row.price - state.multiplier
  const give = elastic ? (target - rest * state.give + state.give * multiplier) / rest : 0
  const margin = give - change + (state.give - along - row.offset - state.margin)
  const longest = Math.min(
    room(state.margin, margin), room(state.multiplier, multiplier),
    elastic ? room(state.give, give) : Infinity, elastic ? room(rest, -multiplier) : Infinity,
  )
  return { multiplier, give, margin, longest }
}
