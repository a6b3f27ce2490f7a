import { arrayUnits, type DacScheme } from './scheme'

/** A capacitor that goes from one rail to another, rails in units of V_ref: 0, ½ (common mode) or 1. */
interface Move {
  units: number
  from: number
  to: number
}

/** What one side does on the way to the next decision, for both outcomes of the last one: 0 and 1. */
type Step = readonly [down: Move[], up: Move[]]

/** A whole conversion of a differential array, both sides (positive, negative). */
interface Switching {
  /** Units on V_ref before the first decision, and the charge that was drawn on the way there [C_u·V_ref], both sides. */
  referenceUnits: readonly [number, number]
  firstDraw: number
  /** What each side does after the decisions 1 … N−1. */
  steps: readonly (readonly [Step, Step])[]
}

/**
 * Mean energy that a differential capacitive DAC draws from V_ref in one conversion, in units of C_u·V_ref²; the exact mean
 * over all codes, sampling excluded.
 *
 * Charge balance of each side: moving capacitors by δ_j shifts the floating top plate by Σ C_j·δ_j/C_total, and V_ref supplies,
 * to every capacitor that is on it afterwards, C_j·(own move − shift of the top plate). Every decision is 0 and 1 in equally
 * many codes whatever came before, and a step's energy is linear in the capacitance that is already on V_ref, so the mean over
 * all prefixes of a step follows from the mean of that capacitance: the sum over the code tree, level by level.
 *
 * Schemes: conventional and split capacitor, B. P. Ginsburg, A. P. Chandrakasan, ISCAS 2005; monotonic, C.-C. Liu et al.,
 * JSSC 45(4), 2010; common-mode based, Y. Zhu et al., JSSC 45(6), 2010.
 *
 * @param scheme  switching scheme
 * @param bits    N, resolution [bit], integer ≥ 2
 * @returns       E/(C_u·V_ref²) [1]
 * @throws RangeError for another resolution
 */
export function meanSwitchingEnergy(scheme: DacScheme, bits: number): number {
  if (!Number.isInteger(bits) || bits < 2) throw new RangeError(`meanSwitchingEnergy: ${bits} bits`)
  const { referenceUnits, firstDraw, steps } = switchings[scheme](bits)
  const total = arrayUnits(scheme, bits)
  let energy = firstDraw
  const onReference = [...referenceUnits]
  for (const sides of steps) {
    for (let side = 0; side < 2; side++) {
      const [down, up] = sides[side].map((moves) => drawn(moves, onReference[side], total))
      energy += 0.5 * (down.charge + up.charge)
      onReference[side] = 0.5 * (down.onReference + up.onReference)
    }
  }
  return energy
}

/** Charge from V_ref [C_u·V_ref], and the units that are on it afterwards. */
function drawn(moves: Move[], onReference: number, total: number): { charge: number; onReference: number } {
  let shift = 0
  let own = 0
  let after = onReference
  for (const { units, from, to } of moves) {
    shift += units * (to - from) / total
    if (to === 1) own += units * (to - from)
    after += units * (Number(to === 1) - Number(from === 1))
  }
  return { charge: own - shift * after, onReference: after }
}

const move = (units: number, from: number, to: number): Move => ({ units, from, to })

/** The same moves with the rails exchanged: what the opposite side does. */
function exchanged([down, up]: Step): Step {
  const opposite = (moves: Move[]) => moves.map(({ units, from, to }) => move(units, 1 - from, 1 - to))
  return [opposite(down), opposite(up)]
}

/** Weights of the binary capacitors that are switched after the decisions 1 … N−1, the largest being `first`. */
function weightsFrom(first: number, bits: number): number[] {
  return Array.from({ length: bits - 1 }, (_, i) => first / 2 ** i)
}

/**
 * After sampling the largest capacitor (half of the array) goes to V_ref on one side and the rest of the array on the other:
 * 2^(N−1) units each, and each draws half of them, as the top plate follows by V_ref/2 and the sampled input cancels.
 */
function halfArrayFirst(bits: number, stepOf: (units: number) => Step): Switching {
  const half = 2 ** (bits - 1)
  const steps = weightsFrom(half / 2, bits).map((units) => [stepOf(units), exchanged(stepOf(units))] as const)
  return { referenceUnits: [half, half], firstDraw: half, steps }
}

const switchings: Record<DacScheme, (bits: number) => Switching> = {
  // Try the next weight; where the last one was too much, it goes back at the same time.
  conventional: (bits) => halfArrayFirst(bits, (units) => [[move(2 * units, 1, 0), move(units, 0, 1)], [move(units, 0, 1)]]),
  // The largest capacitor is a copy of the rest: where it was too much, only its part of that size goes back.
  split_capacitor: (bits) => halfArrayFirst(bits, (units) => [[move(units, 1, 0)], [move(units, 0, 1)]]),
  // All on V_ref; the side that is higher drops its next capacitor to ground, the other side rests.
  monotonic: (bits) => ({
    referenceUnits: [2 ** (bits - 1), 2 ** (bits - 1)], firstDraw: 0,
    steps: weightsFrom(2 ** (bits - 2), bits).map((units) => [[[], [move(units, 1, 0)]], [[move(units, 1, 0)], []]]),
  }),
  // All on the common mode; the higher side's next capacitor goes to ground, the other side's to V_ref.
  common_mode_based: (bits) => ({
    referenceUnits: [0, 0], firstDraw: 0,
    steps: weightsFrom(2 ** (bits - 2), bits).map((units) => {
      const step: Step = [[move(units, 0.5, 1)], [move(units, 0.5, 0)]]
      return [step, exchanged(step)] as const
    }),
  }),
}
