import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import { remembering } from './numerics/memo'
import type { Bank } from './stages/bank'
import { errorBudget } from './stages/budget'
import { briefFindings } from './stages/findings'
import { flashPositions } from './stages/limits-flash'
import { sarPositions } from './stages/limits-sar'
import { demandsOf } from './stages/positions'
import { comparatorEntries, evaluateDesign } from './stages/reached'
import { unmendable } from './stages/shortfall'
import { situationOf } from './stages/situation'
import { manualLatch, sizeFeasible, sizeLatch } from './stages/sizing/size'

const banksKept = 6

/** What the bank depends on: everything but the words of a plan and its overrides. */
const keyOf = ({ converter, comparator, budget, corners }: Plan, card: Card): string => JSON.stringify([converter, comparator, budget, corners, card])

function askedOf(document: Plan, card: Card) {
  const s = situationOf(document, card)
  const budget = errorBudget(s)
  const positions = s.kind.architecture === 'flash' ? flashPositions(s, s.kind, budget) : sarPositions(s, s.kind, budget)
  return { s, budget, positions, demands: demandsOf(positions) }
}

/**
 * How far a plan is from being feasible, without looking for the nearest design: 0 where one is found that meets everything,
 * else the worst use the search was left with, and much more for every stop that no latch can mend.
 */
export function shortfallOf(document: Plan, card: Card): number {
  const asked = askedOf(document, card)
  const stops = briefFindings(asked).length
  if (stops > 0) return stops * unmendable
  return document.comparator.sizing === 'manual' ? 0 : Math.min(sizeFeasible(asked.s, asked.demands).miss, unmendable - 1)
}

/**
 * Brief, budget, limits, sizing and evaluation: the bank before it is summed up. The last few are remembered, so that the
 * workings or waves of another comparator do not size the latch again; same plan, same bank.
 */
export const bankOf = remembering((document: Plan, card: Card): Bank => {
  const { s, budget, positions, demands } = askedOf(document, card)
  const { design, trimConverged } = document.comparator.sizing === 'manual' ? manualLatch(s, demands) : sizeLatch(s, demands)
  const evaluated = evaluateDesign(s, design, demands)
  return { s, budget, positions, demands, design, trimConverged, evaluated, entries: comparatorEntries(s, design, positions, evaluated) }
}, keyOf, banksKept)
