import { describe, expect, it } from 'vitest'
import { bankOf } from '../../../main/planner/bank-of'
import { transientDelay } from '../../../main/planner/latch/transient'
import { circuitOf } from '../../../main/planner/stages/latch-figures'
import { attainedAt } from '../../../main/planner/stages/reached'
import { changed, mast, plainWidths, read, sounder } from '../plans'

/** Below this the rounding of the full circuit decides, not its input [V]. */
const readable = 5e-6

const documents: Readonly<Record<string, unknown>> = {
  'first demo': sounder,
  'first demo, two capture latches': changed(sounder, { 'converter.flash.capture_latches': 2, corners: ['slow'] }),
  'second demo': mast,
  'second demo, all corners': changed(mast, { corners: ['all'] }),
  'given widths, all corners': changed(sounder, { 'comparator.sizing': 'manual', 'comparator.widths': plainWidths, 'converter.flash.capture_latches': 3 }),
}

/**
 * The formula of the delay belongs to the linear region. Beyond it the full circuit counts, and a formula that calls a
 * latch faster than it is must not decide: at cold slow corners growth is fast at first and slow at the equilibrium, so
 * the formula falls short by any amount, below zero too.
 */
describe('the delay that is reached is that of the full circuit at the overdrive asked for', () => {
  it.each(Object.keys(documents))('%s', (name) => {
    const { plan, card } = read(documents[name])
    const bank = bankOf(plan, card)
    for (const point of bank.evaluated) {
      const overdrive = bank.positions.find((p) => p.commonMode === point.commonMode)!.limits.overdrive_v!
      expect(overdrive).toBeGreaterThan(readable)
      const { delay } = attainedAt(bank.s, bank.design, point, overdrive)!
      const full = transientDelay(circuitOf(bank.s, bank.design, point.condition, point.commonMode), overdrive, 1e-6)!
      const what = `${point.condition.name}, ${overdrive} V: reached ${delay}, full circuit ${full}`
      expect(delay / full, what).toBeGreaterThan(0.98)
      expect(delay / full, what).toBeLessThan(1.15)
    }
  })
})
