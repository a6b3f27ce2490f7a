import { boltzmann } from '../constants'
import { balancedTrajectory, type LatchFailure, type Trajectory } from './balanced'
import type { Circuit, PairName } from './circuit'
import { largeSignalDelay } from './departure'
import { expm2 } from './modes'

/** What one pass of the engine says of a latch. Weights are input-referred: the input difference that balances one unit. */
export interface LatchAnalysis {
  /** Regeneration time constant [s]. */
  readonly tau: number
  /** t_0 of t_d(v) = t_0 + τ·ln(V_DD/2|v|) [s]; may be negative. */
  readonly integration: number
  /** δ/τ: what the large-signal stretch up to V_DD/2 takes longer than linear growth, in time constants; part of t_0. */
  readonly departure: number
  /** Input-referred noise of one decision, rms [V]. */
  readonly noise: number
  /** Volts of input per volt of V_T difference of each pair. */
  readonly thresholdWeight: Partial<Record<PairName, number>>
  /** Volts of input per unit relative k_p difference of each pair. */
  readonly gainWeight: Partial<Record<PairName, number>>
  /** Volts of input per unit relative capacitance difference of the side nodes, in their order. */
  readonly capacitanceWeight: readonly [number, number]
  /** Volts of input per volt of difference that the side nodes start with. */
  readonly startWeight: readonly [number, number]
  /** Arrival times at which an input step still has 90 % and 10 % of its full effect [s]. */
  readonly arrival90: number
  readonly arrival10: number
  /** t_e: when the balanced circuit has come to its equilibrium [s]. */
  readonly settled: number
  /** ln|g|: input gain into the dominant mode at t_e. */
  readonly logGain: number
  /** |g| and the noise variance P [V²] in that mode, both less the same common factor where |g| would overflow. */
  readonly gain: number
  readonly variance: number
}

interface Totals {
  /** ln of the factor taken out of all sums. */
  readonly takenOut: number
  readonly input: number
  readonly variance: number
  readonly threshold: Float64Array
  readonly gain: Float64Array
  readonly capacitance: Float64Array
  readonly start: readonly [number, number]
  readonly window: { times: Float64Array; remaining: Float64Array; density: Float64Array }
}

/** Half steps longer than this against the norm of A go without the commutator, which is then no small correction. */
const commutatorReach = 1.5

/** Rows of the moments at the start, middle and end of a step. */
interface StepRows { readonly start: number; readonly middle: number; readonly end: number }

/**
 * φ half a step earlier: exponential of the integral of A over that half, by the parabola through the three moments, with
 * the commutator of order 4 where it is small. W. Magnus, Comm. Pure Appl. Math. 7, 1954.
 *
 * @param near, far rows at the start and end of the half; @param beyond the third moment; @param forward whether it is the first half
 */
function halfBack(
  m: Float64Array, near: number, far: number, beyond: number, h: number, forward: boolean, phi: Float64Array, propagator: Float64Array,
): void {
  const weights = forward ? [5, 8, -1] : [8, 5, -1]
  const mean = (j: number) => (h / 24) * (weights[0] * m[near + j] + weights[1] * m[far + j] + weights[2] * m[beyond + j])
  const [s11, s12, s21, s22] = [mean(0), mean(1), mean(2), mean(3)]
  const short = Math.max(Math.abs(s11) + Math.abs(s12), Math.abs(s21) + Math.abs(s22)) < commutatorReach
  const k = short ? h / 24 : 0
  const [d11, d12, d21, d22] = [0, 1, 2, 3].map((j) => m[far + j] - m[near + j])
  const c11 = k * (d12 * s21 - s12 * d21)
  const c12 = k * (d11 * s12 + d12 * s22 - s11 * d12 - s12 * d22)
  const c21 = k * (d21 * s11 + d22 * s21 - s21 * d11 - s22 * d21)
  expm2(s11 + c11, s12 + c12, s21 + c21, s22 - c11, propagator)
  const [x, o] = [phi[0], phi[1]]
  phi[0] = propagator[0] * x + propagator[2] * o
  phi[1] = propagator[1] * x + propagator[3] * o
}

/** φ at the middle and the start of a step from φ at its end; φ' = −Aᵀφ. */
function stepBack(
  m: Float64Array, { start, middle, end }: StepRows, h: number, phi: Float64Array, mid: Float64Array, propagator: Float64Array,
): void {
  halfBack(m, middle, end, start, h, false, phi, propagator)
  mid.set(phi)
  halfBack(m, start, middle, end, h, true, phi, propagator)
}

/** Adds weight·(integrands at one moment) to the running sums; returns the input integrand. */
function gather(run: Trajectory, at: number, p: Float64Array, weight: number, noiseWeight: number, sums: Sums): number {
  const { mode, moments: m } = run
  let inputPart = 0
  mode.pairs.forEach(({ enter, sense, source }, i) => {
    const entry = enter[0] * p[0] + enter[1] * p[1]
    const base = at + 6 + 3 * i
    const drive = entry * m[base]
    if (source.gate.at === 'input') inputPart += drive
    sums.threshold[i] -= weight * sense * drive
    sums.gain[i] += weight * sense * entry * m[base + 1]
    sums.variance += noiseWeight * entry * entry * m[base + 2]
  })
  sums.input += weight * inputPart
  sums.capacitance[0] -= weight * p[0] * m[at + 4]
  sums.capacitance[1] -= weight * p[1] * m[at + 5]
  return inputPart
}

/** φ is brought back whenever it passes this, and all sums with it; the logarithm of what was taken out is kept. */
const tooLarge = 1e100

