/** Chips drawn with a seed, for holding yield integrals against plain counting. */
export function seededUniform(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296
  }
}

/** Polar method: two independent standard normal values from one pair of uniform ones, handed out one at a time. */
export function seededNormal(uniform: () => number): () => number {
  let spare: number | null = null
  return () => {
    if (spare !== null) {
      const value = spare
      spare = null
      return value
    }
    for (;;) {
      const u = 2 * uniform() - 1
      const v = 2 * uniform() - 1
      const square = u * u + v * v
      if (square > 0 && square < 1) {
        const scale = Math.sqrt(-2 * Math.log(square) / square)
        spare = v * scale
        return u * scale
      }
    }
  }
}

export interface Counted {
  absolute: number
  terminal: number
  dnl: number
}

/** Fractions of chips that meet the limits; `draw` fills the errors of one chip's thresholds. */
export function countYields(chips: number, count: number, limits: Counted, draw: (errors: Float64Array) => void): Counted {
  const errors = new Float64Array(count)
  const good = { absolute: 0, terminal: 0, dnl: 0 }
  for (let chip = 0; chip < chips; chip++) {
    draw(errors)
    let absolute = Math.abs(errors[0])
    let terminal = 0
    let dnl = 0
    const slope = (errors[count - 1] - errors[0]) / (count - 1)
    for (let k = 1; k < count; k++) {
      absolute = Math.max(absolute, Math.abs(errors[k]))
      terminal = Math.max(terminal, Math.abs(errors[k] - errors[0] - slope * k))
      dnl = Math.max(dnl, Math.abs(errors[k] - errors[k - 1]))
    }
    good.absolute += Number(absolute < limits.absolute)
    good.terminal += Number(terminal < limits.terminal)
    good.dnl += Number(dnl < limits.dnl)
  }
  return { absolute: good.absolute / chips, terminal: good.terminal / chips, dnl: good.dnl / chips }
}

/** Half width of the 99.9 % interval of a counted fraction whose true value is p. */
export function countingRoom(p: number, chips: number): number {
  return 3.29 * Math.sqrt(p * (1 - p) / chips) + 0.5 / chips
}
