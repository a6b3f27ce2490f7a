import type { Faces, Voice } from './faces'
import type { FontFamily } from './font-files'

/** A stretch of text that one font family can show whole. */
export interface Run {
  readonly text: string
  readonly font: FontFamily
}

const order: Record<Voice, readonly FontFamily[]> = {
  words: ['words', 'words-more', 'signs'],
  figures: ['figures', 'figures-more', 'signs'],
}
/** Pictures find a font by its own name only, which the two halves of a family share. */
const pictureOrder: Record<Voice, readonly FontFamily[]> = { words: ['words', 'signs'], figures: ['figures', 'signs'] }
const unknown = '\ufffd'
const longestWord = 36

/**
 * Text cut into runs, each in the first family of its voice that has all its characters.
 * What no family has becomes the replacement character, so that an empty box is never shown.
 *
 * @param text   any text
 * @param voice  words or figures
 * @param faces  the fonts and what they cover
 * @param use    where it stands: in the text, or in a picture
 */
export function splitRuns(text: string, voice: Voice, faces: Faces, use: 'text' | 'picture' = 'text'): Run[] {
  const families = (use === 'text' ? order : pictureOrder)[voice]
  const runs: { text: string; font: FontFamily }[] = []
  for (const character of clean(text)) {
    const last = runs.at(-1)
    const shown = familyOf(character, families, faces) ? character : unknown
    const font = familyOf(shown, last && isMark(character) ? [last.font, ...families] : families, faces) ?? 'signs'
    if (last && (last.font === font || character === '\n')) last.text += shown
    else runs.push({ text: shown, font })
  }
  return runs
}

function familyOf(character: string, families: readonly FontFamily[], faces: Faces): FontFamily | undefined {
  if (character === '\n') return families[0]
  const code = character.codePointAt(0) ?? 0
  return families.find((family) => faces.covers.get(family)?.has(code))
}

const isMark = (character: string): boolean => /^\p{M}$/u.test(character)

/** Composed, and without control characters. */
function clean(text: string): string {
  return text.normalize('NFC').replace(/\r\n?/g, '\n').replace(/\t/g, ' ').replace(/[\p{Cc}\p{Cs}]/gu, (c) => (c === '\n' ? c : ''))
}

/** Text with a place to break in words that no line of a narrow column could hold. */
export const softened = (text: string): string => text.replace(new RegExp(`\\S{${longestWord},}`, 'gu'), chop)

const chop = (word: string): string => [...word].map((c, i) => (i > 0 && i % (longestWord / 2) === 0 ? '\u200b' + c : c)).join('')
