import generic from '../../assets/cards/generic.json'
import { planSchema, type Plan, type PlanInput } from '../../main/contract/plan'
import type { ComparatorEntry, Finding, LedgerLine, Result, Working } from '../../main/contract/result'

/**
 * Results in the shape of the planner's, with plausible figures: the sheet is tried on cases
 * that need not wait for a planner, 1023 comparators and a latch that could not be evaluated among them.
 */
function planOf(input: PlanInput): Plan {
  const parsed = planSchema.parse(input)
  const vdd = generic.cards.find((card) => card.id === 'generic-28')?.vdd_v ?? 0.9
  const { converter } = parsed
  return {
    ...parsed,
    converter: {
      ...converter, full_scale_v: converter.full_scale_v ?? (2 / 3) * vdd, common_mode_v: converter.common_mode_v ?? 0.6 * vdd,
      enob_bits: converter.enob_bits ?? converter.resolution_bits - 0.6,
      ...(converter.architecture === 'flash' ? { flash: planSchema.shape.converter.shape.flash.unwrap().parse(converter.flash ?? {}) }
        : { sar: planSchema.shape.converter.shape.sar.unwrap().parse(converter.sar ?? {}) }),
    },
    comparator: { ...parsed.comparator, widths: undefined },
    corners: ['typical', 'slow', 'fast'],
  }
}

function entry(lsb: number, more: Partial<ComparatorEntry> & { offsetLimit: number; reach: number; trimmed: boolean }): ComparatorEntry {
  const { offsetLimit, reach, trimmed, ...rest } = more
  const window = 233e-12
  const residual = trimmed ? 0.86e-3 * reach : 0.97 * offsetLimit * reach
  const use = {
    time: (188e-12 * reach) / window, noise: (1.13 * reach) / 2.16,
    offset: trimmed ? (2.98e-3 * reach) / (offsetLimit * 3.2) : residual / offsetLimit,
    kickback: 0.21, memory: 0.087, input: 0.63,
  }
  const tightest = (Object.keys(use) as (keyof typeof use)[]).reduce((a, b) => (use[b] > use[a] ? b : a))
  return {
    index: 1, lane: 0, cycle: null, threshold_v: null, common_mode_v: 0.55,
    limits: {
      window_s: window, overdrive_v: 4.11e-6, tau_s: 13.4e-12, integration_s: 81.6e-12, noise_v: 2.16e-3, offset_v: offsetLimit,
      trim_step_v: trimmed ? offsetLimit * 3.2 : null, skew_s: null, kickback_v: lsb / 4, memory_v: lsb / 10, input_cap_f: 3.97e-15,
    },
    reached: {
      delay_s: 188e-12 * reach, tau_s: 11.2e-12 * reach, integration_s: 42.4e-12, noise_v: 1.13e-3 * reach,
      offset_v: trimmed ? 6.2e-3 : residual, residual_v: residual, trim_step_v: trimmed ? 2.98e-3 * reach : null,
      kickback_v: 0.21 * (lsb / 4), memory_v: 0.087 * (lsb / 10), input_cap_f: 2.5e-15, aperture_s: 9.6e-12, energy_j: 21.4e-15, area_m2: 14.6e-12,
    },
    use, tightest, ...rest,
  }
}

const widths = { input_m: 3.62e-6, input_length_m: 3e-8, cross_n_m: 1.84e-6, cross_p_m: 1.84e-6, tail_m: 4.71e-6, reset_m: 0.92e-6, extra_cap_f: 0 }

const notes: Finding[] = [
  { severity: 'caution', code: 'linear_form_pessimistic', message: 'At 4.11 mV overdrive the linear delay is up to 15 % long; the waveforms show the full circuit.', path: null, remedy: null, remedies: [] },
  { severity: 'note', code: 'skew_handed_on', message: 'Clock skew between comparators is handed on to the layout: nothing in the plan stands for it.', path: 'converter.lanes', remedy: null, remedies: [] },
]

const shelf: Working[] = [
  { id: 'lsb', title: 'Least significant bit', formula: 'Δ = V_FS / 2^N', numbers: 'Δ = 600 mV / 2^6', value: 9.375e-3, unit: 'V', source: 'Definition' },
  { id: 'allowed', title: 'Allowed error power', formula: 'P_allow = V_FS² / (12·4^ENOB)', numbers: 'P_allow = (600 mV)² / (12·4^5.4)', value: 1.682e-5, unit: 'V²', source: 'IEEE Std 1241-2010, effective number of bits' },
  { id: 'need', title: 'Smallest overdrive to be resolved', formula: 'v_need = min(Δ/2, P_e·Δ/2·exp(n_l·T_ev/τ_c))', numbers: 'v_need = min(4.69 mV, 1e−12·4.69 mV·exp(1·239 ps/11.0 ps))', value: 1.27e-5, unit: 'V', source: 'Common practice: error rate of a synchroniser chain' },
  { id: 'dnl', title: 'Threshold spread that DNL yield allows', formula: 'σ_DNL: ∫ g = Y_each, g ← f·(K∗g), M−2 times', numbers: 'σ_DNL/Δ = 0.0939 for Y_each = 99.5 %, M−1 = 63', value: 8.8e-4, unit: 'V', source: 'Exact recursion over neighbouring codes' },
  { id: 'skew', title: 'Skew limit', formula: 'skew_lim,k = √((1−ρ)R/4) / (2π f_in·√((V_FS/2)² − V_k²))', numbers: 'does not apply behind a front sampler', value: null, unit: 's', source: 'Local slope of a full-scale sine' },
]

