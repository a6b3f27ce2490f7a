const longest = 80

function plain(text: string): string {
  return text.replace(/([a-z0-9])([A-Z])/g, '$1_$2').toLowerCase().replace(/[\s-]+/g, '_')
}

/** Edits (insert, drop, replace, swap of neighbours) from one word to the other. */
function distance(a: string, b: string): number {
  const table = [Array.from({ length: b.length + 1 }, (_, j) => j)]
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i]
    for (let j = 1; j <= b.length; j += 1) {
      const replaced = table[i - 1][j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1)
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1] ? table[i - 2][j - 2] + 1 : Infinity
      row.push(Math.min(replaced, row[j - 1] + 1, table[i - 1][j] + 1, swapped))
    }
    table.push(row)
  }
  return table[a.length][b.length]
}

/**
 * The word a person probably meant: the same but for case, hyphens or a missing unit, or a few letters away.
 *
 * @returns null when none of the candidates is near
 */
export function nearMiss(word: string, candidates: readonly string[]): string | null {
  if (word.length > longest) return null
  const given = plain(word)
  const same = candidates.find((candidate) => plain(candidate) === given)
  if (same !== undefined) return same
  const longer = given.length >= 3 ? candidates.find((candidate) => candidate.startsWith(`${given}_`)) : undefined
  if (longer !== undefined) return longer
  const ranked = candidates.map((candidate) => ({ candidate, edits: distance(given, plain(candidate)) })).sort((a, b) => a.edits - b.edits)
  const best = ranked.at(0)
  return best && best.edits <= Math.max(1, Math.floor(best.candidate.length / 3)) ? best.candidate : null
}
