import type { Plan } from '../../main/contract/plan'
import type { ComparatorEntry, Finding, Result } from '../../main/contract/result'
import type { Compute } from '../../main/usecases/compute'

const entry = (index: number): ComparatorEntry => ({
  index, lane: 0, cycle: null, threshold_v: 0.1 * index, common_mode_v: 0.5,
  limits: {
    window_s: 1e-10, overdrive_v: 1e-6, tau_s: 1e-11, integration_s: 1e-11, noise_v: 1e-3, offset_v: 1e-3, trim_step_v: null, skew_s: null,
    kickback_v: 1e-3, memory_v: 1e-3, input_cap_f: 1e-15,
  },
  reached: {
    delay_s: null, tau_s: null, integration_s: null, noise_v: null, offset_v: null, residual_v: null, trim_step_v: null, kickback_v: null,
    memory_v: null, input_cap_f: null, aperture_s: null, energy_j: null, area_m2: null,
  },
  use: { time: null, noise: null, offset: null, kickback: null, memory: null, input: null }, tightest: null,
})

const stop: Finding = { severity: 'stop', code: 'too_fast', message: 'The window is too short.', path: null, remedy: 'Take two lanes.', remedies: [] }

/** A result of three entries, the same for every plan but for the plan itself; a title of “stop” gives a `stop` finding. */
function resultOf(plan: Plan, workingsFor: number | undefined): Result {
  return {
    schema: 'latchwright.result/1', plan,
    quantities: { lsb_v: 0.01, comparator_count: 3, decision_rate_hz: 1e9, error_power_allowed_v2: 1e-6 },
    budget: (['quantisation', 'jitter', 'sampling_noise', 'reference', 'threshold_spread', 'comparator_noise'] as const)
      .map((item) => ({ item, allowed_v2: 1e-7, used_v2: 1e-8 })),
    comparators: [1, 2, 3].map(entry),
    design: {
      widths: { input_m: 1e-6, input_length_m: 3e-8, cross_n_m: 1e-6, cross_p_m: 1e-6, tail_m: 1e-6, reset_m: 1e-6, extra_cap_f: 0 },
      corner: 'typical', offset_parts_v: { input: 1e-3, cross_n: 1e-3, cross_p: 1e-3, reset: 0 }, trim_bits: null,
    },
    ledger: { power_w: 1e-3, area_m2: 1e-9, power: [], area: [] },
    predicted: { enob_bits: 5, sndr_db: 32, walden_j: 1e-14, schreier_db: 150 },
    corners: [{ name: 'typical', delay_s: null, noise_v: null, offset_v: null, power_w: null, meets: true }],
    findings: plan.title === 'stop' ? [stop] : [],
    workings: [{
      id: `entry.${workingsFor ?? 'tightest'}`, title: 'An entry', formula: 'x = 1', numbers: '1',
      value: workingsFor ?? null, unit: '', source: 'common practice',
    }],
  }
}

/** A planner that does nothing, so that what stands around it can be tested by itself. */
export function standIn(): Compute {
  return {
    plan: (document, _card, options) => Promise.resolve(resultOf(document, options?.workingsFor)),
    waves: (_document, _card, { index, overdrive_v }) => {
      if (index > 3) return Promise.reject(new RangeError(`There is no comparator ${index}.`))
      return Promise.resolve({
        overdrive_v: overdrive_v ?? 1e-3, corner: 'typical', columns: ['time_s', 'clock_v'], rows: [[0, 0], [1e-12, 0.9]], phases: [], decision_s: null,
      })
    },
    close: () => Promise.resolve(),
  }
}
