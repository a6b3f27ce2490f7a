import type { Plan } from '../../contract/plan'
import type { Finding, Remedy, Result } from '../../contract/result'
import { formatSi } from '../../contract/units'
import { unmendable } from './shortfall'

/** A change of the brief that may help, before it is tried. */
interface Idea { readonly what: string; readonly set: Remedy['set'] }

type SettableValue = Remedy['set'][number]['value']

const one = (what: string, path: string, value: SettableValue): Idea => ({ what, set: [{ path, value }] })
const tidy = (value: number): number => Number(value.toPrecision(4))

const moreLanes = ({ converter }: Plan): Idea[] =>
  converter.architecture === 'flash' ? [2, 4].map((f) => converter.lanes * f).filter((lanes) => lanes <= 64).map((lanes) => one(`${lanes} lanes`, 'converter.lanes', lanes)) : []

const slower = ({ converter }: Plan): Idea[] => [0.5, 0.75, 0.25].map((f) => {
  const rate = tidy(converter.sample_rate_hz * f)
  return one(`${formatSi(rate, 'S/s')}`, 'converter.sample_rate_hz', rate)
})

const moreLatches = ({ converter }: Plan): Idea[] =>
  converter.flash !== undefined && converter.architecture === 'flash' && converter.flash.capture_latches < 3
    ? [one(`${converter.flash.capture_latches + 1} capture latches`, 'converter.flash.capture_latches', converter.flash.capture_latches + 1)] : []

const relaxedErrors = ({ converter }: Plan): Idea[] =>
  converter.error_rate < 1e-6 ? [one(`an error rate of ${tidy(converter.error_rate * 1e4)}`, 'converter.error_rate', tidy(converter.error_rate * 1e4))] : []

const higherCommonMode = ({ converter }: Plan, supply: number): Idea[] => [0.65, 0.75].map((part) => tidy(part * supply))
  .filter((level) => level > converter.common_mode_v).map((level) => one(`a common mode of ${formatSi(level, 'V')}`, 'converter.common_mode_v', level))

const trimmed = ({ comparator }: Plan): Idea[] => (comparator.offset_method === 'size' ? [one('trim', 'comparator.offset_method', 'trim')]
  : comparator.trim_bits !== null ? [one('as many trim bits as it takes', 'comparator.trim_bits', null)] : [])

const fewerBits = ({ converter }: Plan): Idea[] => [0.3, 0.6, 1].map((less) => tidy(converter.enob_bits - less)).filter((enob) => enob > 1)
  .map((enob) => one(`${enob} effective bits`, 'converter.enob_bits', enob))

const widerLinearity = ({ converter }: Plan): Idea[] => [1.5, 2].map((f) => ({
  what: `INL and DNL limits of ${tidy(converter.inl_lsb * f)} and ${tidy(converter.dnl_lsb * f)} LSB`,
  set: [{ path: 'converter.inl_lsb', value: tidy(converter.inl_lsb * f) }, { path: 'converter.dnl_lsb', value: tidy(converter.dnl_lsb * f) }],
}))

const scaled = (path: string, value: number, factors: readonly number[], say: (v: number) => string): Idea[] =>
  factors.map((f) => tidy(value * f)).map((v) => one(say(v), path, v))

const largerShare = (plan: Plan, key: 'kick_share' | 'memory_share' | 'dac_load_share', name: string, unit: string): Idea[] =>
  scaled(`budget.${key}`, plan.budget[key], [1.5, 2.5], (v) => `a ${name} of ${v}${unit}`)

function largerCapacitance(plan: Plan): Idea[] {
  const { converter } = plan
  return converter.architecture === 'flash'
    ? scaled('converter.flash.sampling_cap_f', converter.flash!.sampling_cap_f, [2, 4], (v) => `a sampling capacitor of ${formatSi(v, 'F')}`)
    : scaled('converter.sar.unit_cap_f', converter.sar!.unit_cap_f, [2, 4], (v) => `unit capacitors of ${formatSi(v, 'F')}`)
}

