/** Neighbours that look the same: from the first to the last of them. */
export interface Fold<T> {
  readonly first: T
  readonly last: T
  readonly count: number
}

/**
 * Runs of neighbours with the same key. Folding goes by what is shown, so that no two rows of a table read alike.
 *
 * @param items  in order
 * @param keyOf  what a row would show, but for its own place
 */
export function fold<T>(items: readonly T[], keyOf: (item: T) => string): Fold<T>[] {
  const folds: Fold<T>[] = []
  let lastKey: string | undefined
  for (const item of items) {
    const key = keyOf(item)
    const open = folds.at(-1)
    if (open && key === lastKey) folds[folds.length - 1] = { ...open, last: item, count: open.count + 1 }
    else folds.push({ first: item, last: item, count: 1 })
    lastKey = key
  }
  return folds
}

/** `7`, or `1–63` for a fold. */
export const rangeOf = (first: number, last: number): string => (first === last ? String(first) : `${first}–${last}`)
