import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createDocuments, isDirty, currentStep } from '../../../app/state/document-store'
import { dropAt, putAt } from '../../../app/state/paths'
import { choices } from '../../../main/contract/choices'
import { quantities } from '../../../main/contract/quantities'
import { flashTrim } from '../fixtures/plans'

const paths = [...Object.keys(quantities), ...Object.keys(choices), 'title', 'notes']

describe('the document store', () => {
  it('comes back to the identical document after 50 steps undone, and to the last after 50 redone', () => {
    const edit = fc.record({ path: fc.constantFrom(...paths), value: fc.oneof(fc.double({ noNaN: true }), fc.string(), fc.constant(undefined)) })
    fc.assert(fc.property(fc.array(edit, { minLength: 50, maxLength: 50 }), (edits) => {
      const documents = createDocuments(flashTrim)
      for (const { path, value } of edits) {
        documents.edit(path, (draft) => (value === undefined ? dropAt(draft, path) : putAt(draft, path, value)))
      }
      const last = documents.get().document
      const steps = documents.get().past.length
      for (let step = 0; step < steps; step += 1) documents.undo()
      expect(documents.get().document).toEqual(flashTrim)
      expect(documents.get().past).toHaveLength(0)
      for (let step = 0; step < steps; step += 1) documents.redo()
      expect(documents.get().document).toEqual(last)
    }), { numRuns: 40 })
  })

  it('takes exactly one step for each change, by its name, and none for no change', () => {
    const documents = createDocuments(flashTrim)
    documents.edit('resolution 7 bit', (draft) => putAt(draft, 'converter.resolution_bits', 7))
    documents.edit('resolution 7 bit', (draft) => putAt(draft, 'converter.resolution_bits', 7))
    expect(documents.get().past.map(({ label }) => label)).toEqual(['resolution 7 bit'])
  })

  it('joins steps of one group, but never into the step that was saved', () => {
    const documents = createDocuments(flashTrim)
    const step = (bits: number) => documents.edit(`resolution ${bits} bit`, (draft) => putAt(draft, 'converter.resolution_bits', bits), 'arrows')
    step(7)
    step(8)
    expect(documents.get().past.map(({ label }) => label)).toEqual(['resolution 8 bit'])
    documents.markSaved(currentStep(documents.get()), { name: 'a', path: null }, '12:00')
    step(9)
    expect(documents.get().past).toHaveLength(2)
    expect(isDirty(documents.get())).toBe(true)
    documents.undo()
    expect(isDirty(documents.get())).toBe(false)
    documents.undo()
    expect(documents.get().document).toEqual(flashTrim)
  })

  it('counts a revision for every change, undo and redo', () => {
    const documents = createDocuments(flashTrim)
    const first = documents.get().revision
    documents.edit('title', (draft) => putAt(draft, 'title', 'x'))
    documents.undo()
    documents.redo()
    expect(documents.get().revision).toBe(first + 3)
  })

  it('forgets what could be redone once something else is done', () => {
    const documents = createDocuments(flashTrim)
    documents.edit('a', (draft) => putAt(draft, 'title', 'a'))
    documents.undo()
    documents.edit('b', (draft) => putAt(draft, 'title', 'b'))
    documents.redo()
    expect(documents.get().document.title).toBe('b')
  })
})
