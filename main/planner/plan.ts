import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import { resultSchemaId, type Result } from '../contract/result'
import type { Bank } from './stages/bank'
import { errorBudget } from './stages/budget'
import { cornerEntries, designEntry } from './stages/corners'
import { findingsOf } from './stages/findings'
import { ledgers } from './stages/ledger'
import { flashPositions } from './stages/limits-flash'
import { sarPositions } from './stages/limits-sar'
import { demandsOf } from './stages/positions'
import { budgetLines, predictedOf } from './stages/predicted'
import { comparatorEntries, evaluateDesign } from './stages/reached'
import { withRemedies } from './stages/remedies'
import { rounded } from './stages/rounded'
import { situationOf } from './stages/situation'
import { manualLatch, sizeLatch } from './stages/sizing/size'
import { workingsOf } from './stages/workings/all'

export interface PlanOptions {
  /** Index of the comparator whose workings are wanted; left out: the tightest. */
  readonly workingsFor?: number
}

/** Brief, budget, limits, sizing and evaluation: the bank before it is summed up. */
export function bankOf(document: Plan, card: Card): Bank {
  const s = situationOf(document, card)
  const budget = errorBudget(s)
  const positions = s.kind.architecture === 'flash' ? flashPositions(s, s.kind, budget) : sarPositions(s, s.kind, budget)
  const demands = demandsOf(positions)
  const { design, trimConverged } = document.comparator.sizing === 'manual' ? manualLatch(s, demands) : sizeLatch(s, demands)
  const evaluated = evaluateDesign(s, design, demands)
  return { s, budget, positions, demands, design, trimConverged, evaluated, entries: comparatorEntries(s, design, positions, evaluated) }
}

/** The plan without looking for remedies. */
export function planOnce(document: Plan, card: Card, options: PlanOptions): Result {
  const bank = bankOf(document, card)
  const { s } = bank
  const { all, largest } = ledgers(bank)
  const budget = budgetLines(bank, largest.condition)
  const predicted = predictedOf(bank, budget, largest.ledger.power_w)
  return {
    schema: resultSchemaId,
    plan: document,
    quantities: {
      lsb_v: s.lsb, comparator_count: s.comparatorCount, decision_rate_hz: s.decisionRate, error_power_allowed_v2: bank.budget.allowed,
    },
    budget,
    comparators: rounded([...bank.entries]),
    design: designEntry(bank),
    ledger: largest.ledger,
    predicted,
    corners: cornerEntries(bank, all),
    findings: findingsOf(bank, largest.ledger),
    workings: workingsOf(bank, largest, budget, predicted, options.workingsFor),
  }
}

/**
 * The only door to the planner: a plan with every default written out becomes a result. Pure; the same plan gives the same result.
 *
 * @param document complete plan; @param card the card it names or carries
 * @returns a result without NaN or Infinity; what cannot be built is a `stop` finding
 */
export function plan(document: Plan, card: Card, options: PlanOptions = {}): Result {
  return withRemedies(planOnce(document, card, options), card)
}
