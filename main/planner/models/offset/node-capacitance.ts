/**
 * Dynamic offset of unequal node capacitances in a latch whose nodes fall by V_T before it regenerates: (V_T/2)(r − 1/r) [V].
 * Charge balance of the two nodes; common practice.
 *
 * @param threshold V_T, what the nodes fall by [V];  @param ratio r, capacitance of one node over that of the other
 */
export const capacitanceOffset = (threshold: number, ratio: number): number => (threshold / 2) * (ratio - 1 / ratio)
