/** Error function, normal distribution and its inverse, to the precision of a double. No dependency. */

const inverseSqrtPi = 0.5641895835477563
const inverseSqrt2Pi = 0.3989422804014327
const halfSqrtPiTimesSqrt2 = 1.2533141373155003
const logSqrt2Pi = 0.9189385332046727
/** Beyond this erfc is below the smallest double. */
const erfcUnderflow = 27.3
/** Where the central form gives way to the tail form; boundary of the published approximations. */
const centralReach = 0.46875

/*
 * Rational Chebyshev approximations of W. J. Cody, "Rational Chebyshev approximations for the error function",
 * Mathematics of Computation 23 (1969), 631–637, in the digits of the double precision set. Highest power first;
 * held against 40-digit arithmetic in the tests.
 */
const erfTop = [1.85777706184603153e-1, 3.16112374387056560, 1.13864154151050156e2, 3.77485237685302021e2, 3.20937758913846947e3]
const erfBottom = [1, 2.36012909523441209e1, 2.44024637934444173e2, 1.28261652607737228e3, 2.84423683343917062e3]
const midTop = [2.15311535474403846e-8, 5.64188496988670089e-1, 8.88314979438837594, 6.61191906371416295e1, 2.98635138197400131e2,
  8.81952221241769090e2, 1.71204761263407058e3, 2.05107837782607147e3, 1.23033935479799725e3]
const midBottom = [1, 1.57449261107098347e1, 1.17693950891312499e2, 5.37181101862009858e2, 1.62138957456669019e3,
  3.29079923573345963e3, 4.36261909014324716e3, 3.43936767414372164e3, 1.23033935480374942e3]
const farTop = [1.63153871373020978e-2, 3.05326634961232344e-1, 3.60344899949804439e-1, 1.25781726111229246e-1,
  1.60837851487422766e-2, 6.58749161529837803e-4]
const farBottom = [1, 2.56852019228982242, 1.87295284992346725, 5.27905102951428412e-1, 6.05183413124413191e-2, 2.33520497626869185e-3]

function polynomial(coefficients: readonly number[], x: number): number {
  let sum = coefficients[0]
  for (let i = 1; i < coefficients.length; i++) sum = sum * x + coefficients[i]
  return sum
}

/** exp(−x²) with the rounding of x² taken out, so that far tails keep their digits. */
function expMinusSquare(x: number): number {
  const head = Math.trunc(x * 16) / 16
  return Math.exp(-head * head) * Math.exp(-(x - head) * (x + head))
}

function erfCentral(x: number): number {
  const square = x * x
  return x * polynomial(erfTop, square) / polynomial(erfBottom, square)
}

/** exp(x²)·erfc(x) for x ≥ 0.46875. */
function scaledTail(x: number): number {
  if (x <= 4) return polynomial(midTop, x) / polynomial(midBottom, x)
  const inverse = 1 / (x * x)
  return (inverseSqrtPi - inverse * polynomial(farTop, inverse) / polynomial(farBottom, inverse)) / x
}

/**
 * Error function, erf(x) = 2/√π ∫₀ˣ exp(−t²) dt. Relative error below 1e-15.
 *
 * @param x  any real [1]
 */
export function erf(x: number): number {
  const size = Math.abs(x)
  if (size <= centralReach) return erfCentral(x)
  if (size > 6) return Math.sign(x)
  return Math.sign(x) * (1 - expMinusSquare(size) * scaledTail(size))
}

/**
 * Complementary error function, erfc(x) = 1 − erf(x), to full relative precision in the upper tail.
 *
 * @param x  any real [1]
 */
export function erfc(x: number): number {
  if (x < centralReach) return x < -centralReach ? 2 - erfc(-x) : 1 - erfCentral(x)
  return x > erfcUnderflow ? 0 : expMinusSquare(x) * scaledTail(x)
}

/** Scaled complementary error function, exp(x²)·erfc(x); Infinity below about −26. */
export function erfcx(x: number): number {
  if (x >= centralReach) return scaledTail(x)
  return erfc(x) * Math.exp(x * x)
}

/** Density of the standard normal distribution, φ(x) = exp(−x²/2)/√(2π). */
export function normalPdf(x: number): number {
  return inverseSqrt2Pi * Math.exp(-0.5 * x * x)
}

/** Standard normal distribution function, Φ(x) = ½ erfc(−x/√2). */
export function normalCdf(x: number): number {
  return 0.5 * erfc(-x * Math.SQRT1_2)
}

