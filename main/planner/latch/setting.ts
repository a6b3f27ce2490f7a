import type { Card } from '../../contract/cards'
import type { Widths } from '../../contract/plan'
import type { Condition } from './condition'

/** Everything a topology needs to draw its circuit. */
export interface LatchSetting {
  readonly card: Card
  readonly condition: Condition
  readonly widths: Widths
  readonly commonMode: number
  readonly load: number
  readonly clockRise: number
  /** Trim capacitance on each inner node at balance [F]. */
  readonly trimCapacitance: number
}
