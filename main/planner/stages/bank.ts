import type { ComparatorEntry } from '../../contract/result'
import type { ErrorBudget } from './budget'
import type { LatchDesign } from './design'
import type { Demand, Position } from './positions'
import type { Evaluated } from './reached'
import type { Situation } from './situation'

/** Everything known of the bank once the latch is sized and evaluated; what ledger, findings and workings read. */
export interface Bank {
  readonly s: Situation
  readonly budget: ErrorBudget
  readonly positions: readonly Position[]
  readonly demands: readonly Demand[]
  readonly design: LatchDesign
  readonly trimConverged: boolean
  readonly evaluated: readonly Evaluated[]
  readonly entries: readonly ComparatorEntry[]
}
