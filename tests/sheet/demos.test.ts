import { describe, expect, it } from 'vitest'
import { ledgerItems } from '../../main/contract/choices'
import type { Result } from '../../main/contract/result'
import { formatSi } from '../../main/contract/units'
import { demos } from '../../main/documents/demos'
import { validatePlan } from '../../main/documents/read-plan'
import { plan } from '../../main/planner/plan'
import { makeSheet } from '../../main/sheet/make-sheet'
import { margins } from '../../main/sheet/theme'
import { linesOf, outside, readPdf, textOf } from './read-pdf'

function planned(document: unknown): Result {
  const read = validatePlan(document)
  if (!read.ok) throw new Error(read.error.message)
  return plan(read.value.plan, read.value.card)
}

/** Text without its line breaks, so that a sentence is found wherever its lines end. */
const flat = (text: string): string => text.replace(/[\s\u00a0\u200b]+/g, '')

describe.each(demos.map(({ id, document }) => [id, document] as const))('the sheet of %s', (_id, document) => {
  const result = planned(document)

  it.each(['A4', 'LETTER'] as const)('says on %s what the planner said', async (paper) => {
    const pdf = readPdf(await makeSheet(result, { paper, date: new Date(0), version: '0.1.0', checksum: 'c0ffee' }))
    expect(pdf.pages.flatMap((page) => page.texts).filter(({ missing }) => missing > 0)).toEqual([])
    expect(pdf.pages.flatMap((page) => outside(page, margins[0], margins[2]))).toEqual([])

    const text = textOf(pdf)
    const { power, area, power_w, area_m2 } = result.ledger
    expect(pdf.pages.flatMap(linesOf).filter((line) => line.startsWith('Total ') && !line.includes(','))).toEqual(
      expect.arrayContaining([`Total ${formatSi(power_w, 'W')}`, `Total ${formatSi(area_m2, 'm²')}`]))
    for (const { item, model } of [...power, ...area]) {
      expect(text).toContain(ledgerItems[item])
      expect(flat(text)).toContain(flat(model))
    }
    for (const { title, formula, numbers, source } of result.workings) {
      for (const part of [title, formula, numbers, source]) expect(flat(text)).toContain(flat(part.normalize('NFC')))
    }
    for (const { message } of result.findings) expect(flat(text)).toContain(flat(message))
    for (const { name } of result.corners) expect(text).toContain(name)
    for (const value of [result.predicted.enob_bits, result.quantities.lsb_v]) expect(text).toContain(formatSi(value, value === result.quantities.lsb_v ? 'V' : 'bit'))
  })
})
