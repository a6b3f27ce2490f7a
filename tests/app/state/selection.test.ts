import { describe, expect, it } from 'vitest'
import type { ComparatorEntry } from '../../../main/contract/result'
import { cannotBeMet, drawnUse, missesLimit, tightestEntry } from '../../../app/state/selection'
import { tightestText } from '../../../app/rooms/bank/describe'
import { cornerShown } from '../../../app/text/labels'
import { fakeResult } from '../fixtures/fake-result'
import { flashTrim } from '../fixtures/plans'

const result = fakeResult(flashTrim)
const [first] = result.comparators
const noWindow: ComparatorEntry = { ...first, limits: { ...first.limits, window_s: -1e-11 }, use: { ...first.use, time: null }, tightest: 'time' }
const unknown: ComparatorEntry = { ...first, use: { ...first.use, noise: null } }

describe('a limit that nothing can meet', () => {
  it('is told from a use that is not known', () => {
    expect(cannotBeMet(noWindow, 'time')).toBe(true)
    expect(cannotBeMet(unknown, 'noise')).toBe(false)
    expect(cannotBeMet(first, 'time')).toBe(false)
  })

  it('is drawn as the worst of all', () => {
    expect(drawnUse(noWindow, 'time')).toBe(Infinity)
    expect(drawnUse(unknown, 'noise')).toBeNull()
    expect(drawnUse(first, 'noise')).toBe(first.use.noise)
    expect(missesLimit(noWindow)).toBe(true)
    expect(tightestEntry({ ...result, comparators: [first, noWindow] })).toBe(noWindow)
  })

  it('is said in words', () => {
    expect(tightestText(noWindow)).toBe('no window to decide in')
  })
})

describe('the corner of the shown power', () => {
  it('is named, and said to be the one of the largest power where there are others', () => {
    const corners = result.corners.map((corner, at) => ({ ...corner, power_w: at === 0 ? result.ledger.power_w : 0 }))
    expect(cornerShown({ ...result, corners })).toMatch(new RegExp(`^at ${corners[0].name}`))
    expect(cornerShown({ ...result, corners: [...corners, { ...corners[0], name: 'other', power_w: 0 }] })).toContain('the corner of the largest power')
    expect(cornerShown({ ...result, corners: corners.slice(0, 1) })).toBe(`at ${corners[0].name}`)
  })
})
