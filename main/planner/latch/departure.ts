import type { Trajectory } from './balanced'
import type { Circuit } from './circuit'
import { decisionWatch, runPhase } from './transient'

/** Difference at which the linear growth is handed over to the full circuit, as a fraction of the supply: odd symmetry makes the error its square. */
const handOver = 4e-3
/** Longest wait, in time constants; linear growth from `handOver` to half the supply takes ln(125) ≈ 4.8. */
const patience = 60

/**
 * What the last stretch to V_DD/2 takes longer than linear growth [s]:
 *
 * δ = t(ε → V_DD/2) − τ·ln(V_DD/2ε)
 *
 * with the full nonlinear circuit leaving its balanced equilibrium along the dominant mode, ε small. It is the same for
 * every overdrive small enough to be decided from the equilibrium, and belongs to t_0.
 */
export function largeSignalDelay(circuit: Circuit, { equilibrium, resting }: Trajectory): number {
  const tau = 1 / equilibrium.growth
  const sides = circuit.sideNodes.length
  const epsilon = handOver * circuit.supply
  const nodes = new Float64Array(2 * sides + circuit.sharedNodes.length)
  for (let i = 0; i < sides; i++) {
    nodes[i] = resting[i] - (epsilon / 2) * equilibrium.right[i]
    nodes[sides + i] = resting[i] + (epsilon / 2) * equilibrium.right[i]
  }
  nodes.set(resting.subarray(sides), 2 * sides)
  const decision = decisionWatch(circuit)
  const watch = (step: Parameters<typeof decision.watch>[0]) => { decision.watch(step); return decision.time() !== null }
  runPhase(circuit, { nodes, charge: 0 }, { edge: 'high', overdrive: 0, until: patience * tau, slopeFloor: 0, watch })
  const time = decision.time() ?? patience * tau
  return time - tau * Math.log(circuit.supply / (2 * epsilon))
}
