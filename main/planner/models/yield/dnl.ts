import { gaussLegendre } from '../../numerics/quadrature'
import { densityBreaks, errorDensity, errorReach, errorTail, type ThresholdError } from './threshold-error'

/** Cells a sigma, and the bounds of their number: with cubic interpolation enough for 1e-6 of the limit (see the tests). */
const cellsPerSigma = 24
const leastCells = 96
const mostCells = 640
const pointsPerCell = 4
/** The loss per code has settled when it repeats to this part of itself, twice. */
const settled = 1e-13

/**
 * Fraction of chips that fail their DNL, thresholds being independent with one distribution f.
 *
 * DNL of a code is the difference of the errors of its two thresholds, so neighbouring codes are correlated and the
 * product rule is wrong. With K(x, y) = 1 where |x − y| < D, the yield is the integral of g after count − 1 steps of
 * g ← f·(K∗g) from g = f. Written here for the losses: g = f·(1 − v), every step scaled to ∫g = 1, its own loss λ;
 * the yield is Π(1 − λ). v is interpolated by cubics on a grid that the window ±D maps onto itself, f is integrated
 * exactly. λ settles within a few codes to that of the leading eigenfunction; the rest of the bank repeats it.
 *
 * @param error   distribution of one threshold error
 * @param window  D, largest allowed |DNL|, in the error's unit, > 0
 * @param count   number of thresholds [1], integer ≥ 1
 * @returns       1 − yield, to full relative precision where it is small
 */
export function dnlLoss(error: ThresholdError, window: number, count: number): number {
  if (!(window > 0)) throw new RangeError(`dnlLoss: the window ${window} is not positive`)
  if (2 * errorReach(error) <= window || count < 2) return 0
  const grid = windowGrid(error, window)
  const masses = cellMasses(error, grid)
  let logYield = 0
  let loss = 0
  let repeats = 0
  let lost: Float64Array = new Float64Array(grid.cells + 1)
  for (let code = 1; code < count; code++) {
    const next = stepLoss(grid, masses, lost)
    repeats = Math.abs(next.loss - loss) <= settled * next.loss ? repeats + 1 : 0
    loss = next.loss
    if (loss >= 1) return 1
    const codes = repeats >= 2 ? count - code : 1
    logYield += codes * Math.log1p(-loss)
    if (codes > 1) break
    lost = next.lost
  }
  return -Math.expm1(logYield)
}

/**
 * DNL yield of a bank of equal, independent Gaussian thresholds.
 *
 * @param count           M − 1, number of thresholds [1], integer ≥ 1
 * @param limitOverSigma  DNL·Δ/σ [1], > 0
 * @returns               yield [1], 0 … 1
 */
export function dnlYield(count: number, limitOverSigma: number): number {
  return 1 - dnlLoss({ halfWidth: 0, sigma: 1 }, limitOverSigma, count)
}

/** Points x_i = start + i·width, i = 0 … cells, on the positive side; D − x_i is point `mirror` − i, x_i + D point i + `shift`. */
interface WindowGrid {
  start: number
  width: number
  cells: number
  mirror: number
  shift: number
}

function windowGrid(error: ThresholdError, window: number): WindowGrid {
  const reach = errorReach(error)
  const start = Math.max(0, window - reach)
  const wanted = Math.min(mostCells, Math.max(leastCells, Math.ceil(cellsPerSigma * (reach - start) / error.sigma)))
  if (start > 0) return { start, width: (reach - start) / wanted, cells: wanted, mirror: wanted, shift: Infinity }
  const perWindow = Math.max(1, Math.ceil(wanted * window / reach))
  const width = window / perWindow
  return { start, width, cells: Math.max(4, Math.ceil(reach / width)), mirror: perWindow, shift: perWindow }
}

interface Masses {
  /** P(X > x_i). */
  tail: Float64Array
  /** Four numbers a cell: ∫ f times each cubic Lagrange polynomial of its stencil. */
  stencils: Float64Array
}

function cellMasses(error: ThresholdError, grid: WindowGrid): Masses {
  const { start, width, cells } = grid
  const tail = Float64Array.from({ length: cells + 1 }, (_, i) => errorTail(error, start + i * width))
  const stencils = new Float64Array(4 * cells)
  const { nodes, weights } = gaussLegendre(pointsPerCell)
  for (let cell = 0; cell < cells; cell++) {
    const from = start + cell * width
    const first = stencilStart(cell, cells)
    const ends = [from, ...densityBreaks(error, from, from + width), from + width]
    for (let piece = 1; piece < ends.length; piece++) {
      const half = 0.5 * (ends[piece] - ends[piece - 1])
      for (let i = 0; i < pointsPerCell; i++) {
        const x = ends[piece - 1] + half * (1 + nodes[i])
        addCubics(stencils, 4 * cell, (x - start) / width - first, half * weights[i] * errorDensity(error, x))
      }
    }
  }
  return { tail, stencils }
}

function stencilStart(cell: number, cells: number): number {
  return Math.min(Math.max(cell - 1, 0), cells - 3)
}

/** Adds mass·(the four Lagrange polynomials on 0, 1, 2, 3 at t). */
function addCubics(stencils: Float64Array, at: number, t: number, mass: number): void {
  const a = t - 1
  const b = t - 2
  const c = t - 3
  stencils[at] -= mass * a * b * c / 6
  stencils[at + 1] += mass * t * b * c / 2
  stencils[at + 2] -= mass * t * a * c / 2
  stencils[at + 3] += mass * t * a * b / 6
}

/** One code further: from the losses v of the last threshold to those of the next one, and the loss between them. */
function stepLoss(grid: WindowGrid, masses: Masses, lost: Float64Array): { lost: Float64Array; loss: number } {
  const { cells, mirror, shift } = grid
  const beyond = remaining(masses, lost, cells)
  const next = new Float64Array(cells + 1)
  for (let i = 0; i <= cells; i++) {
    const below = mirror - i
    const above = i + shift
    const lowSide = below > cells ? 0 : below >= 0 ? beyond[below] : 1 - beyond[Math.min(-below, cells)]
    next[i] = lowSide + (above <= cells ? beyond[above] : 0)
  }
  const loss = 2 * integralFromStart(masses.stencils, next, cells)
  for (let i = 0; i <= cells; i++) next[i] = (next[i] - loss) / (1 - loss)
  return { lost: next, loss }
}

/** P(X > x_i) of what is still good: ∫ f·(1 − v) from every point up. */
function remaining({ tail, stencils }: Masses, lost: Float64Array, cells: number): Float64Array {
  const beyond = new Float64Array(cells + 1)
  let sum = 0
  beyond[cells] = tail[cells]
  for (let cell = cells - 1; cell >= 0; cell--) {
    sum += cellIntegral(stencils, lost, cell, cells)
    beyond[cell] = tail[cell] - sum
  }
  return beyond
}

function integralFromStart(stencils: Float64Array, values: Float64Array, cells: number): number {
  let sum = 0
  for (let cell = 0; cell < cells; cell++) sum += cellIntegral(stencils, values, cell, cells)
  return sum
}

function cellIntegral(stencils: Float64Array, values: Float64Array, cell: number, cells: number): number {
  const at = 4 * cell
  const first = stencilStart(cell, cells)
  return stencils[at] * values[first] + stencils[at + 1] * values[first + 1]
    + stencils[at + 2] * values[first + 2] + stencils[at + 3] * values[first + 3]
}
