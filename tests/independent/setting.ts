/** What one comparator is made of and how it is driven. Keys and units follow the process cards. */

export interface DeviceCard {
  vt_v: number
  vt_temp_v_k: number
  kp_a_v2: number
  slope: number
  theta_per_v: number
  lambda_per_v: number
  gamma: number
}

export interface CapCard {
  cox_f_m2: number
  fringe_f_m: number
  junction_f_m: number
  wire_f: number
}

export interface Card {
  l_min_m: number
  n: DeviceCard
  p: DeviceCard
  cap: CapCard
}

export interface Widths {
  input_m: number
  input_length_m: number
  cross_n_m: number
  cross_p_m: number
  tail_m: number
  reset_m: number
  extra_cap_f: number
  /** double tail only: gate on the first stage, drain on the output */
  second_input_m?: number
  /** double tail only: the p tail of the second stage */
  second_tail_m?: number
}

export type Topology = 'strong_arm' | 'double_tail'

export interface Setting {
  /** default strong_arm */
  topology?: Topology
  card: Card
  vdd_v: number
  temperature_k: number
  widths: Widths
  load_f: number
  clock_rise_s: number
  common_mode_v: number
  trim_cap_f: number
}

export type Pair = 'input' | 'second_input' | 'cross_n' | 'cross_p' | 'reset_internal' | 'reset_output'
export type NodePair = 'internal' | 'output'

/**
 * A difference between the two sides, positive side minus negative side, half of it put on each.
 * vt [V, of the magnitude for p devices]; kp and capacitance relative; start [V] of the state at the beginning of the ramp.
 */
export type Imbalance =
  | { what: 'vt' | 'kp'; pair: Pair; amount: number }
  | { what: 'capacitance' | 'start'; nodes: NodePair; amount: number }
