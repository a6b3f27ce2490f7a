import type { Circuit } from './circuit'
import { slopesOf } from './circuit'
import type { Event } from './dormandPrince'
import { integrate } from './dormandPrince'

/** No falling edge. */
export const never = Number.MAX_VALUE

export interface Drive {
  overdrive_v: number
  /** time of the 50 % crossing of the falling edge [s] */
  fall_s: number
}

/** Integrates over the corners of the clock, which are no smooth points, until an end or an event. */
export const run = (circuit: Circuit, state: Float64Array, from: number, to: number, how: Drive, event?: Event): { time: number; hit: boolean } => {
  const half = circuit.setting.clock_rise_s / 2
  const corners = [-half, half, how.fall_s - half, how.fall_s + half].filter((corner) => corner > from && corner < to)
  const slopes = slopesOf(circuit, how.overdrive_v, how.fall_s)
  let time = from
  for (const corner of [...corners, to]) {
    const reached = integrate(slopes, state, time, corner, event)
    if (reached.hit) return reached
    time = reached.time
  }
  return { time, hit: false }
}

/** Signed output difference, positive side minus negative side [V]. */
export const outputDifference = (circuit: Circuit, state: Float64Array): number => {
  const [positive, negative] = circuit.netlist.output
  return state[positive] - state[negative]
}

/** Time at which |difference of the outputs| first reaches a level, from the start of the ramp; throws when it never does. */
export const timeOfLevel = (circuit: Circuit, overdrive_v: number, level_v: number): number => {
  const rise = circuit.setting.clock_rise_s
  const event = (state: Float64Array) => Math.abs(outputDifference(circuit, state)) - level_v
  const reached = run(circuit, circuit.start.slice(), -rise / 2, 4000 * rise, { overdrive_v, fall_s: never }, event)
  if (!reached.hit) throw new RangeError('the outputs never differ by the level asked for')
  return reached.time
}

/** Signed output difference at a time, from the start of the ramp [V]. */
export const outputAt = (circuit: Circuit, overdrive_v: number, time_s: number): number => {
  const state = circuit.start.slice()
  run(circuit, state, -circuit.setting.clock_rise_s / 2, time_s, { overdrive_v, fall_s: never })
  return outputDifference(circuit, state)
}
