/** Seeded generator of standard normal numbers: xoshiro128** (Blackman, Vigna 2018), polar method (Marsaglia, Bray 1964). */
export const normalNumbers = (seed: number): (() => number) => {
  const s = new Uint32Array(4)
  let mix = seed >>> 0
  for (let i = 0; i < 4; i++) {
    mix = (mix + 0x9e3779b9) >>> 0
    let z = Math.imul(mix ^ (mix >>> 16), 0x85ebca6b)
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35)
    s[i] = (z ^ (z >>> 16)) >>> 0
  }
  const symmetric = () => {
    const turned = Math.imul(s[1], 5)
    const result = Math.imul((turned << 7) | (turned >>> 25), 9)
    const shifted = s[1] << 9
    s[2] ^= s[0]
    s[3] ^= s[1]
    s[1] ^= s[2]
    s[0] ^= s[3]
    s[2] ^= shifted
    s[3] = (s[3] << 11) | (s[3] >>> 21)
    return result * 4.656612873077393e-10
  }
  let spare = 0
  let kept = false
  return () => {
    if (kept) {
      kept = false
      return spare
    }
    let [x, y, square] = [0, 0, 0]
    do {
      x = symmetric()
      y = symmetric()
      square = x * x + y * y
    } while (square >= 1 || square === 0)
    const factor = Math.sqrt((-2 * Math.log(square)) / square)
    spare = y * factor
    kept = true
    return x * factor
  }
}
