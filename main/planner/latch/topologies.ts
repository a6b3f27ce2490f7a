import type { ComparatorBrief } from '../../contract/plan'
import type { Circuit } from './circuit'
import { doubleTail } from './double-tail'
import type { LatchSetting } from './setting'
import { strongArm } from './strong-arm'

/** A topology: its circuit, and how often each width is drawn in one comparator. */
export interface Topology {
  readonly circuit: (setting: LatchSetting) => Circuit
  /** Width keys with the number of devices drawn of each; only the input pair has a length of its own. */
  readonly drawn: Readonly<Partial<Record<DrawnWidth, number>>>
}

export const drawnWidths = ['input_m', 'cross_n_m', 'cross_p_m', 'tail_m', 'reset_m', 'second_tail_m', 'second_input_m'] as const
export type DrawnWidth = (typeof drawnWidths)[number]

/** Every topology that a plan may choose; one file each. */
export const topologies: Readonly<Record<ComparatorBrief['topology'], Topology>> = {
  strong_arm: { circuit: strongArm, drawn: { input_m: 2, cross_n_m: 2, cross_p_m: 2, tail_m: 1, reset_m: 4 } },
  double_tail: {
    circuit: doubleTail,
    drawn: { input_m: 2, cross_n_m: 2, cross_p_m: 2, tail_m: 1, reset_m: 2, second_tail_m: 1, second_input_m: 2 },
  },
}

/** Widths that a topology has, in their usual order. */
export const widthsOf = (topology: ComparatorBrief['topology']): DrawnWidth[] => drawnWidths.filter((key) => topologies[topology].drawn[key] !== undefined)
