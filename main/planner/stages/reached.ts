import type { LimitName } from '../../contract/choices'
import type { ComparatorEntry, Limits, Reached, Use } from '../../contract/result'
import type { LatchFailure } from '../latch/balanced'
import type { Condition } from '../latch/condition'
import { cycleEnergy, evaluateFully } from '../latch/cycle'
import { circuitOf, latchFigures, patienceOf, type LatchFigures } from './latch-figures'
import { conversionDelayByCycle, type CycleLatch } from '../models/timing/self-timed'
import { designInputCap, type LatchDesign } from './design'
import { cycleCommonMode, searchShape } from './limits-sar'
import type { Demand, Position } from './positions'
import type { Situation } from './situation'
import { comparatorArea } from './sizing/cost'
import { attained, attenuationOf, limitKeys, pairsOf, useOf, type Attained } from './uses'

/** The finished design at one condition and common mode: figures, energy, supply charge; or why there are none. */
export interface Evaluated {
  readonly condition: Condition
  readonly commonMode: number
  readonly figures: LatchFigures | null
  readonly failure: LatchFailure | null
  readonly energy: number | null
  readonly charge: number | null
  /** Delay of all decisions of a self-timed search whose common mode falls from cycle to cycle [s]. */
  readonly conversion?: number
}

const longestWindow = (demand: Demand): number => Math.max(demand.limits.window_s, 0)

function evaluateAt(s: Situation, design: LatchDesign, condition: Condition, demand: Demand): Evaluated {
  const patience = 30 * patienceOf(s, longestWindow(demand))
  const { commonMode } = demand
  const first = latchFigures(s, design, condition, commonMode, patience)
  if (typeof first === 'string') return { condition, commonMode, figures: null, failure: first, energy: null, charge: null }
  const circuit = circuitOf(s, design, condition, commonMode)
  const { state } = evaluateFully(circuit, s.lsb / 2, first.analysis.tau)
  const { energy, charge } = cycleEnergy(circuit, state, first.analysis.tau)
  const figures = latchFigures(s, design, condition, commonMode, patience, { decided: state, departure: first.analysis.departure })
  return { condition, commonMode, figures: figures as LatchFigures, failure: null, energy, charge }
}

/** Every condition at every common mode of the bank. */
export const evaluateDesign = (s: Situation, design: LatchDesign, demands: readonly Demand[]): Evaluated[] =>
  s.conditions.flatMap((condition) => {
    const points = demands.map((demand) => evaluateAt(s, design, condition, demand))
    const conversion = fallingConversion(s, design, points)
    return conversion === undefined ? points : points.map((point) => ({ ...point, conversion }))
  })

/** All decisions of a self-timed search with the latch as it is in each cycle; undefined where one figure serves all cycles. */
function fallingConversion(s: Situation, design: LatchDesign, points: readonly Evaluated[]): number | undefined {
  const { kind } = s
  if (kind.architecture !== 'sar' || kind.sar.timing !== 'self_timed' || points.length < 2) return undefined
  const latches = kind.cycles.map(({ cycle }) => points.find((p) => p.commonMode === cycleCommonMode(s, kind, cycle))?.figures?.analysis ?? null)
  if (latches.some((latch) => latch === null)) return undefined
  const swing = points[0].condition.supply / attenuationOf(s, designInputCap(s, design))
  return conversionDelayByCycle(searchShape(s, kind), latches as CycleLatch[], swing, s.plan.converter.error_rate)
}

/** What is reached for an overdrive at one evaluated point; null where there is no latch. */
export const attainedAt = (
  s: Situation, design: LatchDesign, { condition, figures, conversion }: Evaluated, overdrive: number | null,
): Attained | null => (figures === null ? null : attained(s, design, condition, figures, overdrive, conversion))

const worst = (values: readonly (number | null)[]): number | null =>
  values.some((value) => value === null) ? null : Math.max(...(values as number[]))

/** Worst over the conditions, quantity by quantity. */
function reachedOf(s: Situation, design: LatchDesign, points: readonly Evaluated[], limits: Limits): Reached {
  const all = points.map((point) => attainedAt(s, design, point, limits.overdrive_v))
  const pick = (read: (a: Attained) => number | null): number | null => worst(all.map((a) => (a === null ? null : read(a))))
  const engine = (read: (f: LatchFigures) => number): number | null => worst(points.map((p) => (p.figures === null ? null : read(p.figures))))
  return {
    delay_s: pick((a) => a.delay),
    tau_s: engine((f) => f.analysis.tau),
    integration_s: engine((f) => f.analysis.integration),
    noise_v: pick((a) => a.noise),
    offset_v: pick((a) => a.offset),
    residual_v: pick((a) => a.residual),
    trim_step_v: design.trim === null ? null : pick((a) => a.trimStep),
    kickback_v: pick((a) => a.kickback),
    memory_v: pick((a) => a.memory),
    input_cap_f: pick((a) => a.inputCap),
    aperture_s: engine((f) => f.analysis.arrival10 - f.analysis.arrival90),
    energy_j: worst(points.map((p) => p.energy)),
    area_m2: comparatorArea(s, design),
  }
}

function attainedFrom(r: Reached): Attained | null {
  if (r.delay_s === null) return null
  return {
    delay: r.delay_s, noise: r.noise_v!, offset: r.offset_v!, residual: r.residual_v!, trimStep: r.trim_step_v,
    kickback: r.kickback_v!, memory: r.memory_v!, inputCap: r.input_cap_f!,
  }
}

/** reached ÷ limit of each of the six; all null where the latch could not be evaluated. */
export function usesOf(limits: Limits, reached: Reached): Use {
  const values = attainedFrom(reached)
  const uses = values === null ? limitKeys.map(() => null) : pairsOf(limits, values).map(useOf)
  return Object.fromEntries(limitKeys.map((key, i) => [key, uses[i]])) as unknown as Use
}

/** The limit that binds: one that nothing can meet, else the one of the largest use. */
export function tightestOf(use: Use): LimitName {
  const hopeless = limitKeys.find((key) => use[key] === null)
  return hopeless ?? limitKeys.reduce((a, b) => (use[b]! > use[a]! ? b : a))
}

/** The bank: every comparator with its limits, what is reached, and how much of each limit is used. */
export function comparatorEntries(
  s: Situation, design: LatchDesign, positions: readonly Position[], evaluated: readonly Evaluated[],
): ComparatorEntry[] {
  const known = new Map<string, Reached>()
  return positions.map((position, i) => {
    const { limits, lane, cycle, threshold, commonMode } = position
    const name = `${commonMode}/${limits.overdrive_v}`
    const reached = known.get(name) ?? reachedOf(s, design, evaluated.filter((e) => e.commonMode === commonMode), limits)
    known.set(name, reached)
    const use = usesOf(limits, reached)
    return { index: i + 1, lane, cycle, threshold_v: threshold, common_mode_v: commonMode, limits, reached, use, tightest: tightestOf(use) }
  })
}
