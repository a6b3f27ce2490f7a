import type { MosDevice } from '../models/mos/device'

/**
 * Where a terminal of a device sits. `own`: a node of the device's side; `opposite`: that node of the other side;
 * `shared`: a node both sides have in common; the rest are ideal sources.
 */
export type Terminal =
  | { readonly at: 'own' | 'opposite' | 'shared'; readonly node: number }
  | { readonly at: 'input' | 'clock' | 'clock_bar' | 'supply' | 'ground' }

export type PairName = 'input' | 'cross_n' | 'cross_p' | 'reset_x' | 'reset_o' | 'second_input'

/** A device that both sides have (`pair` names it) or that both share (`pair` null). */
export interface CircuitDevice {
  readonly pair: PairName | null
  readonly polarity: 'n' | 'p'
  readonly device: MosDevice
  readonly gate: Terminal
  readonly drain: Terminal
  readonly source: Terminal
}

/**
 * A latch as one description, from which the balanced half circuit, the differential mode and the full transient follow.
 * Side nodes come first; `output` is the side node that is read, `inner` the one the trim loads and the input pair drives.
 */
export interface Circuit {
  readonly sideNodes: readonly string[]
  readonly sharedNodes: readonly string[]
  readonly inner: number
  readonly output: number
  readonly sideCapacitance: readonly number[]
  readonly sharedCapacitance: readonly number[]
  readonly sideStart: readonly number[]
  readonly sharedStart: readonly number[]
  /** Shared nodes after a finished decision [V]. */
  readonly sharedDecided: readonly number[]
  readonly devices: readonly CircuitDevice[]
  readonly supply: number
  readonly commonMode: number
  readonly clockRise: number
  readonly temperature: number
  /** Clocked gates of one comparator [F]. */
  readonly clockGates: number
}

export const own = (node: number): Terminal => ({ at: 'own', node })
export const opposite = (node: number): Terminal => ({ at: 'opposite', node })
export const shared = (node: number): Terminal => ({ at: 'shared', node })
export const input: Terminal = { at: 'input' }
export const clock: Terminal = { at: 'clock' }
export const clockBar: Terminal = { at: 'clock_bar' }
export const supply: Terminal = { at: 'supply' }
export const ground: Terminal = { at: 'ground' }