/** Upper tail of the standard normal distribution, Q(x) = 1 − Φ(x), to full relative precision. */
export function normalTail(x: number): number {
  return 0.5 * erfc(x * Math.SQRT1_2)
}

/** ln Q(x), also where Q underflows. */
export function logNormalTail(x: number): number {
  return x < 1 ? Math.log(normalTail(x)) : -0.5 * x * x + Math.log(0.5 * scaledTail(x * Math.SQRT1_2))
}

/**
 * Mean excess of a standard normal variable over u, E[(Z − u)⁺] = φ(u) − u·Q(u): the integral of the tail from u.
 *
 * @param u  any real [1]
 */
export function normalExcess(u: number): number {
  if (u < 0) return normalExcess(-u) - u
  if (u < 1) return normalPdf(u) - u * normalTail(u)
  return normalPdf(u) * (1 - u * halfSqrtPiTimesSqrt2 * scaledTail(u * Math.SQRT1_2))
}

/**
 * Inverse of the upper tail: x with Q(x) = q. Keeps its digits for tiny q, where 1 − q would lose them.
 *
 * Starts from formula 26.2.23 of Abramowitz and Stegun (4.5e-4) and polishes by Halley steps (each triples the digits).
 *
 * @param q  tail probability [1], 0 < q < 1
 * @throws RangeError outside that range
 */
export function normalTailInverse(q: number): number {
  if (!(q > 0 && q < 1)) throw new RangeError(`normalTailInverse: q = ${q} is not between 0 and 1`)
  if (q > 0.5) return -lowTailInverse(1 - q)
  return lowTailInverse(q)
}

/**
 * Inverse of the standard normal distribution function, Φ⁻¹(p). Relative error below 1e-13 (of x, away from p = ½).
 *
 * @param p  probability [1], 0 < p < 1
 * @throws RangeError outside that range
 */
export function normalCdfInverse(p: number): number {
  if (!(p > 0 && p < 1)) throw new RangeError(`normalCdfInverse: p = ${p} is not between 0 and 1`)
  return p > 0.5 ? lowTailInverse(1 - p) : -lowTailInverse(p)
}

function lowTailInverse(q: number): number {
  const t = Math.sqrt(-2 * Math.log(q))
  let x = t - (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)))
  for (let step = 0; step < 3; step++) {
    const error = (normalTail(x) - q) / normalPdf(x)
    x += error / (1 - 0.5 * x * error)
  }
  return x
}

/** Positive nodes of the eight-point Gauss–Legendre rule and their weights. */
const narrowNodes = [0.18343464249564980, 0.52553240991632899, 0.79666647741362674, 0.96028985649753623]
const narrowWeights = [0.36268378337836198, 0.31370664587788729, 0.22238103445337447, 0.10122853629037626]

/**
 * Probability of a standard normal variable between a and b, Φ(b) − Φ(a), without cancellation.
 *
 * @param a  lower end [1]
 * @param b  upper end [1], ≥ a
 */
export function normalInterval(a: number, b: number): number {
  if (b < 0) return normalInterval(-b, -a)
  if (a <= 0) return 0.5 * (erf(b * Math.SQRT1_2) - erf(a * Math.SQRT1_2))
  if ((b - a) * Math.max(b, 1) > 1) return normalTail(a) - normalTail(b)
  return normalPdf(a) * narrowShape(a, b - a)
}

/** ln(Φ(b) − Φ(a)), also where the probability underflows or is 1 but for a rounding error. */
export function logNormalInterval(a: number, b: number): number {
  if (b < 0) return logNormalInterval(-b, -a)
  if (a <= 0) {
    const outside = normalTail(b) + normalTail(-a)
    return outside < 0.5 ? Math.log1p(-outside) : Math.log(normalInterval(a, b))
  }
  if ((b - a) * Math.max(b, 1) > 1) {
    const head = logNormalTail(a)
    return head + Math.log(-Math.expm1(logNormalTail(b) - head))
  }
  return -0.5 * a * a - logSqrt2Pi + Math.log(narrowShape(a, b - a))
}

/** ∫ φ(a + s)/φ(a) ds over 0 … width, for width·(a + width) up to about 1. */
function narrowShape(a: number, width: number): number {
  const half = 0.5 * width
  let sum = 0
  for (let i = 0; i < narrowNodes.length; i++) {
    const low = half * (1 - narrowNodes[i])
    const high = half * (1 + narrowNodes[i])
    sum += narrowWeights[i] * (Math.exp(-low * (a + 0.5 * low)) + Math.exp(-high * (a + 0.5 * high)))
  }
  return half * sum
}
