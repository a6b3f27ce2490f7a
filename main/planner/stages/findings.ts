import { limitNames, type LimitName } from '../../contract/choices'
import type { ComparatorEntry, Finding, Result } from '../../contract/result'
import { formatSi } from '../../contract/units'
import { droopCapacitance } from '../models/input/load'
import { tapVariance } from '../models/offset/mismatch'
import { sarDacSigmaLimit } from '../models/yield/successive'
import type { Bank } from './bank'
import { offsetPart, sigmaLimits, yieldStep } from './offset-limits'
import { heldCapacitance } from './situation'
import { limitKeys } from './uses'

type Severity = Finding['severity']

/** What is known before any latch is sized. */
export type Asked = Pick<Bank, 's' | 'budget' | 'positions'>

const finding = (severity: Severity, code: string, message: string, path: string | null): Finding =>
  ({ severity, code, message, path, remedy: null, remedies: [] })

/** Where in the brief each limit is most directly eased. */
const limitPaths: Record<LimitName, string> = {
  time: 'converter.sample_rate_hz', noise: 'converter.enob_bits', offset: 'comparator.offset_method',
  kickback: 'budget.kick_share', memory: 'budget.memory_share', input: 'converter.flash.bank_share',
}

function budgetFindings({ budget, s }: Asked): Finding[] {
  if (budget.remainder > 0) return []
  const names = {
    quantisation: ['quantisation', 'ask for fewer effective bits or plan more bits', 'converter.enob_bits'],
    jitter: ['aperture jitter', 'ask for less jitter, a lower input frequency or fewer effective bits', 'converter.jitter_s'],
    sampling: ['sampled thermal noise', 'plan a larger sampling capacitance', s.kind.architecture === 'flash' ? 'converter.flash.sampling_cap_f' : 'converter.sar.unit_cap_f'],
    reference: ['spread of the reference elements', 'plan better matched elements', s.kind.architecture === 'flash' ? 'converter.flash.ladder_sigma' : 'converter.sar.unit_cap_sigma'],
  } as const
  const keys = Object.keys(names) as (keyof typeof names)[]
  const eater = keys.reduce((a, b) => (budget[b] > budget[a] ? b : a))
  const [name, remedy, path] = names[eater]
  const share = Math.round((100 * budget[eater]) / budget.allowed)
  return [finding('stop', 'budget_exhausted',
    `Nothing of the error budget is left for the comparators: ${name} alone takes ${share} % of the power that ${s.plan.converter.enob_bits} effective bits allow; ${remedy}.`, path)]
}

function windowFindings({ positions, s }: Asked): Finding[] {
  const worst = positions.reduce((a, b) => (b.limits.window_s < a.limits.window_s ? b : a))
  if (worst.limits.window_s > 0) return []
  const where = worst.cycle === null ? '' : ` in cycle ${worst.cycle}`
  const slot = s.kind.architecture === 'flash' ? s.kind.evaluateTime : s.kind.cycleTime
  const setUp = s.clockUncertainty + s.captureSetup > slot / 2
  const advice = setUp ? 'Clock uncertainty and capture set-up take most of the slot: plan shorter ones.' : 'Plan a slower rate, more lanes, or faster logic and settling.'
  const path = setUp ? 'budget.capture_setup_s' : s.kind.architecture === 'flash' ? 'converter.sample_rate_hz' : 'converter.sar.dac_tau_s'
  return [finding('stop', 'window_negative',
    `No time is left to decide${where}: the window is ${formatSi(worst.limits.window_s, 's')}. ${advice}`, path)]
}

const ladderStop = (sigma: number): Finding => finding('stop', 'ladder_exhausts_offset',
  `The ladder's own spread of ${formatSi(sigma * 100, '%')} per element uses up the whole INL or DNL yield: nothing is left for the comparators. `
  + 'Plan better matched elements or wider INL and DNL limits.', 'converter.flash.ladder_sigma')