function common(plan: Plan, comparators: ComparatorEntry[], power: [LedgerLine['item'], number][], area: [LedgerLine['item'], number][]): Result {
  const { full_scale_v, resolution_bits, enob_bits, sample_rate_hz } = plan.converter
  const allowed = full_scale_v ** 2 / (12 * 4 ** enob_bits)
  const lines = (all: [LedgerLine['item'], number][]): LedgerLine[] => all.map(([item, value], i) => ({
    item, value: plan.overrides.find((one) => one.item === item)?.value ?? value,
    model: ['energy per decision × decision rate', 'gate count × card’s gate energy × activity 0.5', 'V_DD·V_FS / R_L', 'buffers, taper 4, and 0.2 fF/µm of wire'][i % 4],
    overridden: plan.overrides.some((one) => one.item === item),
  }))
  const [powers, areas] = [lines(power), lines(area)]
  const total = (all: LedgerLine[]): number => all.reduce((sum, one) => sum + one.value, 0)
  return {
    schema: 'latchwright.result/1', plan,
    quantities: {
      lsb_v: full_scale_v / 2 ** resolution_bits, decision_rate_hz: sample_rate_hz * comparators.length, error_power_allowed_v2: allowed,
      comparator_count: comparators[0].cycle === null ? comparators.length : 1,
    },
    budget: ([['quantisation', 0.43, 0.43], ['jitter', 0.02, 0.02], ['sampling_noise', 0.001, 0.001], ['reference', 0.004, 0.004], ['threshold_spread', 0.272, 0.21],
      ['comparator_noise', 0.272, 0.075]] as const).map(([item, a, u]) => ({ item, allowed_v2: a * allowed, used_v2: u * allowed })),
    comparators,
    design: { widths, corner: 'slow · 0.81 V · −40 °C', offset_parts_v: { input: 5.64e-3, cross_n: 2.21e-3, cross_p: 0.88e-3, reset: 0.02e-3 }, trim_bits: plan.comparator.offset_method === 'trim' ? 4 : null },
    ledger: { power_w: total(powers), area_m2: total(areas), power: powers, area: areas },
    predicted: { enob_bits: 5.52, sndr_db: 34.99, walden_j: 5.3e-14, schreier_db: 148.1 },
    corners: [
      { name: 'typical · 0.9 V · 27 °C', delay_s: 151e-12, noise_v: 1.02e-3, offset_v: 6.02e-3, power_w: 4.02e-3, meets: true },
      { name: 'slow · 0.81 V · 125 °C', delay_s: 176e-12, noise_v: 1.13e-3, offset_v: 6.2e-3, power_w: 3.31e-3, meets: true },
      { name: 'slow · 0.81 V · −40 °C', delay_s: 188e-12, noise_v: 0.92e-3, offset_v: 6.11e-3, power_w: 3.2e-3, meets: true },
      { name: 'fast · 0.99 V · 125 °C', delay_s: 119e-12, noise_v: 1.11e-3, offset_v: 5.9e-3, power_w: 4.86e-3, meets: true },
    ],
    findings: notes,
    workings: Array.from({ length: 30 }, (_, i) => ({ ...shelf[i % shelf.length], id: `${shelf[i % shelf.length].id}-${i}` })),
  }
}

const flashPower: [LedgerLine['item'], number][] = [['power.comparators', 0.84e-3], ['power.capture', 0.41e-3], ['power.encoder', 0.71e-3], ['power.clock', 1.31e-3],
  ['power.ladder', 0.9e-3], ['power.leakage', 7e-5], ['power.input_driver', 0.62e-3]]
const flashArea: [LedgerLine['item'], number][] = [['area.comparators', 1.9e-9], ['area.trim', 2.3e-9], ['area.capture', 9e-10], ['area.encoder', 4.1e-9], ['area.clock', 3e-10],
  ['area.ladder', 1.4e-9], ['area.sampler', 5e-10]]

