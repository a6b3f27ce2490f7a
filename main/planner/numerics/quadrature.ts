/** Nodes and weights of a rule: ∫ or Σ of f is Σ weights[i]·f(nodes[i]). */
export interface QuadratureRule {
  readonly nodes: Float64Array
  readonly weights: Float64Array
}

const legendreRules = new Map<number, QuadratureRule>()
const sumRules = new Map<string, QuadratureRule>()
/** A rule costs microseconds; the bound only keeps the memory of a long run in check. */
const rulesKept = 256

/**
 * Gauss–Legendre rule of any order on [−1, 1], exact for polynomials of degree 2·order − 1.
 *
 * Nodes are the zeros of the Legendre polynomial by Newton from Tricomi's estimate, weights 2/((1 − x²)·P'²).
 *
 * @param order  number of nodes [1], integer ≥ 1
 * @throws RangeError for another order
 */
export function gaussLegendre(order: number): QuadratureRule {
  if (!Number.isInteger(order) || order < 1) throw new RangeError(`gaussLegendre: order ${order} is not a positive integer`)
  return remembered(legendreRules, order, () => legendreRule(order))
}

/**
 * ∫ f over [from, to] by `panels` equal Gauss–Legendre panels of the given order.
 *
 * @param f       integrand
 * @param from    lower end
 * @param to      upper end
 * @param order   nodes a panel, integer ≥ 1
 * @param panels  number of panels, integer ≥ 1
 */
export function integrate(f: (x: number) => number, from: number, to: number, order: number, panels = 1): number {
  const { nodes, weights } = gaussLegendre(order)
  const half = 0.5 * (to - from) / panels
  let sum = 0
  for (let panel = 0; panel < panels; panel++) {
    const middle = from + half * (2 * panel + 1)
    for (let i = 0; i < order; i++) sum += weights[i] * f(middle + half * nodes[i])
  }
  return half * sum
}

/**
 * Gaussian rule for a sum: Σ f(j), j = 0 … count − 1, from `order` values of f at positions between them,
 * exact for polynomials of degree 2·order − 1. Where order ≥ count the rule is the plain sum.
 *
 * Nodes are the zeros of the discrete Chebyshev (Gram) polynomial, whose recurrence is
 * p_{j+1} = x·p_j − β_j·p_{j−1}, β_j = j²(count² − j²)/(4(4j² − 1)), about the middle of the range.
 * Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 22.17 (discrete Chebyshev polynomials).
 *
 * @param count  number of terms [1], integer ≥ 0
 * @param order  largest number of evaluations [1], integer ≥ 1
 */
export function gaussSum(count: number, order: number): QuadratureRule {
  if (!Number.isInteger(count) || count < 0) throw new RangeError(`gaussSum: count ${count} is not a whole number`)
  if (!Number.isInteger(order) || order < 1) throw new RangeError(`gaussSum: order ${order} is not a positive integer`)
  return remembered(sumRules, `${count}/${Math.min(order, count)}`, () => (order >= count ? plainSum(count) : sumRule(count, order)))
}

function remembered<K>(rules: Map<K, QuadratureRule>, key: K, make: () => QuadratureRule): QuadratureRule {
  const known = rules.get(key)
  if (known) return known
  if (rules.size >= rulesKept) rules.clear()
  const rule = make()
  rules.set(key, rule)
  return rule
}

function legendreRule(order: number): QuadratureRule {
  const nodes = new Float64Array(order)
  const weights = new Float64Array(order)
  for (let i = 0; i < order; i++) {
    let x = -Math.cos(Math.PI * (i + 0.75) / (order + 0.5))
    let slope = 0
    for (let step = 0; step < 8; step++) {
      const [value, derivative] = legendre(order, x)
      slope = derivative
      const change = value / derivative
      x -= change
      if (Math.abs(change) < 1e-15) break
    }
    slope = legendre(order, x)[1]
    nodes[i] = x
    weights[i] = 2 / ((1 - x * x) * slope * slope)
  }
  return { nodes, weights }
}

/** P_n(x) and its derivative. */
function legendre(order: number, x: number): [number, number] {
  let previous = 1
  let current = x
  for (let n = 2; n <= order; n++) [previous, current] = [current, ((2 * n - 1) * x * current - (n - 1) * previous) / n]
  return [current, order * (previous - x * current) / (1 - x * x)]
}

function plainSum(count: number): QuadratureRule {
  return { nodes: Float64Array.from({ length: count }, (_, j) => j), weights: new Float64Array(count).fill(1) }
}

function sumRule(count: number, order: number): QuadratureRule {
  const beta = Float64Array.from({ length: order }, (_, j) => j * j * (count * count - j * j) / (4 * (4 * j * j - 1)))
  const nodes = new Float64Array(order)
  const weights = new Float64Array(order)
  const middle = 0.5 * (count - 1)
  for (let i = 0; i < order; i++) {
    const x = jacobiEigenvalue(beta, i, middle + 1)
    nodes[i] = middle + x
    weights[i] = christoffelWeight(beta, x, count)
  }
  return { nodes, weights }
}

/** The i-th smallest eigenvalue of the symmetric tridiagonal matrix with zero diagonal and off-diagonals √β, by Sturm counts. */
function jacobiEigenvalue(beta: Float64Array, i: number, reach: number): number {
  let low = -reach
  let high = reach
  while (high - low > 1e-15 * reach) {
    const x = 0.5 * (low + high)
    if (x === low || x === high) break
    if (eigenvaluesBelow(beta, x) > i) high = x
    else low = x
  }
  return 0.5 * (low + high)
}

function eigenvaluesBelow(beta: Float64Array, x: number): number {
  let pivot = -x
  let below = pivot < 0 ? 1 : 0
  for (let j = 1; j < beta.length; j++) {
    pivot = -x - beta[j] / (pivot === 0 ? 1e-300 : pivot)
    if (pivot < 0) below++
  }
  return below
}

/** 1/Σ p̃_j(x)² over the orthonormal polynomials of lower degree than the rule. */
function christoffelWeight(beta: Float64Array, x: number, count: number): number {
  let previous = 0
  let current = 1
  let sum = 1
  for (let j = 1; j < beta.length; j++) {
    const root = Math.sqrt(beta[j])
    const next = (x * current - Math.sqrt(beta[j - 1]) * previous) / root
    previous = current
    current = next
    sum += current * current
  }
  return count / sum
}
