import { quadraticStep, type Row } from './quadratic'

/** Objective and constraints (met when ≤ 0) at a point. */
export interface Trial { readonly objective: number; readonly constraints: readonly number[] }

export interface ConstrainedProblem {
  readonly evaluate: (x: Float64Array) => Trial
  readonly lower: Float64Array
  readonly upper: Float64Array
  /** Difference step per unknown. */
  readonly difference: number
  /** Price of one unit of violation; above the multipliers to be expected. */
  readonly price: number
  readonly firstRadius: number
  readonly smallestRadius: number
  /** Merit that a step must promise to go on. */
  readonly smallestGain: number
  readonly iterations: number
}

interface Model { gradient: Float64Array; jacobian: Float64Array[] }

const merit = (trial: Trial, price: number): number =>
  trial.objective + price * trial.constraints.reduce((sum, c) => sum + Math.max(0, c), 0)

function differentiate(problem: ConstrainedProblem, x: Float64Array, here: Trial): Model {
  const gradient = new Float64Array(x.length)
  const jacobian = here.constraints.map(() => new Float64Array(x.length))
  for (let i = 0; i < x.length; i++) {
    const step = x[i] + problem.difference <= problem.upper[i] ? problem.difference : -problem.difference
    const moved = Float64Array.from(x)
    moved[i] += step
    const there = problem.evaluate(moved)
    gradient[i] = (there.objective - here.objective) / step
    here.constraints.forEach((c, k) => { jacobian[k][i] = (there.constraints[k] - c) / step })
  }
  return { gradient, jacobian }
}

function boxRows(problem: ConstrainedProblem, x: Float64Array, radius: number): Row[] {
  return Array.from(x).flatMap((value, i) => [1, -1].map((sign) => {
    const a = new Float64Array(x.length)
    a[i] = sign
    const space = sign > 0 ? problem.upper[i] - value : value - problem.lower[i]
    return { a, offset: -Math.max(0, Math.min(radius, space)), price: Infinity }
  }))
}

/** Gradient of the Lagrangian for multipliers of the constraints. */
function lagrangian(model: Model, multipliers: Float64Array): Float64Array {
  return model.gradient.map((value, i) => value + model.jacobian.reduce((sum, row, k) => sum + multipliers[k] * row[i], 0))
}

const dot = (a: Float64Array, b: Float64Array): number => a.reduce((sum, value, i) => sum + value * b[i], 0)
const largest = (d: Float64Array): number => d.reduce((most, value) => Math.max(most, Math.abs(value)), 0)

/** Merit at the end of a step by the linear model. */
const promisedMerit = (trial: Trial, model: Model, d: Float64Array, price: number): number =>
  trial.objective + dot(model.gradient, d) + price * trial.constraints.reduce((sum, c, k) => sum + Math.max(0, c + dot(model.jacobian[k], d)), 0)

function move(problem: ConstrainedProblem, x: Float64Array, d: Float64Array): { x: Float64Array; trial: Trial } {
  const next = x.map((value, i) => Math.min(problem.upper[i], Math.max(problem.lower[i], value + d[i])))
  return { x: next, trial: problem.evaluate(next) }
}

/** Damped BFGS update in place. M. J. D. Powell, 1978. */
function updateHessian(b: Float64Array[], step: Float64Array, change: Float64Array): void {
  const n = step.length
  const bs = Float64Array.from(b, (row) => row.reduce((sum, value, j) => sum + value * step[j], 0))
  const sbs = step.reduce((sum, value, i) => sum + value * bs[i], 0)
  const sy = step.reduce((sum, value, i) => sum + value * change[i], 0)
  if (sbs < 1e-14) return
  const theta = sy >= 0.2 * sbs ? 1 : (0.8 * sbs) / (sbs - sy)
  const y = change.map((value, i) => theta * value + (1 - theta) * bs[i])
  const norm = step.reduce((sum, value, i) => sum + value * y[i], 0)
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) b[i][j] += (y[i] * y[j]) / norm - (bs[i] * bs[j]) / sbs
}

/**
 * Local minimum under constraints: sequential quadratic steps in a box-shaped trust region with an exact ℓ1 penalty,
 * gradients by differences, curvature by damped BFGS. Deterministic; never returns a point worse in merit than the start.
 */
export function minimiseConstrained(problem: ConstrainedProblem, start: Float64Array): { x: Float64Array; trial: Trial; settled: boolean } {
  const n = start.length
  let x: Float64Array = Float64Array.from(start, (value, i) => Math.min(problem.upper[i], Math.max(problem.lower[i], value)))
  let trial = problem.evaluate(x)
  let model = differentiate(problem, x, trial)
  const hessian = Array.from({ length: n }, (_, i) => Float64Array.from({ length: n }, (__, j) => (i === j ? 0.3 : 0)))
  let radius = problem.firstRadius
  let settled = false
  for (let round = 0; round < problem.iterations && radius > problem.smallestRadius; round++) {
    const solve = (offsets: readonly number[]) => quadraticStep(hessian, model.gradient, [
      ...offsets.map((offset, k) => ({ a: model.jacobian[k], offset, price: problem.price })), ...boxRows(problem, x, radius),
    ])
    const { d, multipliers } = solve(trial.constraints)
    const promised = merit(trial, problem.price) - promisedMerit(trial, model, d, problem.price)
    let taken = move(problem, x, d)
    if (merit(trial, problem.price) - merit(taken.trial, problem.price) < 0.25 * promised) {
      // Second-order correction: the same step with the constraints as they are found at its end.
      const corrected = solve(taken.trial.constraints.map((c, k) => c - dot(model.jacobian[k], d)))
      const again = move(problem, x, corrected.d)
      if (merit(again.trial, problem.price) < merit(taken.trial, problem.price)) taken = again
    }
    const gained = merit(trial, problem.price) - merit(taken.trial, problem.price)
    const length = largest(d)
    if (!(gained > 0)) {
      radius = Math.min(radius, length) / 3
      settled = promised < problem.smallestGain
      if (settled) break
      continue
    }
    const before = lagrangian(model, multipliers)
    const step = taken.x.map((value, i) => value - x[i])
    ;({ x, trial } = taken)
    settled = promised < problem.smallestGain
    if (settled) break
    model = differentiate(problem, x, trial)
    updateHessian(hessian, step, lagrangian(model, multipliers).map((value, i) => value - before[i]))
    radius = gained > 0.5 * promised ? Math.max(radius, 2 * length) : gained < 0.2 * promised ? length / 2 : radius
  }
  return { x, trial, settled }
}
