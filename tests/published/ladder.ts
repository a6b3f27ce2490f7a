/** A complex number as [real, imaginary]. */
type Complex = readonly [number, number]

const times = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c]
const minus = ([a, b]: Complex, [c, d]: Complex): Complex => [a - c, b - d]
const over = (x: Complex, [c, d]: Complex): Complex => times(x, [c / (c * c + d * d), -d / (c * c + d * d)])

/**
 * Share of the input that reaches the middle of a ladder with its ends held, every tap coupled to the input by the same
 * capacitor: nodal equations of the taps, solved by elimination.
 *
 * @param taps         number of taps, odd
 * @param capacitance  of all taps together [F]
 */
export function ladderFeedthrough(taps: number, frequency: number, resistance: number, capacitance: number): number {
  const conductance = (taps + 1) / resistance
  const coupling: Complex = [0, (2 * Math.PI * frequency * capacitance) / taps]
  const diagonal: Complex[] = []
  const right: Complex[] = []
  for (let i = 0; i < taps; i++) {
    const own: Complex = [2 * conductance, coupling[1]]
    const factor: Complex = i === 0 ? [0, 0] : over([conductance, 0], diagonal[i - 1])
    diagonal.push(i === 0 ? own : minus(own, times(factor, [conductance, 0])))
    right.push(i === 0 ? coupling : minus(coupling, times([-factor[0], -factor[1]], right[i - 1])))
  }
  let voltage: Complex = [0, 0]
  for (let i = taps - 1; i >= (taps - 1) / 2; i--) voltage = over(minus(right[i], times([-conductance, 0], voltage)), diagonal[i])
  return Math.hypot(...voltage)
}