function betterElements({ converter }: Plan): Idea[] {
  const flash = converter.architecture === 'flash'
  const path = flash ? 'converter.flash.ladder_sigma' : 'converter.sar.unit_cap_sigma'
  const value = flash ? converter.flash!.ladder_sigma : converter.sar!.unit_cap_sigma
  return [0.5, 0.25].map((f) => tidy(value * f)).map((v) => one(`elements that match to ${formatSi(v * 100, '%')}`, path, v))
}

const lighterLadder = ({ converter }: Plan): Idea[] => (converter.architecture === 'flash'
  ? [0.5, 0.25].map((f) => tidy(converter.flash!.ladder_ohm * f)).map((v) => one(`a ladder of ${formatSi(v, 'Ω')}`, 'converter.flash.ladder_ohm', v)) : [])

const biggerBankShare = ({ converter }: Plan): Idea[] => (converter.architecture === 'flash'
  ? [2].map((f) => tidy(converter.flash!.bank_share * f)).map((v) => one(`a bank share of ${v}`, 'converter.flash.bank_share', v)) : [])

const ideasByCode: Record<string, (plan: Plan, supply: number) => Idea[]> = {
  time_over_limit: (p, supply) => [...moreLanes(p), ...moreLatches(p), ...slower(p), ...higherCommonMode(p, supply), ...relaxedErrors(p)],
  window_negative: (p) => [...moreLanes(p), ...slower(p)],
  latch_too_slow: (p, supply) => [...higherCommonMode(p, supply), ...slower(p)],
  latch_no_regeneration: higherCommonMode,
  noise_over_limit: (p) => [...fewerBits(p), ...largerCapacitance(p), ...slower(p)],
  offset_over_limit: (p) => [...trimmed(p), ...widerLinearity(p), ...fewerBits(p), ...largerCapacitance(p)],
  kickback_over_limit: (p) => [...lighterLadder(p), ...trimmed(p), ...largerShare(p, 'kick_share', 'kickback share', ' LSB'), ...largerCapacitance(p)],
  memory_over_limit: (p) => [...slower(p), ...moreLanes(p), ...largerShare(p, 'memory_share', 'memory share', ' LSB')],
  input_over_limit: (p) => [...trimmed(p), ...largerCapacitance(p), ...biggerBankShare(p), ...lighterLadder(p), ...largerShare(p, 'dac_load_share', 'DAC load share', '')],
  budget_exhausted: (p) => [...fewerBits(p), ...largerCapacitance(p), ...betterElements(p)],
  ladder_exhausts_offset: (p) => [...betterElements(p), ...widerLinearity(p)],
  dac_mismatch_yield: (p) => [...betterElements(p), ...widerLinearity(p)],
  trim_range: (p) => [...fewerBits(p), ...widerLinearity(p)],
}

const wanted = 3
/** Latches sized at one condition and common mode, over all tries; plans refused by the brief alone cost nothing. */
const mostWork = 32
const mostChanges = 4
/** How many of the best incomplete changes are built upon. */
const keptOpen = 2
const ideasAStep = 7

/** Puts a value at a dotted path of a copy of the plan. */
function withValue(plan: Plan, path: string, value: unknown): Plan {
  const [key, ...rest] = path.split('.')
  const record = plan as unknown as Record<string, unknown>
  return { ...record, [key]: rest.length === 0 ? value : withValue(record[key] as Plan, rest.join('.'), value) } as unknown as Plan
}

export const applied = (plan: Plan, set: Remedy['set']): Plan => set.reduce((changed, { path, value }) => withValue(changed, path, value), plan)

const both = (a: Idea, b: Idea): Idea => ({ what: a.what === '' ? b.what : `${a.what}, ${b.what}`, set: [...a.set, ...b.set] })
const touchesSame = (a: Idea, b: Idea): boolean => a.set.some(({ path }) => b.set.some((other) => other.path === path))

/** Whether a change holds all of another that is known to do: then it only costs more. */
const contains = (idea: Idea, set: Remedy['set']): boolean => set.every((part) => idea.set.some((own) => own.path === part.path && own.value === part.value))

/** Ideas for the stops of a plan, the first of every stop before the second of any; each once. */
function ideasFor(plan: Plan, codes: readonly string[], supply: number): Idea[] {
  const lists = codes.map((code) => ideasByCode[code]?.(plan, supply) ?? [])
  const longest = Math.max(0, ...lists.map((list) => list.length))
  return distinct(Array.from({ length: longest }, (_, i) => lists.flatMap((list) => list.slice(i, i + 1))).flat())
}

