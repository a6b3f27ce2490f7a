import { gaussLegendre, gaussSum } from '../../numerics/quadrature'
import { errorDensity, errorReach, errorTail, tailReach, type ThresholdError } from './threshold-error'

/** Thresholds that differ in their Gaussian part only, the same from both ends of the bank inwards; one unit throughout. */
export interface SymmetricBank {
  /** Number of thresholds [1], integer ≥ 1. */
  readonly count: number
  /** Half width of the uniform part, ≥ 0. */
  readonly halfWidth: number
  /** Gaussian part of threshold k = 1 … count, also between whole k; sigmaAt(k) = sigmaAt(count + 1 − k). */
  readonly sigmaAt: (k: number) => number
}

/** Terms of the sum over thresholds, and points a panel over the larger and the smaller end error. */
interface Orders {
  readonly sum: number
  readonly outer: number
  readonly inner: number
}

/*
 * Enough for 1e-7 of the largest σ of a plain Gaussian bank, for 5e-6 of the largest step of a trimmed one, and for 2e-5 of
 * that step where the Gaussian part is so small that the loss has corners.
 */
const gaussianOrders: Orders = { sum: 12, outer: 20, inner: 16 }
const smoothOrders: Orders = { sum: 14, outer: 18, inner: 12 }
const sharpOrders: Orders = { sum: 32, outer: 12, inner: 12 }
/** Ratio of the mid-bank sigma to the half width below which the loss is treated as having corners. */
const sharpBelow = 0.05
/** Sigmas within the edge of the uniform part where its density starts to fall. */
const edgeSigmas = 6
/** A row of the wedge with less than this probability adds nothing to a double. */
const negligible = 1e-18

/**
 * Fraction of chips that fail their INL against the line through the first and the last threshold.
 *
 * With the end errors a and b the line at threshold k is off by l_k = (1 − t_k)·a + t_k·b, t_k = (k − 1)/(count − 1), and the
 * thresholds between are independent: 1 − yield = ∬ p(a)·p(b)·(1 − Π_k P(|e_k − l_k| < limit)) da db. The integrand does not
 * change when a and b are exchanged or both negated, so the wedge a ≥ |b| is a quarter of it; the logarithm of the
 * product is a smooth function of k and summed by a Gaussian rule for sums.
 *
 * @param bank   distribution of the thresholds
 * @param limit  largest allowed |INL|, in the unit of the bank, > 0
 * @returns      1 − yield, to full relative precision where it is small
 */
export function terminalInlLoss(bank: SymmetricBank, limit: number): number {
  if (!(limit > 0)) throw new RangeError(`terminalInlLoss: the limit ${limit} is not positive`)
  if (bank.count < 3) return 0
  const end: ThresholdError = { halfWidth: bank.halfWidth, sigma: bank.sigmaAt(1) }
  const inside = prepareInside(bank, limit)
  const from = Math.max(0, limit - inside.reach)
  const reach = errorReach(end)
  if (from >= reach) return 0
  const panels = panelPlan(end, inside)
  let loss = 0
  forPanels(from, reach, panels.outer, inside.orders.outer, (a, width) => {
    const weight = width * errorDensity(end, a)
    if (weight < negligible) return
    let row = 0
    forPanels(-a, a, panels.inner, inside.orders.inner, (b, step) => {
      row += step * errorDensity(end, b) * -Math.expm1(logAllInside(inside, a, b))
    })
    loss += weight * row
  })
  return 4 * loss
}

/**
 * Terminal INL yield of a bank of equal, independent Gaussian thresholds.
 *
 * @param count           M − 1, number of thresholds [1], integer ≥ 1
 * @param limitOverSigma  INL·Δ/σ [1], > 0
 * @returns               yield [1], 0 … 1
 */
export function terminalInlYield(count: number, limitOverSigma: number): number {
  return 1 - terminalInlLoss({ count, halfWidth: 0, sigmaAt: () => 1 }, limitOverSigma)
}

/** The thresholds between the ends, at the nodes of the rule for sums. */
interface Inside {
  limit: number
  halfWidth: number
  errors: ThresholdError[]
  /** t_k, place between the ends. */
  place: Float64Array
  weights: Float64Array
  reach: number
  orders: Orders
}

function prepareInside(bank: SymmetricBank, limit: number): Inside {
  const { count, halfWidth, sigmaAt } = bank
  const orders = chooseOrders(halfWidth, sigmaAt(0.5 * (count + 1)), sigmaAt(1))
  const { nodes, weights } = gaussSum(count - 2, orders.sum)
  const errors = Array.from(nodes, (j) => ({ halfWidth, sigma: sigmaAt(j + 2) }))
  const reach = halfWidth + tailReach * Math.max(...errors.map((error) => error.sigma))
  return { limit, halfWidth, errors, place: nodes.map((j) => (j + 1) / (count - 1)), weights, reach, orders }
}

function chooseOrders(halfWidth: number, sigmaMiddle: number, sigmaEnd: number): Orders {
  if (halfWidth === 0 && sigmaMiddle === sigmaEnd) return gaussianOrders
  return sigmaMiddle < sharpBelow * halfWidth ? sharpOrders : smoothOrders
}

/** ln Π_k P(|e_k − l_k| < limit) for the end errors a and b. */
function logAllInside({ limit, halfWidth, errors, place, weights }: Inside, a: number, b: number): number {
  let sum = 0
  for (let i = 0; i < errors.length; i++) {
    const off = Math.abs(a + place[i] * (b - a))
    const error = errors[i]
    if (limit - off - halfWidth > tailReach * error.sigma) continue
    const outside = errorTail(error, limit - off) + errorTail(error, limit + off)
    if (outside >= 1) return -Infinity
    sum += weights[i] * Math.log1p(-outside)
  }
  return sum
}

/** Where the panels over the two end errors are cut: ascending, the inner ones on both sides of 0. */
function panelPlan({ halfWidth, sigma }: ThresholdError, { limit, orders }: Inside): { outer: number[]; inner: number[] } {
  if (halfWidth === 0) return { outer: [limit], inner: [] }
  const edge = halfWidth - edgeSigmas * sigma
  const outer = (orders === sharpOrders ? [limit - halfWidth, edge, halfWidth] : [edge]).sort((x, y) => x - y)
  return { outer, inner: [...outer.map((x) => -x).reverse(), ...outer] }
}

/** Gauss–Legendre panels between from, those of the (ascending) marks that lie within, and to. */
function forPanels(from: number, to: number, marks: number[], order: number, visit: (x: number, width: number) => void): void {
  const { nodes, weights } = gaussLegendre(order)
  let start = from
  for (let m = 0; m <= marks.length; m++) {
    const end = m < marks.length ? marks[m] : to
    if (end <= start || end > to) continue
    const half = 0.5 * (end - start)
    for (let i = 0; i < order; i++) visit(start + half * (1 + nodes[i]), half * weights[i])
    start = end
  }
}
