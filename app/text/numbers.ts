const number = /(?<![\p{L}_\d.])(\d+(?:\.\d+)?)(?:e([+-]?\d+))?(?![\p{L}\d.])/gu
const longest = 7

/** One number of a working for the eye: five significant digits where there are more, powers of ten where there are many zeros. */
function shortened(text: string): string {
  if (text.replace(/^0\.0*|\D/g, '').length <= 5 && text.length <= longest) return text
  const value = Number(text)
  const short = Number(value.toPrecision(5))
  const plain = String(short)
  if (short !== 0 && (Math.abs(short) < 1e-3 || Math.abs(short) >= 1e6)) {
    const [mantissa, exponent] = short.toExponential().split('e')
    return `${mantissa}e${Number(exponent)}`
  }
  return plain
}

/** The numbers line of a working as it is read: short figures and printed signs. */
export function readableNumbers(text: string): string {
  return text.replace(number, (found) => shortened(found)).replace(/ \* /g, ' · ').replace(/\bsqrt\(/g, '√(').replace(/(?<=[\s(])-(?=\d)/g, '−')
}

/** A text in which no line breaks between a number and the unit after it. */
export function unbroken(text: string): string {
  return text.replace(/(?<=\d) (?=(?:[afpnuµmkMGT]?(?:V|W|F|s|m|Hz|S|J|A|Ω|C|H|bit|LSB|K)(?![\p{L}\d])|S\/s|[mµ]?m²|%|°C))/gu, '\u00a0')
}
