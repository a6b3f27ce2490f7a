import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import { resultSchemaId, type Result } from '../contract/result'
import { bankOf, shortfallOf } from './bank-of'
import type { Bank } from './stages/bank'
import { cornerEntries, designEntry } from './stages/corners'
import { findingsOf } from './stages/findings'
import { ledgers } from './stages/ledger'
import { budgetLines, predictedOf } from './stages/predicted'
import { withRemedies } from './stages/remedies'
import { rounded } from './stages/rounded'
import { workingsOf } from './stages/workings/all'

export interface PlanOptions {
  /** Index of the comparator whose workings are wanted; left out: the tightest. */
  readonly workingsFor?: number
  /** Whether an infeasible plan is answered with verified remedies, which takes several plans; default true. */
  readonly remedies?: boolean
}

/** The plan without looking for remedies. */
export function planOnce(document: Plan, card: Card, options: PlanOptions): Result {
  const remembered = bankOf(document, card)
  const s = { ...remembered.s, plan: document }
  const bank: Bank = { ...remembered, s }
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
  const result = planOnce(document, card, options)
  if (options.remedies === false) return result
  return withRemedies(result, {
    shortfall: (changed) => shortfallOf(changed, card),
    replan: (changed) => planOnce(changed, card, {}),
    supply: card.vdd_v,
    effort: bankOf(document, card).evaluated.length,
  })
}
