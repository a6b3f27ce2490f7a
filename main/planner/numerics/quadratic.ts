/** A linear row a·d + offset ≤ 0 of a quadratic step, violated at a price per unit (Infinity: never). */
export interface Row { readonly a: Float64Array; readonly offset: number; readonly price: number }

/** Inverse of a small symmetric positive definite matrix by Cholesky factors. @throws RangeError when it is not one */
export function invertPositive(matrix: readonly Float64Array[]): Float64Array[] {
  const n = matrix.length
  const l = matrix.map(() => new Float64Array(n))
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i][j]
      for (let k = 0; k < j; k++) sum -= l[i][k] * l[j][k]
      if (i === j && !(sum > 0)) throw new RangeError('invertPositive: the matrix is not positive definite')
      l[i][j] = i === j ? Math.sqrt(sum) : sum / l[j][j]
    }
  }
  return matrix.map((_, column) => {
    const x = new Float64Array(n)
    for (let i = 0; i < n; i++) {
      let sum = i === column ? 1 : 0
      for (let k = 0; k < i; k++) sum -= l[i][k] * x[k]
      x[i] = sum / l[i][i]
    }
    for (let i = n - 1; i >= 0; i--) {
      let sum = x[i]
      for (let k = i + 1; k < n; k++) sum -= l[k][i] * x[k]
      x[i] = sum / l[i][i]
    }
    return x
  })
}

const sweeps = 400

/**
 * Step d that minimises ½dᵀBd + gᵀd + Σ price·max(0, a·d + offset), by coordinate ascent on the dual with the
 * multipliers held in [0, price]. C. Hildreth, Naval Research Logistics Quarterly 4, 1957.
 *
 * @param inverse B⁻¹;  @returns d and the multipliers of the rows
 */
export function quadraticStep(
  inverse: readonly Float64Array[], gradient: Float64Array, rows: readonly Row[],
): { d: Float64Array; multipliers: Float64Array } {
  const n = gradient.length
  const times = (v: Float64Array) => Float64Array.from(inverse, (row) => row.reduce((sum, value, j) => sum + value * v[j], 0))
  const d = times(gradient).map((value) => -value)
  const moved = rows.map((row) => times(row.a))
  const curvature = rows.map((row, k) => row.a.reduce((sum, value, j) => sum + value * moved[k][j], 0))
  const multipliers = new Float64Array(rows.length)
  for (let sweep = 0; sweep < sweeps; sweep++) {
    let change = 0
    for (let k = 0; k < rows.length; k++) {
      if (curvature[k] < 1e-14) continue
      let value = rows[k].offset
      for (let j = 0; j < n; j++) value += rows[k].a[j] * d[j]
      const next = Math.min(rows[k].price, Math.max(0, multipliers[k] + value / curvature[k]))
      const delta = next - multipliers[k]
      if (delta === 0) continue
      multipliers[k] = next
      for (let j = 0; j < n; j++) d[j] -= delta * moved[k][j]
      change = Math.max(change, Math.abs(delta) * Math.sqrt(curvature[k]))
    }
    if (change < 1e-7) break
  }
  return { d, multipliers }
}
