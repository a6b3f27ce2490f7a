import type { Card } from '../../../contract/cards'

/**
 * Gate capacitance per metre of width: c_g = c_ox·L + 2c_f [F/m].
 * @param length channel length L [m]
 */
export const gatePerWidth = (card: Card, length: number): number => card.cap.cox_f_m2 * length + 2 * card.cap.fringe_f_m

/** Drain or source capacitance per metre of width: c_d = c_j + c_f [F/m]. */
export const drainPerWidth = (card: Card): number => card.cap.junction_f_m + card.cap.fringe_f_m

/** Gate–drain part per metre of width [F/m], counted once more on the drain of a cross-coupled device (Miller). */
export const overlapPerWidth = (card: Card): number => card.cap.fringe_f_m
