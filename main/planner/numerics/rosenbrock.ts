/** Right side of y' = f(t, y) with its Jacobian; all write into given arrays. */
export interface OdeSystem {
  readonly rates: (t: number, y: Float64Array, into: Float64Array) => void
  /** ∂f/∂y row by row, and ∂f/∂t taken inside the step that starts at t. */
  readonly derivatives: (t: number, y: Float64Array, jacobian: Float64Array, inTime: Float64Array) => void
}

export interface OdeOptions {
  readonly from: number
  readonly to: number
  readonly start: Float64Array
  readonly relative: number
  readonly absolute: number
  readonly firstStep: number
  /** Times where the right side has a kink; steps end there. Ascending. */
  readonly breaks?: readonly number[]
  readonly maxSteps: number
  /** Longest step allowed from here; asked once a step. */
  readonly longestStep?: () => number
  /** After each accepted step; true ends the integration. The arrays are reused: copy what is kept. */
  readonly onStep?: (step: OdeStep) => boolean
}

export interface OdeStep {
  readonly t0: number
  readonly t1: number
  readonly y0: Float64Array
  readonly y1: Float64Array
  readonly f0: Float64Array
  readonly f1: Float64Array
}

export type OdeEnd = 'reached' | 'stopped' | 'too_many_steps'

