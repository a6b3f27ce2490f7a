import type { Circuit } from '../../latch/circuit'
import { cycleEnergy, evaluateFully } from '../../latch/cycle'
import { layoutArea } from '../../models/ledger/area'
import { drawnDevices, type LatchDesign } from '../design'
import type { LatchFigures } from '../latch-figures'
import type { Situation } from '../situation'

/**
 * Closed form of a cycle's energy while searching [J]: clocked gates, one output through the whole supply and the
 * other half way, both inner nodes, the tail to where the input pair lets it. Brought to the integrated value by a factor taken from a neighbour.
 */
export function roughEnergy(circuit: Circuit): number {
  const { supply, sideCapacitance, sharedCapacitance, sharedStart } = circuit
  const swings = 1.5 * sideCapacitance[circuit.output] + 2 * sideCapacitance[circuit.inner]
  return supply * (supply * (circuit.clockGates + swings) + sharedCapacitance[0] * sharedStart[0])
}

/** Energy of a decision and its reset by the full transient at an overdrive of Δ/2 [J]. */
export function integratedEnergy(s: Situation, { circuit, analysis }: LatchFigures): number {
  const { state } = evaluateFully(circuit, s.lsb / 2, analysis.tau)
  return cycleEnergy(circuit, state, analysis.tau).energy
}

/** Layout area of one comparator without its trim [m²]. */
export const comparatorArea = (s: Situation, design: LatchDesign): number =>
  layoutArea(drawnDevices(s, design), s.card.layout.factor, s.card.layout.diffusion_pitch_m)

/** Trim area of one comparator [m²]: its units as capacitors, and a latch of four gates per bit that stores the setting. */
export const trimArea = (s: Situation, { trim }: LatchDesign): number =>
  trim === null ? 0 : (2 ** trim.bits * trim.unit) / s.card.cap.dac_f_m2 + 4 * trim.bits * s.card.logic.gate_area_m2
