/** Adaptive Dormand–Prince 5(4), J. Comput. Appl. Math. 6 (1980) 19–26; events are hit by repeating the last step with a shorter one. */

export type Slopes = (time: number, state: Float64Array, slopes: Float64Array) => void
export type Event = (state: Float64Array) => number

const nodes = [0, 1 / 5, 3 / 10, 4 / 5, 8 / 9, 1, 1]
const stages = [
  [],
  [1 / 5],
  [3 / 40, 9 / 40],
  [44 / 45, -56 / 15, 32 / 9],
  [19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729],
  [9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656],
  [35 / 384, 0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84],
]
const errorWeights = [71 / 57600, 0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525, -1 / 40]
const relative = 1e-8
const absolute = 1e-10
/** stands for an overflow: the step is repeated much shorter */
const hopeless = 1e9

interface Work {
  slopes: Slopes
  k: Float64Array[]
  trial: Float64Array
}

/** One step from state into work.trial; returns the error in units of the tolerance. Expects k[0] at (time, state). */
const attempt = (work: Work, time: number, step: number, state: Float64Array): number => {
  const { k, trial, slopes } = work
  const size = state.length
  for (let stage = 1; stage < 7; stage++) {
    const weights = stages[stage]
    for (let i = 0; i < size; i++) {
      let sum = 0
      for (let j = 0; j < stage; j++) sum += weights[j] * k[j][i]
      trial[i] = state[i] + step * sum
    }
    slopes(time + nodes[stage] * step, trial, k[stage])
  }
  let worst = 0
  for (let i = 0; i < size; i++) {
    let sum = 0
    for (let j = 0; j < 7; j++) sum += errorWeights[j] * k[j][i]
    const allowed = absolute + relative * Math.max(Math.abs(state[i]), Math.abs(trial[i]))
    worst = Math.max(worst, Math.abs(step * sum) / allowed)
  }
  return worst
}

/** Length of the step at which the event is zero, by the Illinois rule; leaves that state in work.trial. */
const stepToEvent = (work: Work, time: number, step: number, state: Float64Array, event: Event): number => {
  let [low, high, atLow, atHigh] = [0, step, event(state), event(work.trial)]
  let length = step
  for (let i = 0; i < 60; i++) {
    const before = length
    length = high - (atHigh * (high - low)) / (atHigh - atLow)
    attempt(work, time, length, state)
    const value = event(work.trial)
    if (value === 0 || Math.abs(length - before) <= 1e-12 * step) break
    if (value > 0 === atHigh > 0) {
      atLow /= 2
    } else {
      low = high
      atLow = atHigh
    }
    high = length
    atHigh = value
  }
  return length
}

/**
 * Integrates state in place from one time to another, or to the first zero of the event.
 *
 * @param slopes  right side, smooth within the interval
 * @param state   start, overwritten by the end
 * @param from    [s]
 * @param to      [s]
 * @param event   optional function of the state; a change of its sign stops
 * @returns       the time reached, and whether the event stopped it
 * @throws RangeError when no step is short enough
 */
export const integrate = (slopes: Slopes, state: Float64Array, from: number, to: number, event?: Event): { time: number; hit: boolean } => {
  const work: Work = { slopes, k: stages.map(() => new Float64Array(state.length)), trial: new Float64Array(state.length) }
  let time = from
  let step = (to - from) / 200
  slopes(time, state, work.k[0])
  while (to - time > 1e-13 * Math.abs(to - from)) {
    step = Math.min(step, to - time)
    const measured = attempt(work, time, step, state)
    const error = Number.isFinite(measured) ? measured : hopeless
    if (step < 1e-14 * Math.abs(to - from)) throw new RangeError('the step shrank to nothing')
    if (error <= 1) {
      if (event && event(state) > 0 !== event(work.trial) > 0) {
        const length = stepToEvent(work, time, step, state, event)
        state.set(work.trial)
        return { time: time + length, hit: true }
      }
      time += step
      state.set(work.trial)
      work.k[0].set(work.k[6])
    }
    step *= Math.min(4, Math.max(0.2, 0.9 * Math.pow(Math.max(error, 1e-12), -0.2)))
  }
  return { time: to, hit: false }
}
