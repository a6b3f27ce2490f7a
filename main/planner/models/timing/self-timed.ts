import { remembering } from '../../numerics/memo'
import { findRoot } from '../../numerics/roots'

/** Time constants and integration of the latch at each cycle [s]; equal ones for most schemes. */
export interface CycleLatch { readonly integration: number; readonly tau: number }

/** What the search of a converter looks like to its decisions: weights in Δ, Δ and full scale [V]. */
export interface SearchShape { readonly weights: readonly number[]; readonly lsb: number; readonly fullScale: number }

/**
 * Sum over all thresholds and both sides of exp(−Σ ln n_i / m), grouped by the number m of zero residues; residues n_i in
 * Δ/2, those that are zero left out. In logarithms; index m, −Infinity where none has m zeros.
 */
const tailSums = remembering((weights: readonly number[]): readonly number[] => {
  const codes = weights.length === 0 ? 0 : 2 * weights[0]
  const largest: number[] = []
  const sums: number[] = []
  eachThreshold(weights, codes, (logs, zeros) => {
    const term = -logs / zeros
    const top = largest[zeros] ?? -Infinity
    if (term > top) { sums[zeros] = (sums[zeros] ?? 0) * Math.exp(top - term) + 1; largest[zeros] = term }
    else sums[zeros] += Math.exp(term - top)
  })
  return Array.from({ length: sums.length }, (_, m) => (sums[m] === undefined ? -Infinity : largest[m] + Math.log(sums[m])))
}, (weights) => weights.join(), 8)

/** Follows the search for an input at every threshold, on both sides; residues in Δ/2 are whole numbers. */
function eachThreshold(weights: readonly number[], codes: number, visit: (logs: number, zeros: number, residues: Int32Array) => void): void {
  const logarithm = Float64Array.from({ length: codes + 1 }, (_, n) => (n === 0 ? 0 : Math.log(n)))
  const residues = new Int32Array(weights.length)
  for (let k = 1; k < codes; k++) {
    for (const side of [1, -1]) {
      let residue = 2 * k - codes
      let logs = 0
      let zeros = 0
      for (let i = 0; i < weights.length; i++) {
        residues[i] = residue
        if (residue === 0) zeros++
        logs += logarithm[Math.abs(residue)]
        residue -= (residue === 0 ? side : Math.sign(residue)) * weights[i]
      }
      visit(logs, zeros, residues)
    }
  }
}

/** ln Σ exp of a few terms. */
function logSum(terms: readonly number[]): number {
  const top = Math.max(...terms)
  return top === -Infinity ? top : top + Math.log(terms.reduce((sum, term) => sum + Math.exp(term - top), 0))
}

/**
 * ln P of a conversion that does not fit into a budget B, all decisions with the same latch:
 * P = (1/V_FS)·Σ_k Σ_sides exp((C_k − B)/(m_k τ)), C_k the sum of all delays, the m_k zero residues taken at 1 V.
 *
 * @param budget B [s]; @param swing V_DD/a, supply over the share of the signal that reaches the latch [V]
 */
export function logTail(shape: SearchShape, { integration, tau }: CycleLatch, swing: number, budget: number): number {
  const cycles = shape.weights.length
  const [perResidue, perZero] = [Math.log(swing / shape.lsb), Math.log(swing / 2)]
  const terms = tailSums(shape.weights).map((sum, m) => (sum === -Infinity ? sum
    : sum + ((cycles * integration - budget) / tau + (cycles - m) * perResidue + m * perZero) / m))
  return logSum(terms) - Math.log(shape.fullScale)
}

/** The budget B at which the tail is the allowed error rate [s], all decisions with the same latch. */
export function conversionDelay(shape: SearchShape, latch: CycleLatch, swing: number, errorRate: number): number {
  const cycles = shape.weights.length
  const unit = { integration: 0, tau: 1 }
  const excess = (budget: number) => logTail(shape, unit, swing, budget) - Math.log(errorRate)
  const reach = 50 * cycles + 800 * cycles
  return cycles * latch.integration + latch.tau * findRoot(excess, -reach, reach, { tolerance: 1e-10 })
}

/** τ at which the tail is the allowed error rate for a budget and integration time [s]; 0 without a positive solution. */
export function selfTimedTauLimit(shape: SearchShape, integration: number, swing: number, budget: number, errorRate: number): number {
  const growths = conversionDelay(shape, { integration: 0, tau: 1 }, swing, errorRate)
  const left = budget - shape.weights.length * integration
  return left > 0 && growths > 0 ? left / growths : 0
}

/**
 * The budget at which the tail is the allowed error rate when the latch differs from cycle to cycle (falling common mode):
 * each term's exponent is (C_k − B) over the sum of τ of its zero-residue cycles.
 */
export function conversionDelayByCycle(shape: SearchShape, latches: readonly CycleLatch[], swing: number, errorRate: number): number {
  const delays: number[] = []
  const spans: number[] = []
  const fixed = latches.reduce((sum, latch) => sum + latch.integration, 0)
  eachThreshold(shape.weights, 2 * shape.weights[0], (_, __, residues) => {
    let delay = fixed
    let span = 0
    for (let i = 0; i < residues.length; i++) {
      const { tau } = latches[i]
      if (residues[i] === 0) { span += tau; delay += tau * Math.log(swing / 2) }
      else delay += tau * Math.log(swing / (Math.abs(residues[i]) * shape.lsb))
    }
    delays.push(delay)
    spans.push(span)
  })
  const excess = (budget: number) => logSumOf(delays, spans, budget) - Math.log(shape.fullScale * errorRate)
  const slowest = Math.max(...latches.map((latch) => latch.tau))
  return findRoot(excess, fixed - 900 * slowest * latches.length, fixed + 900 * slowest * latches.length, { tolerance: 1e-9 * slowest })
}

function logSumOf(delays: readonly number[], spans: readonly number[], budget: number): number {
  let top = -Infinity
  for (let k = 0; k < delays.length; k++) top = Math.max(top, (delays[k] - budget) / spans[k])
  let sum = 0
  for (let k = 0; k < delays.length; k++) sum += Math.exp((delays[k] - budget) / spans[k] - top)
  return top + Math.log(sum)
}