function ladderFindings({ s, budget }: Asked): Finding[] {
  const { kind, plan } = s
  if (kind.architecture === 'flash') {
    const sigma = kind.flash.ladder_sigma
    const yields = sigmaLimits(s)
    if (plan.comparator.offset_method === 'trim') return yieldStep(s, sigma) > 0 ? [] : [ladderStop(sigma)]
    const eaten = tapVariance(s.lsb, sigma, s.codes, s.codes / 2) >= yields.inl ** 2 || (s.lsb * sigma) ** 2 / 2 >= yields.dnl ** 2
    return eaten && offsetPart(s) * budget.spreadPower > 0 ? [ladderStop(sigma)] : []
  }
  const allowed = sarDacSigmaLimit(s.codes, plan.converter.dnl_lsb, s.laneYield)
  return kind.sar.unit_cap_sigma > allowed ? [finding('stop', 'dac_mismatch_yield',
    `The DAC's unit spread of ${formatSi(kind.sar.unit_cap_sigma * 100, '%')} misses the DNL yield at mid-code: at most ${formatSi(allowed * 100, '%')} would meet it.`,
    'converter.sar.unit_cap_sigma')] : []
}

function loadFindings({ s }: Bank): Finding[] {
  const { input_attenuation_db, source_ohm } = s.plan.converter
  const cap = heldCapacitance(s)
  const path = s.kind.architecture === 'flash' ? 'converter.flash.sampling_cap_f' : 'converter.sar.unit_cap_f'
  const allowed = droopCapacitance(input_attenuation_db, s.inputFrequency, source_ohm)
  const [held, at] = [formatSi(cap, 'F'), formatSi(s.inputFrequency, 'Hz')]
  return cap !== null && cap > allowed ? [finding('caution', 'source_droop',
    `${held} on each side makes the source droop by more than ${input_attenuation_db} dB at ${at}; at most ${formatSi(allowed, 'F')} would not.`, path)] : []
}

function drawnFindings({ s, design }: Bank): Finding[] {
  const { widths } = design
  const entries = (Object.entries(widths) as [string, number | undefined][])
    .filter(([key]) => s.plan.comparator.topology === 'double_tail' || !key.startsWith('second_'))
  return entries.flatMap(([key, value]) => {
    const least = key === 'input_length_m' ? s.card.l_min_m : key.endsWith('_m') ? s.card.w_min_m : 0
    return value !== undefined && value < least * (1 - 1e-9) ? [finding('stop', key === 'input_length_m' ? 'length_below_minimum' : 'width_below_minimum',
      `${key} of ${formatSi(value, 'm')} cannot be drawn: the card's minimum is ${formatSi(least, 'm')}.`, `comparator.widths.${key}`)] : []
  })
}

/** What most likely keeps a latch from deciding, in the order in which it is looked for. */
function slownessCause({ s }: Bank, commonMode: number): [string, string] {
  const { clock_rise_s, load_f } = s.plan.comparator
  const window = s.plan.converter.lanes / s.plan.converter.sample_rate_hz
  if (commonMode > s.card.vdd_v) return ['the common mode lies above the supply: lower it', 'converter.common_mode_v']
  if (clock_rise_s > window / 2) return ['the clock takes longer to rise than there is time to decide: plan a faster edge', 'comparator.clock_rise_s']
  if (load_f > 1e-12) return [`a load of ${formatSi(load_f, 'F')} on each output is far beyond a latch: put a buffer between`, 'comparator.load_f']
  if (commonMode <= 0 && s.plan.converter.common_mode_v > 0) return ['the switching of the DAC takes the common mode to ground: plan another DAC scheme or a smaller full scale', 'converter.sar.dac_scheme']
  if (commonMode < s.card.n.vt_v + 0.1) return ['the common mode hardly turns the input pair on: raise it', 'converter.common_mode_v']
  return ['widen the input pair and tail, or trim with fewer bits', 'comparator.sizing']
}

function latchFindings(bank: Bank): Finding[] {
  return bank.evaluated.filter((e) => e.failure !== null).slice(0, 1).map(({ condition, commonMode, failure }) => {
    const [cause, path] = slownessCause(bank, commonMode)
    const place = `at ${condition.name} with a common mode of ${formatSi(commonMode, 'V')}`
    return finding('stop', `latch_${failure}`, failure === 'no_regeneration'
      ? `The latch does not regenerate ${place}: its loop gain stays below one; ${cause}.`
      : `The latch does not get to a decision in any useful time ${place}; ${cause}.`, path)
  })
}

