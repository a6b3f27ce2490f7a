/** What a root search may spend and how close it has to come. */
export interface RootOptions {
  /** Absolute width at which the bracket counts as closed, in the unit of x, ≥ 0; the precision of a double is added. */
  tolerance: number
  /** Largest number of function values, both ends included; default 100. */
  evaluations?: number
}

interface Bracket {
  /** Best point so far, the point before it, and the opposite end of the bracket, with their values. */
  best: number
  fBest: number
  previous: number
  fPrevious: number
  opposite: number
  fOpposite: number
  step: number
  stepBefore: number
}

/**
 * Zero of a continuous function between two ends of opposite sign.
 *
 * Inverse quadratic or secant steps, bisection wherever they do not shrink the bracket fast enough.
 * Source: R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4.
 *
 * @param f        continuous function
 * @param from     one end
 * @param to       other end; f(from) and f(to) differ in sign (or one is 0)
 * @param options  tolerance on x and the allowance of function values
 * @throws RangeError where the ends do not bracket a zero, where f is not a number, or when the allowance is spent
 */
export function findRoot(f: (x: number) => number, from: number, to: number, options: RootOptions): number {
  const state = openBracket(from, checked(f, from), to, checked(f, to))
  const allowance = options.evaluations ?? 100
  for (let used = 2; ; used++) {
    keepBestInside(state)
    const closeness = 2 * Number.EPSILON * Math.abs(state.best) + 0.5 * options.tolerance
    const toMiddle = 0.5 * (state.opposite - state.best)
    if (state.fBest === 0 || Math.abs(toMiddle) <= closeness) return state.best
    if (used >= allowance) throw new RangeError(`findRoot: not closed after ${used} values; still between ${state.best} and ${state.opposite}`)
    chooseStep(state, toMiddle, closeness)
    state.previous = state.best
    state.fPrevious = state.fBest
    state.best += Math.abs(state.step) > closeness ? state.step : Math.sign(toMiddle) * closeness
    state.fBest = checked(f, state.best)
  }
}

function openBracket(from: number, fFrom: number, to: number, fTo: number): Bracket {
  if (fFrom * fTo > 0) throw new RangeError(`findRoot: no change of sign: f(${from}) = ${fFrom}, f(${to}) = ${fTo}`)
  return { best: to, fBest: fTo, previous: from, fPrevious: fFrom, opposite: from, fOpposite: fFrom, step: to - from, stepBefore: to - from }
}

function checked(f: (x: number) => number, x: number): number {
  const value = f(x)
  if (Number.isNaN(value)) throw new RangeError(`findRoot: f(${x}) is not a number`)
  return value
}

/** Hold the sign change between best and opposite, with the smaller value at best. */
function keepBestInside(s: Bracket): void {
  if ((s.fBest > 0) === (s.fOpposite > 0)) {
    s.opposite = s.previous
    s.fOpposite = s.fPrevious
    s.step = s.stepBefore = s.best - s.previous
  }
  if (Math.abs(s.fOpposite) < Math.abs(s.fBest)) {
    [s.previous, s.best, s.opposite] = [s.best, s.opposite, s.best];
    [s.fPrevious, s.fBest, s.fOpposite] = [s.fBest, s.fOpposite, s.fBest]
  }
}

function chooseStep(s: Bracket, toMiddle: number, closeness: number): void {
  const before = s.stepBefore
  s.stepBefore = s.step
  const guess = Math.abs(before) >= closeness && Math.abs(s.fPrevious) > Math.abs(s.fBest) ? interpolated(s) : NaN
  const inside = guess * Math.sign(toMiddle) > 0 && Math.abs(guess) < 1.5 * Math.abs(toMiddle) - 0.5 * closeness
  if (inside && Math.abs(guess) < 0.5 * Math.abs(before)) s.step = guess
  else s.step = s.stepBefore = toMiddle
}

/** Step from best to where the inverse parabola (or the secant, with two points only) crosses zero. */
function interpolated(s: Bracket): number {
  const ratio = s.fBest / s.fPrevious
  if (s.previous === s.opposite) return (s.opposite - s.best) * ratio / (ratio - 1)
  const q = s.fPrevious / s.fOpposite
  const r = s.fBest / s.fOpposite
  const top = ratio * ((s.opposite - s.best) * q * (q - r) - (s.best - s.previous) * (r - 1))
  return -top / ((q - 1) * (r - 1) * (ratio - 1))
}