/** Each idea once. */
function distinct(ideas: readonly Idea[]): Idea[] {
  const seen = new Set<string>()
  return ideas.filter(({ set }) => !seen.has(JSON.stringify(set)) && seen.add(JSON.stringify(set)))
}

/** What the search for remedies asks of the planner. */
export interface Replanner {
  /** 0: a latch that meets everything is found; else how far off the plan is. */
  readonly shortfall: (plan: Plan) => number
  readonly replan: (plan: Plan) => Result
  /** The card's supply [V]. */
  readonly supply: number
  /** Conditions and common modes at which one latch is evaluated. */
  readonly effort: number
}

const stopsOf = (result: Result): Finding[] => result.findings.filter((f) => f.severity === 'stop')

/** Part of the allowed error power that the fixed items may take when effective bits are given up for the comparators. */
const fixedPart = 0.7

/** Effective bits, in tenths, at which the fixed items of the budget leave something for the comparators. */
function affordableBits({ budget, plan }: Result): Idea[] {
  const fixed = budget.slice(0, 4).reduce((sum, line) => sum + line.allowed_v2, 0)
  const enob = Math.floor(10 * 0.5 * Math.log2((fixedPart * plan.converter.full_scale_v ** 2) / (12 * fixed))) / 10
  return enob >= 1 ? [one(`${enob} effective bits`, 'converter.enob_bits', enob)] : []
}

/** Stops that smaller devices mend, which trimming allows. */
const trimHelps = new Set(['offset_over_limit', 'input_over_limit', 'kickback_over_limit'])

interface Open { readonly idea: Idea; readonly shortfall: number }

/** One step of the search: each open change with one more idea; the feasible ones are verified by planning them out. */
function widen(
  plan: Plan, open: readonly Idea[], first: readonly Idea[], codes: readonly string[], planner: Replanner, found: Remedy[], tries: { left: number },
): Open[] {
  const next: Open[] = []
  for (const base of open) {
    const more = distinct([...first, ...ideasFor(applied(plan, base.set), codes, planner.supply)]).filter((idea) => !touchesSame(base, idea))
    for (const idea of more.slice(0, base.set.length === 0 && first.length > 0 ? first.length + 2 : ideasAStep)) {
      if (found.length >= wanted || tries.left < 1) return next
      const change = both(base, idea)
      if (found.some((one) => contains(change, one.set))) continue
      const shortfall = planner.shortfall(applied(plan, change.set))
      if (shortfall < unmendable) tries.left--
      if (shortfall > 0) { next.push({ idea: change, shortfall }); continue }
      const result = planner.replan(applied(plan, change.set))
      if (stopsOf(result).length === 0) found.push({ text: `${change.what}: feasible, ${formatSi(result.ledger.power_w, 'W')}`, set: change.set })
    }
  }
  return next
}

/**
 * Changes of the brief that make an infeasible plan feasible, each verified by planning again; attached to every stop.
 * Single changes first; where they do not do, those that come nearest are built upon.
 */
export function withRemedies(result: Result, planner: Replanner): Result {
  const stops = stopsOf(result)
  if (stops.length === 0) return result
  const codes = stops.map((f) => f.code)
  const found: Remedy[] = []
  const tries = { left: mostWork / planner.effort }
  const first = [...(codes.includes('budget_exhausted') ? affordableBits(result) : []), ...(codes.some((code) => trimHelps.has(code)) ? trimmed(result.plan) : [])]
  let open: Idea[] = [{ what: '', set: [] }]
  for (let changes = 0; changes < mostChanges && found.length < 2 && tries.left >= 1; changes++) {
    const reached = widen(result.plan, open, first, codes, planner, found, tries)
    open = reached.sort((a, b) => a.shortfall - b.shortfall).slice(0, keptOpen).map(({ idea }) => idea)
  }
  const remedied = (f: Finding): Finding => (f.severity === 'stop' ? { ...f, remedy: found[0]?.text ?? null, remedies: found } : f)
  return { ...result, findings: result.findings.map(remedied) }
}