function rescale(phi: Float64Array, sums: Sums, remaining: Float64Array, density: Float64Array): number {
  const factor = 1 / Math.max(Math.abs(phi[0]), Math.abs(phi[1]))
  const scale = (values: Float64Array, by: number) => { for (let i = 0; i < values.length; i++) values[i] *= by }
  for (const values of [phi, sums.threshold, sums.gain, sums.capacitance, remaining, density]) scale(values, factor)
  sums.input *= factor
  sums.variance *= factor * factor
  return -Math.log(factor)
}

interface Sums { input: number; variance: number; threshold: Float64Array; gain: Float64Array; capacitance: Float64Array }

/**
 * One backward pass of the adjoint φ, φ' = −Aᵀφ, from the dominant left mode at the equilibrium: every column's gain is
 * then an integral ∫φ·b_j dt and the noise ∫(φ·b)²S dt. What comes after the equilibrium is added in closed form
 * (constant A): 1/λ for constant columns, 1/2λ for noise. This is the limit t_end → ∞ of the forward columns.
 */
function adjointPass(run: Trajectory): Totals {
  const { times, moments, mode, equilibrium } = run
  const steps = times.length - 1
  const phi = Float64Array.from(equilibrium.left)
  const [end, mid, propagator] = [2, 2, 4].map((size) => new Float64Array(size))
  const sums: Sums = {
    input: 0, variance: 0, capacitance: new Float64Array(2),
    threshold: new Float64Array(mode.pairs.length), gain: new Float64Array(mode.pairs.length),
  }
  const remaining = new Float64Array(steps + 1)
  const density = new Float64Array(steps + 1)
  const row = (i: number) => i * mode.stride
  let takenOut = 0
  density[steps] = gather(run, row(2 * steps), phi, 1 / equilibrium.growth, 1 / (2 * equilibrium.growth), sums)
  remaining[steps] = sums.input
  for (let i = steps - 1; i >= 0; i--) {
    const h = times[i + 1] - times[i]
    end.set(phi)
    stepBack(moments, { start: row(2 * i), middle: row(2 * i + 1), end: row(2 * i + 2) }, h, phi, mid, propagator)
    gather(run, row(2 * i + 2), end, h / 6, h / 6, sums)
    gather(run, row(2 * i + 1), mid, (2 * h) / 3, (2 * h) / 3, sums)
    density[i] = gather(run, row(2 * i), phi, h / 6, h / 6, sums)
    remaining[i] = sums.input
    if (Math.abs(phi[0]) > tooLarge || Math.abs(phi[1]) > tooLarge) takenOut += rescale(phi, sums, remaining, density)
  }
  return { ...sums, takenOut, start: [phi[0], phi[1]], window: { times: Float64Array.from(times), remaining, density } }
}

/** Time at which a step arriving then still reaches `fraction` of the full response; cubic between the knots. */
function arrivalAt({ times, remaining, density }: Totals['window'], fraction: number): number {
  const goal = remaining[0] * fraction
  let i = 0
  while (i < times.length - 2 && remaining[i + 1] / remaining[0] > fraction) i++
  const h = times[i + 1] - times[i]
  let [low, high] = [0, 1]
  for (let pass = 0; pass < 50; pass++) {
    const x = (low + high) / 2
    const value = remaining[i] * (1 + 2 * x) * (1 - x) ** 2 - density[i] * h * x * (1 - x) ** 2
      + remaining[i + 1] * x * x * (3 - 2 * x) + density[i + 1] * h * x * x * (1 - x)
    if (value / goal > 1) low = x
    else high = x
  }
  return times[i] + h * low
}

/**
 * One pass of the engine: balanced trajectory, differential mode, noise, weights.
 *
 * t_0 = t_e − τ·ln|g| + δ with g the input gain into the dominant mode at t_e and δ what the last, large-signal stretch
 * up to V_DD/2 takes longer than linear growth; σ_n = √P/|g|, P the variance in that mode;
 * w_j = −g_j/g, so that a positive difference of V_T asks for a positive input.
 * Method: Kim, Leibowitz, Ren, Madden, IEEE TCAS-I 56(8), 2009; noise of one device per difference, start 2kT/C.
 *
 * @param giveUpAfter time past which the latch counts as too slow [s]
 * @param departure δ/τ where it is known from a neighbouring design; left out: integrated
 */
export function analyseLatch(circuit: Circuit, giveUpAfter: number, departure?: number): LatchAnalysis | LatchFailure {
  const run = balancedTrajectory(circuit, giveUpAfter)
  if (typeof run === 'string') return run
  const totals = adjointPass(run)
  const tau = 1 / run.equilibrium.growth
  const g = totals.input
  const logGain = Math.log(Math.abs(g)) + totals.takenOut
  const delta = departure === undefined ? largeSignalDelay(circuit, run) : departure * tau
  const kT = boltzmann * circuit.temperature
  const initial = totals.start.reduce((sum, p, i) => sum + (p * p * 2 * kT) / circuit.sideCapacitance[i], 0)
  const named = (values: Float64Array): Partial<Record<PairName, number>> =>
    Object.fromEntries(run.mode.pairs.map(({ pair }, i) => [pair, -values[i] / g]))
  return {
    tau,
    integration: run.times[run.times.length - 1] - tau * logGain + delta,
    departure: delta / tau,
    noise: Math.sqrt(totals.variance + initial) / Math.abs(g),
    thresholdWeight: named(totals.threshold),
    gainWeight: named(totals.gain),
    capacitanceWeight: [-totals.capacitance[0] / g, -totals.capacitance[1] / g],
    startWeight: [-totals.start[0] / g, -totals.start[1] / g],
    arrival90: arrivalAt(totals.window, 0.9),
    arrival10: arrivalAt(totals.window, 0.1),
    settled: run.times[run.times.length - 1],
    logGain,
    gain: Math.abs(g),
    variance: totals.variance + initial,
  }
}