const unitOf: Record<LimitName, string> = { time: 's', noise: 'V', offset: 'V', kickback: 'V', memory: 'V', input: 'F' }

function reachedAndLimit(entry: ComparatorEntry, key: LimitName): [number | null, number] {
  const { reached: r, limits: l } = entry
  switch (key) {
    case 'time': return [r.delay_s, l.window_s]
    case 'noise': return [r.noise_v, l.noise_v]
    case 'offset': return l.trim_step_v === null ? [r.residual_v, l.offset_v] : [r.trim_step_v, l.trim_step_v]
    case 'kickback': return [r.kickback_v, l.kickback_v]
    case 'memory': return [r.memory_v, l.memory_v]
    case 'input': return [r.input_cap_f, l.input_cap_f]
  }
}

/** Percent of the limit, or how many times it where percents get unreadable. */
const shareText = (use: number): string => (use < 10 ? `${formatSi(use * 100, '%')} of the limit` : `${formatSi(use, '')} times the limit`)

const placeOf = (entry: ComparatorEntry): string => (entry.cycle === null ? `comparator ${entry.index}` : `cycle ${entry.cycle}`)

function limitFindings({ entries, s }: Bank): Finding[] {
  return limitKeys.flatMap((key) => {
    const over = entries.filter((e) => e.use[key] !== null && e.use[key] > 1)
    if (over.length === 0) return []
    const worst = over.reduce((a, b) => (b.use[key]! > a.use[key]! ? b : a))
    const [reached, limit] = reachedAndLimit(worst, key)
    const what = key === 'offset' && worst.limits.trim_step_v !== null ? 'Trim step' : limitNames[key]
    const path = key === 'input' && s.kind.architecture === 'sar' ? 'budget.dac_load_share' : limitPaths[key]
    return [finding('stop', `${key}_over_limit`,
      `${what} is over its limit at ${placeOf(worst)}${over.length > 1 ? ` and ${over.length - 1} more` : ''}: ${formatSi(reached, unitOf[key])} of ${formatSi(limit, unitOf[key])}, ${shareText(worst.use[key]!)}.${s.plan.comparator.sizing === 'auto' ? ' This is the nearest design that could be found.' : ''}`, path)]
  })
}

function trimFindings({ design, trimConverged, s }: Bank): Finding[] {
  if (design.trim === null) return []
  if (!trimConverged) return [finding('stop', 'trim_range', 'The trim cannot reach the raw offset: the capacitance it needs grows faster than its range. Use a wider input pair.', 'comparator.offset_method')]
  return design.trim.unit <= s.card.cap.trim_unit_f * (1 + 1e-9) ? [finding('note', 'trim_unit_binds',
    `The smallest trim capacitor that can be drawn, ${formatSi(s.card.cap.trim_unit_f, 'F')}, sets the trim step; the number of bits only sets the range.`, 'comparator.trim_bits')] : []
}

function overrideFindings({ s }: Bank, ledger: Result['ledger']): Finding[] {
  const shown = new Set([...ledger.power, ...ledger.area].map((line) => line.item))
  const seen = new Set<string>()
  return s.plan.overrides.flatMap((override, i) => {
    const repeated = seen.has(override.item)
    seen.add(override.item)
    if (!shown.has(override.item)) return [finding('caution', 'override_without_line', `${override.item} does not apply to this plan, so its override has no effect.`, `overrides.${i}.item`)]
    return repeated ? [finding('caution', 'override_repeated', `${override.item} is overridden more than once; the last one counts.`, `overrides.${i}.item`)] : []
  })
}

/** Stops that no latch can mend. */
export const briefFindings = (asked: Asked): Finding[] => [...budgetFindings(asked), ...windowFindings(asked), ...ladderFindings(asked)]

/** Everything the planner has to say of a finished bank, stops first. */
export function findingsOf(bank: Bank, ledger: Result['ledger']): Finding[] {
  const all = [
    ...briefFindings(bank), ...latchFindings(bank), ...drawnFindings(bank),
    ...limitFindings(bank), ...trimFindings(bank), ...loadFindings(bank), ...overrideFindings(bank, ledger),
  ]
  const order: Severity[] = ['stop', 'caution', 'note']
  return order.flatMap((severity) => all.filter((f) => f.severity === severity))
}
