import fc from 'fast-check'
import { beforeAll, describe, expect, it } from 'vitest'
import { loadFaces, type Faces } from '../../main/sheet/faces'
import { softened, splitRuns } from '../../main/sheet/runs'
import { typeset } from '../../main/sheet/typeset'

let faces: Faces
beforeAll(async () => { faces = await loadFaces() })

const covered = (font: string, character: string): boolean =>
  faces.covers.get(font as Parameters<typeof faces.covers.get>[0])?.has(character.codePointAt(0) ?? 0) ?? false

describe('runs of text', () => {
  it('keeps plain words in one run', () => {
    expect(splitRuns('188 of 233 ps', 'figures', faces)).toEqual([{ text: '188 of 233 ps', font: 'figures' }])
  })

  it('takes Greek and signs from the face that has them', () => {
    expect(splitRuns('σ ≤ 2 mV', 'words', faces)).toEqual([
      { text: 'σ', font: 'signs' }, { text: ' ', font: 'words' }, { text: '≤', font: 'signs' }, { text: ' 2 mV', font: 'words' },
    ])
  })

  it('takes further Latin letters from the second half of a family', () => {
    expect(splitRuns('Dvořák', 'words', faces).map((run) => run.font)).toEqual(['words', 'words-more', 'words'])
  })

  it('writes the ohm sign as the Greek letter it stands for', () => {
    expect(splitRuns('25 \u2126', 'figures', faces).at(-1)).toEqual({ text: 'Ω', font: 'signs' })
  })

  it('shows what no face has as the replacement character', () => {
    expect(splitRuns('a漢b', 'words', faces).map((run) => run.text).join('')).toBe('a\ufffdb')
    expect(splitRuns('🎛', 'words', faces)).toEqual([{ text: '\ufffd', font: 'signs' }])
  })

  it('never gives a font a character that it does not have', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), fc.constantFrom('words', 'figures'), fc.constantFrom('text', 'picture'), (text, voice, use) =>
      splitRuns(text, voice, faces, use).every((run) => [...run.text].every((character) => character === '\n' || covered(run.font, character)))))
  })

  it('loses and adds nothing that can be shown', () => {
    fc.assert(fc.property(fc.stringMatching(/^[ -~µ×÷ŁřΔσΩ≤]*$/), (text) => splitRuns(text, 'words', faces).map((run) => run.text).join('') === text.normalize('NFC')))
  })

  it('lets words break that no line could hold, and no others', () => {
    expect(softened('short words stay')).toBe('short words stay')
    expect(softened('x'.repeat(200)).split('\u200b').every((part) => part.length <= 36)).toBe(true)
  })
})

describe('typeset', () => {
  it('keeps the style of a text within a text', () => {
    expect(typeset({ text: ['one ', { text: 'τ two', color: '#A8562A', bold: true }] }, faces)).toEqual({
      text: [{ text: 'one ', font: 'words' }, { text: 'τ', color: '#A8562A', bold: true, font: 'signs' }, { text: ' two', color: '#A8562A', bold: true, font: 'words' }],
    })
  })

  it('reaches into tables, columns and stacks', () => {
    const set = typeset({ table: { body: [[{ stack: [{ columns: ['Ω'] }] }]] } }, faces)
    expect(JSON.stringify(set)).toContain('{"text":"Ω","font":"signs"}')
  })

  it('gives the texts of a picture real fonts', () => {
    const set = typeset({ svg: '<svg><text data-voice="figures" font-size="7" x="1">1.84 µm</text></svg>' }, faces) as { svg: string }
    expect(set.svg).toContain('font-family="signs"')
    expect(set.svg).not.toContain('data-voice')
  })
})
