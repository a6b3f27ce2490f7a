import type { BudgetLine, Result } from '../../contract/result'
import type { Condition } from '../latch/condition'
import { effectiveBits, sndr } from '../models/budget/error-power'
import { schreierFigure, waldenFigure } from '../models/merit/figures'
import type { Bank } from './bank'
import { attainedAt } from './reached'
import { offsetOnlyShifts } from './situation'

/** Mean over the positions of a squared reached quantity at one condition [V²]; null where there is no latch. */
function meanSquare(bank: Bank, condition: Condition, read: 'noise' | 'residual'): number | null {
  const known = new Map<string, number | null>()
  let sum = 0
  for (const { commonMode, limits } of bank.positions) {
    const name = `${commonMode}/${limits.overdrive_v}`
    if (!known.has(name)) {
      const point = bank.evaluated.find((e) => e.condition === condition && e.commonMode === commonMode)!
      known.set(name, attainedAt(bank.s, bank.design, point, limits.overdrive_v)?.[read] ?? null)
    }
    const value = known.get(name)!
    if (value === null) return null
    sum += value ** 2
  }
  return sum / bank.positions.length
}

/** The budget with what is used of it at one condition; fixed items use what they are allowed. */
export function budgetLines(bank: Bank, condition: Condition): BudgetLine[] {
  const { budget, s } = bank
  const spreadCosts = !offsetOnlyShifts(s)
  return [
    { item: 'quantisation', allowed_v2: budget.quantisation, used_v2: budget.quantisation },
    { item: 'jitter', allowed_v2: budget.jitter, used_v2: budget.jitter },
    { item: 'sampling_noise', allowed_v2: budget.sampling, used_v2: budget.sampling },
    { item: 'reference', allowed_v2: budget.reference, used_v2: budget.reference },
    { item: 'threshold_spread', allowed_v2: budget.spreadPower, used_v2: spreadCosts ? meanSquare(bank, condition, 'residual') : 0 },
    { item: 'comparator_noise', allowed_v2: budget.noisePower, used_v2: meanSquare(bank, condition, 'noise') },
  ]
}

/** ENOB, SNDR and both figures of merit of the finished plan. */
export function predictedOf(bank: Bank, lines: readonly BudgetLine[], power: number | null): Result['predicted'] {
  const { fullScale, plan } = bank.s
  if (lines.some((line) => line.used_v2 === null)) return { enob_bits: null, sndr_db: null, walden_j: null, schreier_db: null }
  const total = lines.reduce((sum, line) => sum + line.used_v2!, 0)
  const enob = effectiveBits(fullScale, total)
  const decibel = sndr(fullScale, total)
  const rate = plan.converter.sample_rate_hz
  const usable = power !== null && power > 0
  return {
    enob_bits: enob, sndr_db: decibel,
    walden_j: usable ? waldenFigure(power, enob, rate) : null,
    schreier_db: usable ? schreierFigure(decibel, rate, power) : null,
  }
}