function flash(bits: number, trimmed: boolean, input: Partial<PlanInput> = {}): Result {
  const plan = planOf({
    schema: 'latchwright.plan/1', title: 'Peatland lidar echo front end', author: 'M. Okafor', revision: 'B', ...input,
    converter: { architecture: 'flash', resolution_bits: bits, sample_rate_hz: 2e9, full_scale_v: 0.6, common_mode_v: 0.55 },
    comparator: { offset_method: trimmed ? 'trim' : 'size' },
  })
  const m = 2 ** bits
  const lsb = 0.6 / m
  const comparators = Array.from({ length: m - 1 }, (_, i) => {
    const k = i + 1
    const spread = Math.sqrt((0.1027 * lsb) ** 2 - (lsb * 0.005) ** 2 * ((k * (m - k)) / m))
    return entry(lsb, { index: k, threshold_v: -0.3 + k * lsb, offsetLimit: spread, reach: trimmed ? 1 : 0.9, trimmed })
  })
  return common(plan, comparators, flashPower, flashArea)
}

/** 63 comparators with trim and a line set by hand. */
export const trimmedFlash = (): Result =>
  flash(6, true, { overrides: [{ item: 'power.encoder', value: 1.2e-3, reason: 'from synthesis, σ of 40 µW' }], notes: 'Second spin. Keep the ladder of revision A.' })

/** 1023 comparators whose offset limits differ along the ladder. */
export const largeFlash = (): Result => flash(10, false, { title: 'Ten-bit flash, every comparator of it' })

/** One comparator for ten cycles. */
export function tenCycleSar(): Result {
  const plan = planOf({
    schema: 'latchwright.plan/1', title: 'Implant logger, Δ-coded', author: 'Ł. Ørsted', revision: '3',
    converter: { architecture: 'sar', resolution_bits: 10, sample_rate_hz: 2e7, full_scale_v: 0.6 },
  })
  const lsb = 0.6 / 1024
  const comparators = Array.from({ length: 10 }, (_, i) => {
    const one = entry(lsb, { index: i + 1, cycle: i + 1, common_mode_v: 0.54, offsetLimit: 2e-3, reach: 0.9, trimmed: false })
    const window = (3.4 - 0.12 * Math.max(0, 8 - i)) * 1e-9
    return { ...one, limits: { ...one.limits, window_s: window }, use: { ...one.use, time: (one.reached.delay_s ?? 0) / window }, tightest: 'offset' as const }
  })
  return common(plan, comparators, [['power.comparators', 4.4e-6], ['power.clock', 1.1e-6], ['power.leakage', 2e-8], ['power.input_driver', 1.9e-6], ['power.sar_logic', 3.4e-6], ['power.dac', 2.7e-6]],
    [['area.comparators', 1.5e-11], ['area.clock', 2e-12], ['area.sar_logic', 1.4e-10], ['area.dac', 5.1e-10]])
}

/** A latch that could not be evaluated, and a budget that was eaten before. */
export function stoppedFlash(): Result {
  const built = flash(6, true, { title: 'Too fast by half' })
  const reached = Object.fromEntries(Object.keys(built.comparators[0].reached).map((key) => [key, null])) as unknown as ComparatorEntry['reached']
  const use = { time: null, noise: null, offset: null, kickback: null, memory: null, input: null }
  const remedies = [
    { text: 'Two lanes give each comparator twice the time: 9.8 mW, 0.0228 mm².', set: [{ path: 'converter.lanes', value: 2 }] },
    { text: 'A sample rate of 1.4 GS/s fits.', set: [{ path: 'converter.sample_rate_hz', value: 1.4e9 }] },
  ]
  return {
    ...built,
    comparators: built.comparators.map((one) => ({ ...one, limits: { ...one.limits, window_s: -17e-12, tau_s: 0, integration_s: 0 }, reached, use, tightest: 'time' as const })),
    budget: built.budget.map((item) => (['threshold_spread', 'comparator_noise'].includes(item.item) ? { ...item, used_v2: null } : item)),
    design: { ...built.design, offset_parts_v: { input: null, cross_n: null, cross_p: null, reset: null }, trim_bits: null },
    ledger: { ...built.ledger, power_w: null, area_m2: null, power: built.ledger.power.slice(1), area: built.ledger.area.slice(2) },
    predicted: { enob_bits: null, sndr_db: null, walden_j: null, schreier_db: null },
    corners: built.corners.map((corner) => ({ ...corner, delay_s: null, noise_v: null, offset_v: null, power_w: null, meets: false })),
    findings: [
      { severity: 'stop', code: 'window_negative', message: 'The decision window is −17.0 ps: half a period of 250 ps is less than clock uncertainty and capture set-up together.', path: 'converter.sample_rate_hz', remedy: remedies[0].text, remedies },
      { severity: 'stop', code: 'latch_not_evaluated', message: 'At 0.55 V common mode and −40 °C the latch never leaves its balance, so nothing can be reached.', path: 'converter.common_mode_v', remedy: null, remedies: [] },
      ...built.findings,
    ],
  }
}
