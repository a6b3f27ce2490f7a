import type { CardDevice } from '../../contract/cards'
import { analyseLatch, type LatchAnalysis } from '../latch/analysis'
import type { LatchFailure } from '../latch/balanced'
import type { Circuit, CircuitDevice, PairName } from '../latch/circuit'
import type { Condition } from '../latch/condition'
import { decidedState, leftoverAtInput, type Leftover } from '../latch/cycle'
import { topologies } from '../latch/topologies'
import type { FullState } from '../latch/transient'
import { pairSpread } from '../models/offset/mismatch'
import { trimCapacitanceOf, type LatchDesign } from './design'
import type { Situation } from './situation'

export type PartName = 'input' | 'cross_n' | 'cross_p' | 'reset'

/** Threshold and gain spread of one pair, and what they do at the input. */
export interface PairSpread {
  readonly pair: PairName
  readonly thresholdSigma: number
  readonly gainSigma: number
  readonly thresholdWeight: number
  readonly gainWeight: number
}

/** Engine figures of one design at one condition and common mode, all at the latch's own input. */
export interface LatchFigures {
  readonly circuit: Circuit
  readonly analysis: LatchAnalysis
  readonly spreads: readonly PairSpread[]
  /** Raw offset, one standard deviation [V]. */
  readonly offset: number
  readonly parts: Readonly<Record<PartName, number>>
  /** What the last decision leaves after reset. */
  readonly leftover: Leftover
}

/** The circuit of a design in the topology of the plan. */
export function circuitOf(s: Situation, design: LatchDesign, condition: Condition, commonMode: number): Circuit {
  const { load_f, clock_rise_s } = s.plan.comparator
  return topologies[s.plan.comparator.topology].circuit({
    card: s.card, condition, widths: design.widths, commonMode, load: load_f, clockRise: clock_rise_s, trimCapacitance: trimCapacitanceOf(design),
  })
}

function spreadOf(analysis: LatchAnalysis, { pair, polarity, device }: CircuitDevice, n: CardDevice, p: CardDevice): PairSpread[] {
  if (pair === null) return []
  const kind = polarity === 'n' ? n : p
  return [{
    pair,
    thresholdSigma: pairSpread(kind.avt_v_m, device.width, device.length),
    gainSigma: pairSpread(kind.abeta_m, device.width, device.length),
    thresholdWeight: analysis.thresholdWeight[pair]!,
    gainWeight: analysis.gainWeight[pair]!,
  }]
}

const partOf = (pair: PairName): PartName => (pair === 'reset_x' || pair === 'reset_o' ? 'reset' : pair === 'second_input' ? 'cross_n' : pair)

function offsetParts(spreads: readonly PairSpread[]): Record<PartName, number> {
  const power = { input: 0, cross_n: 0, cross_p: 0, reset: 0 }
  for (const spread of spreads) {
    power[partOf(spread.pair)] += (spread.thresholdWeight * spread.thresholdSigma) ** 2 + (spread.gainWeight * spread.gainSigma) ** 2
  }
  return { input: Math.sqrt(power.input), cross_n: Math.sqrt(power.cross_n), cross_p: Math.sqrt(power.cross_p), reset: Math.sqrt(power.reset) }
}

export interface FigureOptions {
  /** State in which the reset finds the latch; left out: the ideal decided state. */
  readonly decided?: FullState
  /** Large-signal part of t_0 in units of τ, where it is known well enough from a neighbour; left out: computed. */
  readonly departure?: number
}

/** Longest evaluation that is waited for: far beyond the window, and never shorter than a slow latch of the card needs. */
export function patienceOf(s: Situation, window: number): number {
  return Math.max(100 * window, 500 * s.card.logic.fo4_s, 20 * s.plan.comparator.clock_rise_s)
}

/** One pass of the engine and what follows from it; a failure says why there is no latch to speak of. */
export function latchFigures(
  s: Situation, design: LatchDesign, condition: Condition, commonMode: number, giveUpAfter: number, options: FigureOptions = {},
): LatchFigures | LatchFailure {
  const circuit = circuitOf(s, design, condition, commonMode)
  const analysis = analyseLatch(circuit, giveUpAfter, options.departure)
  if (typeof analysis === 'string') return analysis
  const spreads = circuit.devices.flatMap((device) => spreadOf(analysis, device, s.card.n, s.card.p))
  const parts = offsetParts(spreads)
  return {
    circuit, analysis, spreads, parts,
    offset: Math.hypot(parts.input, parts.cross_n, parts.cross_p, parts.reset),
    leftover: leftoverAtInput(circuit, options.decided ?? decidedState(circuit), s.kind.resetTime, analysis.startWeight),
  }
}
