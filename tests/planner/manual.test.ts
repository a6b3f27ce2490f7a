import { describe, expect, it } from 'vitest'
import type { Result } from '../../main/contract/result'
import { changed, logger, mast, planned, sounder } from './plans'

/** The plan that a person gets by typing the printed widths and trim bits of a result. */
const typedIn = (document: unknown, { design }: Result): unknown => changed(document, {
  'comparator.sizing': 'manual', 'comparator.widths': { ...design.widths }, 'comparator.trim_bits': design.trim_bits,
})

const documents: [string, unknown][] = [['trimmed flash', sounder], ['flash of eight bits', mast], ['SAR', logger]]

describe.each(documents)('widths of an automatic result entered by hand: %s', (_, document) => {
  const automatic = planned(document)
  const manual = planned(typedIn(document, automatic))

  it('reach the same, entry by entry', () => {
    expect(manual.comparators).toEqual(automatic.comparators)
  })

  it('cost and predict the same', () => {
    expect(manual.ledger).toEqual(automatic.ledger)
    expect(manual.predicted).toEqual(automatic.predicted)
    expect(manual.corners).toEqual(automatic.corners)
    expect(manual.design).toEqual(automatic.design)
    expect(manual.findings).toEqual(automatic.findings)
  })

  it('need no more trim bits than the sizing found, when their number is left open', () => {
    const open = planned(changed(typedIn(document, automatic), { 'comparator.trim_bits': null }))
    expect(open.design.trim_bits).toBe(automatic.design.trim_bits)
    expect(open.comparators[0].use).toEqual(automatic.comparators[0].use)
  })
})