// RODAS, six stages, order 4(3), stiffly accurate, γ = 1/4.
// E. Hairer, G. Wanner, Solving Ordinary Differential Equations II, 2nd ed. 1996, section IV.7 and its code RODAS.
const gamma = 0.25
const a = [
  [], [1.544], [0.9466785280815826, 0.2557011698983284], [3.314825187068521, 2.896124015972201, 0.9986419139977817],
  [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
  [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1],
]
const c = [
  [], [-5.6688], [-2.430093356833875, -0.2063599157091915], [-0.1073529058151375, -9.594562251023355, -20.47028614809616],
  [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
  [8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054],
]
const alpha = [0, 0.386, 0.21, 0.63, 1, 1]
const d = [0.25, -0.1043, 0.1035, -0.0362, 0, 0]

const growth = 5
const shrink = 0.2
const safety = 0.9

interface Work {
  y: Float64Array; next: Float64Array; slope: Float64Array; nextSlope: Float64Array
  readonly k: Float64Array[]; readonly f: Float64Array; readonly jacobian: Float64Array; readonly inTime: Float64Array
  readonly matrix: Float64Array; readonly order: Int32Array
}

/** LU factors with partial pivoting, in place. */
function factor(m: Float64Array, order: Int32Array, n: number): void {
  for (let i = 0; i < n; i++) {
    let pivot = i
    for (let r = i + 1; r < n; r++) if (Math.abs(m[r * n + i]) > Math.abs(m[pivot * n + i])) pivot = r
    order[i] = pivot
    if (pivot !== i) for (let j = 0; j < n; j++) [m[i * n + j], m[pivot * n + j]] = [m[pivot * n + j], m[i * n + j]]
    for (let r = i + 1; r < n; r++) {
      const ratio = (m[r * n + i] /= m[i * n + i])
      if (ratio !== 0) for (let j = i + 1; j < n; j++) m[r * n + j] -= ratio * m[i * n + j]
    }
  }
}

function solve(m: Float64Array, order: Int32Array, n: number, x: Float64Array): void {
  for (let i = 0; i < n; i++) {
    const pivot = order[i]
    if (pivot !== i) [x[i], x[pivot]] = [x[pivot], x[i]]
  }
  for (let i = 1; i < n; i++) for (let j = 0; j < i; j++) x[i] -= m[i * n + j] * x[j]
  for (let i = n - 1; i >= 0; i--) {
    for (let j = i + 1; j < n; j++) x[i] -= m[i * n + j] * x[j]
    x[i] /= m[i * n + i]
  }
}

/** The six stages of one step; `next` gets the solution, k[5] is the error estimate. */
function stages({ rates }: OdeSystem, t: number, h: number, w: Work): void {
  const { y, next, k, f } = w
  const n = y.length
  for (let i = 0; i < n * n; i++) w.matrix[i] = -w.jacobian[i]
  for (let i = 0; i < n; i++) w.matrix[i * n + i] += 1 / (gamma * h)
  factor(w.matrix, w.order, n)
  for (let stage = 0; stage < 6; stage++) {
    const [from, mix] = [a[stage], c[stage]]
    for (let i = 0; i < n; i++) {
      let sum = y[i]
      for (let j = 0; j < stage; j++) sum += from[j] * k[j][i]
      next[i] = sum
    }
    if (stage === 0) f.set(w.slope)
    else rates(t + alpha[stage] * h, next, f)
    const into = k[stage]
    for (let i = 0; i < n; i++) {
      let sum = f[i] + h * d[stage] * w.inTime[i]
      for (let j = 0; j < stage; j++) sum += (mix[j] / h) * k[j][i]
      into[i] = sum
    }
    solve(w.matrix, w.order, n, into)
  }
  for (let i = 0; i < n; i++) next[i] += k[5][i]
}

/** Largest component error of a step over its tolerance; at most 1 means accepted. */
function errorRatio({ y, next, k }: Work, relative: number, absolute: number): number {
  let worst = 0
  for (let i = 0; i < y.length; i++) {
    const ratio = Math.abs(k[5][i]) / (absolute + relative * Math.max(Math.abs(y[i]), Math.abs(next[i])))
    if (!(ratio <= worst)) worst = ratio
  }
  return worst
}

function workspace(start: Float64Array): Work {
  const n = start.length
  const vector = () => new Float64Array(n)
  return {
    y: Float64Array.from(start), next: vector(), slope: vector(), nextSlope: vector(), f: vector(), inTime: vector(),
    k: Array.from({ length: 6 }, vector), jacobian: new Float64Array(n * n), matrix: new Float64Array(n * n), order: new Int32Array(n),
  }
}

/** Makes the accepted end of a step the start of the next. */
function advance(w: Work): void {
  ;[w.y, w.next] = [w.next, w.y]
  ;[w.slope, w.nextSlope] = [w.nextSlope, w.slope]
}

/**
 * Integrates a stiff y' = f(t, y) with step size controlled by the embedded error; L-stable, so that a slow drift beside
 * fast modes costs few steps. The final state is left in the returned `y`.
 */
export function integrateStiff(system: OdeSystem, options: OdeOptions): { end: OdeEnd; t: number; y: Float64Array } {
  const w = workspace(options.start)
  const breaks = (options.breaks ?? []).filter((at) => at > options.from && at < options.to)
  let t = options.from
  let h = options.firstStep
  let nextBreak = 0
  let fresh = false
  system.rates(t, w.y, w.slope)
  for (let count = 0; count < options.maxSteps; count++) {
    const goal = nextBreak < breaks.length ? breaks[nextBreak] : options.to
    let step = Math.min(h, options.longestStep?.() ?? Infinity)
    const lands = t + step >= goal - 1e-9 * step
    if (lands) step = goal - t
    if (!fresh) { system.derivatives(t, w.y, w.jacobian, w.inTime); fresh = true }
    stages(system, t, step, w)
    const ratio = errorRatio(w, options.relative, options.absolute)
    const factorNext = Number.isNaN(ratio) ? shrink : Math.min(growth, Math.max(shrink, safety * (ratio || 1e-12) ** -0.25))
    h = lands && ratio <= 1 && factorNext >= 1 ? Math.max(h, step * factorNext) : step * factorNext
    if (!(ratio <= 1)) continue
    const t1 = lands ? goal : t + step
    system.rates(t1, w.next, w.nextSlope)
    const stop = options.onStep?.({ t0: t, t1, y0: w.y, y1: w.next, f0: w.slope, f1: w.nextSlope }) ?? false
    t = t1
    advance(w)
    fresh = false
    if (stop) return { end: 'stopped', t, y: w.y }
    if (!lands) continue
    if (nextBreak >= breaks.length) return { end: 'reached', t, y: w.y }
    nextBreak++
  }
  return { end: 'too_many_steps', t, y: w.y }
}
