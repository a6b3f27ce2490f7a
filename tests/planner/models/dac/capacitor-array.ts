import type { DacScheme } from '../../../../main/planner/models/dac/scheme'

/**
 * Brute force for the tests: every code, every capacitor with its plates, nothing shared with the planner.
 * Each side is a list of capacitors with bottom-plate voltages; the top plate floats and keeps its charge.
 */
interface Side {
  units: number[]
  bottom: number[]
  top: number
}

type Bits = readonly number[]

/** Mean over all codes of the charge drawn from V_ref = 1 V by both sides, C_u = 1 F. */
export function meanOverAllCodes(scheme: DacScheme, bits: number): number {
  let total = 0
  for (let code = 0; code < 2 ** bits; code++) total += energyOfCode(scheme, bits, code)
  return total / 2 ** bits
}

export function energyOfCode(scheme: DacScheme, bits: number, code: number): number {
  const decisions = Array.from({ length: bits }, (_, i) => (code >> (bits - 1 - i)) & 1)
  return runs[scheme](decisions, false) + runs[scheme](decisions, true)
}

/** One side of the array; the opposite side is connected the other way round, or sees the complement of the decisions. */
const runs: Record<DacScheme, (decisions: Bits, opposite: boolean) => number> = {
  conventional: (decisions, opposite) => bottomSampled(decisions, opposite, (n) => [...powers(n - 1), 1], (kept) => kept.map(Number)),
  split_capacitor: (decisions, opposite) => bottomSampled(decisions, opposite, (n) => [...powers(n - 2), 1, ...powers(n - 2), 1], splitSettings),
  monotonic: (decisions, opposite) => topSampled(opposite ? complement(decisions) : decisions, 1, (bit) => (bit ? 0 : 1)),
  common_mode_based: (decisions, opposite) => topSampled(opposite ? complement(decisions) : decisions, 0.5, (bit) => (bit ? 0 : 1)),
}

function complement(decisions: Bits): Bits {
  return decisions.map((bit) => 1 - bit)
}

function powers(largest: number): number[] {
  return Array.from({ length: largest + 1 }, (_, i) => 2 ** (largest - i))
}

type Settings = (kept: (0 | 1)[], sizes: number[]) => number[]

/** Input sampled on the bottom plates (some level, which has to cancel), then one trial weight after the other. */
function bottomSampled(decisions: Bits, opposite: boolean, build: (n: number) => number[], settings: Settings): number {
  const units = build(decisions.length)
  const sampled = opposite ? 0.45 : 0.3
  const side: Side = { units, bottom: units.map(() => sampled), top: 0 }
  let energy = 0
  for (let trial = 0; trial < decisions.length; trial++) {
    const kept = units.map((_, i) => (i < trial ? decisions[i] : i === trial ? 1 : 0) as 0 | 1)
    const bottom = settings(kept, units)
    energy += connect(side, opposite ? bottom.map((v) => 1 - v) : bottom)
  }
  return energy
}

/** The first half of the list is the copy of the rest: bits 1 raises main capacitor i, bit 0 lowers that of the copy. */
function splitSettings(kept: (0 | 1)[], sizes: number[]): number[] {
  const half = sizes.length / 2
  const trial = kept.lastIndexOf(1)
  const copy = Array.from({ length: half }, () => 1)
  const main = Array.from({ length: half }, () => 0)
  for (let i = 0; i < trial; i++) {
    if (kept[i]) main[i] = 1
    else copy[i] = 0
  }
  return [...copy, ...main]
}

/** Input sampled on the top plate with all bottom plates at `rest`; a decision moves the next capacitor, or leaves it. */
function topSampled(decisions: Bits, rest: number, target: (bit: number) => number): number {
  const units = [...powers(decisions.length - 2), 1]
  const side: Side = { units, bottom: units.map(() => rest), top: 0.4 }
  let energy = 0
  for (let step = 0; step < decisions.length - 1; step++) {
    const next = [...side.bottom]
    next[step] = target(decisions[step])
    energy += connect(side, next)
  }
  return energy
}

/** Puts the bottom plates where they are told, lets the top plate follow, returns the charge that came from V_ref. */
function connect(side: Side, next: number[]): number {
  const whole = side.units.reduce((sum, c) => sum + c, 0)
  const top = side.top + side.units.reduce((sum, c, i) => sum + c * (next[i] - side.bottom[i]), 0) / whole
  let charge = 0
  side.units.forEach((c, i) => {
    if (next[i] === 1) charge += c * (next[i] - top - (side.bottom[i] - side.top))
  })
  side.top = top
  side.bottom = next
  return charge
}
