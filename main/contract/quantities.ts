/**
 * The glossary of the brief: every numeric field of a plan, once. Ranges, units, labels and help
 * of the plan schema, the error messages and the window's fields are all read from here.
 */
export interface Quantity {
  readonly label: string
  readonly symbol: string
  /** SI unit as shown; '' for pure numbers. */
  readonly unit: string
  readonly min: number
  readonly max: number
  readonly integer?: boolean
  /** null is a legal value and means what `nullMeans` says. */
  readonly nullMeans?: string
  readonly help: string
}

const q = (
  label: string, symbol: string, unit: string, min: number, max: number, help: string,
  more: { integer?: boolean; nullMeans?: string } = {},
): Quantity => ({ label, symbol, unit, min, max, help, ...more })

export const quantities = {
  'converter.resolution_bits': q('Resolution', 'N', 'bit', 2, 18,
    'Number of bits. The converter has 2^N codes. Flash 2 to 10, SAR 4 to 18.', { integer: true }),
  'converter.sample_rate_hz': q('Sample rate', 'f_s', 'S/s', 1e3, 1e12,
    'Conversions per second of the whole converter. Each lane runs at f_s divided by the lanes.'),
  'converter.lanes': q('Lanes', 'lanes', '', 1, 64,
    'Time-interleaved copies. More lanes give every comparator more time and cost as many banks.', { integer: true }),
  'converter.full_scale_v': q('Full scale', 'V_FS', 'V', 1e-3, 20,
    'Differential, peak to peak. One LSB is V_FS / 2^N.'),
  'converter.common_mode_v': q('Common mode', 'v_cm', 'V', 0, 10,
    'Voltage around which both inputs of a comparator sit when it decides.'),
  'converter.enob_bits': q('Effective bits', 'ENOB', 'bit', 0.1, 18,
    'Effective resolution to be met at the input frequency. It sets the allowed error power V_FS²/(12·4^ENOB).'),
  'converter.input_frequency_hz': q('Input frequency', 'f_in', 'Hz', 1, 1e12,
    'Where the effective bits are asked for.', { nullMeans: 'half the sample rate' }),
  'converter.error_rate': q('Error rate', 'P_e', '/sample', 1e-30, 0.5,
    'Allowed unresolved (metastable) decisions per sample.'),
  'converter.yield': q('Yield', 'Y', '', 0.01, 0.999999999,
    'Fraction of chips that must meet INL and DNL.'),
  'converter.inl_lsb': q('INL limit', 'INL', 'LSB', 0.01, 100, 'Integral nonlinearity a good chip may show.'),
  'converter.dnl_lsb': q('DNL limit', 'DNL', 'LSB', 0.01, 100, 'Differential nonlinearity a good chip may show.'),
  'converter.jitter_s': q('Jitter', 'σ_j', 's', 0, 1e-6, 'Aperture jitter, rms. Its error power is (2π f_in σ_j)²·V_FS²/8.'),
  'converter.source_ohm': q('Source', 'R_s', 'Ω', 1e-3, 1e6, 'Resistance of the signal source per side.'),
  'converter.input_attenuation_db': q('Input droop', 'A_in', 'dB', 1e-3, 20,
    'Largest loss at the input frequency from the source resistance and the input capacitance.'),
  'converter.flash.sampling_cap_f': q('Sampling capacitor', 'C_s', 'F', 1e-16, 1e-9, 'Per side, of each lane. It sets the sampled noise 2kT/C_s.'),
  'converter.flash.evaluate_fraction': q('Evaluate fraction', 'e', '', 0.05, 0.95,
    'Part of the lane period in which comparators evaluate; the rest resets them.'),
  'converter.flash.capture_latches': q('Capture latches', 'n_l', '', 0, 8,
    'Pipelined latches after each comparator. Each multiplies the overdrive it still has to resolve.', { integer: true }),
  'converter.flash.bank_share': q('Bank share', 'b', '', 1e-3, 10, 'How much of C_s the whole bank may load the front sampler with.'),
  'converter.flash.ladder_ohm': q('Ladder', 'R_L', 'Ω', 0.1, 1e7, 'Total resistance of the reference ladder.'),
  'converter.flash.ladder_sigma': q('Ladder element spread', 'σ_R', '', 0, 0.5, 'Relative standard deviation of one ladder element.'),
  'converter.sar.sample_fraction': q('Sample fraction', 's', '', 0.01, 0.9, 'Part of the lane period spent sampling.'),
  'converter.sar.redundant_cycles': q('Redundant cycles', 'R_c', '', 0, 17, 'Extra decisions that repeat a weight and forgive early errors.', { integer: true }),
  'converter.sar.unit_cap_f': q('Unit capacitor', 'C_u', 'F', 1e-18, 1e-9, 'Smallest element of the capacitive DAC.'),
  'converter.sar.unit_cap_sigma': q('Unit spread', 'σ_u', '', 0, 0.5, 'Effective relative spread of one LSB of DAC weight.'),
  'converter.sar.dac_tau_s': q('DAC time constant', 'τ_dac', 's', 0, 1e-3, 'Settling time constant of the DAC.'),
  'converter.sar.settle_lsb': q('Settling tolerance', 'tol', 'LSB', 1e-3, 10, 'What a DAC step may still be off when the comparator decides.'),
  'converter.sar.logic_delay_s': q('Logic delay', 't_logic', 's', 0, 1e-3, 'From a decision to the DAC switches, per cycle.'),
  'converter.sar.range_loss': q('Range loss', 'r', '', 1e-6, 0.5, 'Part of full scale that a 3σ offset may cost.'),
  'comparator.widths.input_m': q('Input pair width', 'W_in', 'm', 1e-9, 1e-2, 'Each device of the input pair.'),
  'comparator.widths.input_length_m': q('Input pair length', 'L_in', 'm', 1e-9, 1e-4, 'Longer devices match better and are slower.'),
  'comparator.widths.cross_n_m': q('Cross-coupled n width', 'W_xn', 'm', 1e-9, 1e-2, 'Each n device of the regenerating pair.'),
  'comparator.widths.cross_p_m': q('Cross-coupled p width', 'W_xp', 'm', 1e-9, 1e-2, 'Each p device of the regenerating pair.'),
  'comparator.widths.tail_m': q('Tail width', 'W_tail', 'm', 1e-9, 1e-2, 'The clocked device under the input pair.'),
  'comparator.widths.reset_m': q('Reset width', 'W_rst', 'm', 1e-9, 1e-2, 'Each clocked device that pulls a node back between decisions.'),
  'comparator.widths.extra_cap_f': q('Extra capacitance', 'C_extra', 'F', 0, 1e-9, 'Added on each input-pair drain: less noise, more time and energy.'),
  'comparator.widths.second_tail_m': q('Second tail width', 'W_tail2', 'm', 1e-9, 1e-2, 'Double tail only: the p device over the second stage.'),
  'comparator.widths.second_input_m': q('Second input width', 'W_2', 'm', 1e-9, 1e-2, 'Double tail only: each input device of the second stage.'),
  'comparator.load_f': q('Load', 'C_load', 'F', 0, 1e-9, 'Capacitance on each output: next gate and wire.'),
  'comparator.clock_rise_s': q('Clock rise', 't_r', 's', 1e-14, 1e-3, 'Full linear ramp of the clock edge.'),
  'comparator.trim_bits': q('Trim bits', 'b', 'bit', 1, 16, 'Bits of the offset trim.', { integer: true, nullMeans: 'the smallest number that does' }),
  'comparator.autozero_gain': q('Autozero gain', 'A_az', '', 1, 1e6, 'How much the autozero divides the raw offset.'),
  'comparator.autozero_cap_f': q('Autozero capacitor', 'C_az', 'F', 1e-16, 1e-9, 'Storage per side; adds 2kT/C_az to the noise power.'),
  'budget.noise_share': q('Noise share', 'ρ', '', 0.01, 0.99, 'Part of the remaining error power that comparator noise may use; threshold spread gets the rest.'),
  'budget.integration_share': q('Integration share', 's_0', '', 0.01, 0.95, 'Part of the window planned for integration; regeneration gets the rest.'),
  'budget.kick_share': q('Kickback share', 'κ', 'LSB', 1e-4, 10, 'Largest kickback that may remain at a decision.'),
  'budget.kick_imbalance': q('Kickback imbalance', 'κ_i', '', 0, 1, 'Part of a kick that two unequal sides leave as a difference.'),
  'budget.memory_share': q('Memory share', 'μ', 'LSB', 1e-4, 10, 'What the last decision may leave at the input after reset.'),
  'budget.dac_load_share': q('DAC load share', 'd', '', 1e-4, 10, 'How much of the DAC capacitance the comparator may add.'),
  'budget.clock_uncertainty_s': q('Clock uncertainty', 't_u', 's', 0, 1e-3, 'Taken off the decision window.', { nullMeans: 'half a FO4 delay of the card' }),
  'budget.capture_setup_s': q('Capture setup', 't_su', 's', 0, 1e-3, 'Set-up time of the latch after the comparator.', { nullMeans: 'one FO4 delay of the card' }),
} as const satisfies Record<string, Quantity>

export type QuantityPath = keyof typeof quantities

/** Resolution ranges that depend on the architecture [bit]. */
export const resolutionRange = { flash: [2, 10], sar: [4, 18] } as const
