/** The tokens that the bank is painted with, read from the style sheet. */
export interface Palette {
  readonly paper: string
  readonly plate: string
  readonly ink: string
  readonly muted: string
  readonly edge: string
  readonly copper: string
  readonly over: string
  readonly strokes: readonly [string, string, string]
  readonly tints: readonly string[]
  readonly tint_ink: string
  readonly tint_ink_last: string
  readonly figures: string
}

/** Uses from which each of the six tints starts; the last ends at the limit. */
export const tintStarts = [0, 0.5, 0.6, 0.7, 0.8, 0.9] as const

/** Which of the tints, 0 to 5, a use has. */
export function tintOf(use: number | null): number {
  if (use === null) return tintStarts.length - 1
  return Math.max(0, tintStarts.findLastIndex((start) => use >= start))
}

/** Reads the tokens as they are now, light or dark. */
export function readPalette(element: Element): Palette {
  const style = getComputedStyle(element)
  const token = (name: string) => style.getPropertyValue(`--${name}`).trim()
  return {
    paper: token('paper'), plate: token('plate'), ink: token('ink'), muted: token('muted'), edge: token('edge'), copper: token('copper'),
    over: token('over'), strokes: [token('time'), token('noise'), token('offset')],
    tints: tintStarts.map((_start, index) => token(`tint-${index + 1}`)),
    tint_ink: token('tint-ink'), tint_ink_last: token('tint-ink-last'), figures: token('figures'),
  }
}
