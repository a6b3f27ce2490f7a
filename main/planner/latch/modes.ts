/** Dominant eigenmode of a real 2×2 matrix: growth rate λ, left vector with left·right = 1, right vector with output entry 1. */
export interface Mode {
  readonly growth: number
  readonly left: readonly [number, number]
  readonly right: readonly [number, number]
}

/**
 * The mode that wins in the end. `growth` is the real part when the pair is complex (then nothing regenerates cleanly).
 * @param a storage, row by row from `at`;  @param output index of the read node, whose right-vector entry is scaled to 1
 */
export function dominantMode(a: Float64Array, at: number, output: number): Mode {
  const [a11, a12, a21, a22] = [a[at], a[at + 1], a[at + 2], a[at + 3]]
  const half = (a11 + a22) / 2
  const discriminant = ((a11 - a22) / 2) ** 2 + a12 * a21
  if (discriminant < 0) return { growth: Math.min(half, 0), left: [0, 0], right: [0, 0] }
  const growth = half + Math.sqrt(discriminant)
  const right: [number, number] = Math.abs(growth - a11) > Math.abs(growth - a22) ? [a12, growth - a11] : [growth - a22, a21]
  const left: [number, number] = Math.abs(growth - a11) > Math.abs(growth - a22) ? [a21, growth - a11] : [growth - a22, a12]
  const product = left[0] * right[0] + left[1] * right[1]
  const scale = right[output] / product
  return { growth, left: [left[0] * scale, left[1] * scale], right: [right[0] / right[output], right[1] / right[output]] }
}

/**
 * exp(Ω) of a real 2×2 matrix by its closed form, written into `into` row by row.
 * With Ω = s·1 + B, B traceless, B² = δ·1: exp(Ω) = eˢ (cosh√δ·1 + sinh√δ/√δ·B).
 */
export function expm2(o11: number, o12: number, o21: number, o22: number, into: Float64Array): void {
  const s = (o11 + o22) / 2
  const d = (o11 - o22) / 2
  const delta = d * d + o12 * o21
  const root = Math.sqrt(Math.abs(delta))
  // e^(s ± √δ) apart: e^s·cosh√δ would be 0·∞ once one mode has died out within the step.
  const [up, down] = delta >= 0 ? [Math.exp(s + root), Math.exp(s - root)] : [Math.exp(s), Math.exp(s)]
  const even = delta >= 0 ? (up + down) / 2 : up * Math.cos(root)
  const odd = root < 1e-6 ? Math.exp(s) * (1 + delta / 6) : delta >= 0 ? (up - down) / (2 * root) : (up * Math.sin(root)) / root
  into[0] = even + odd * d
  into[1] = odd * o12
  into[2] = odd * o21
  into[3] = even - odd * d
}
