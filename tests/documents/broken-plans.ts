import type { ProblemCode } from '../../main/contract/errors'
import { choices, type Choice } from '../../main/contract/choices'
import { quantities, type Quantity } from '../../main/contract/quantities'
import { builtInCards } from '../../main/documents/cards'

/** A plan file with faults that are known: each has to be named by its path and kind. */
export interface BrokenPlan {
  readonly bytes: Uint8Array
  readonly faults: readonly { path: string; code: ProblemCode }[]
}

type Draw = () => number
type Fault = (plan: Record<string, unknown>, draw: Draw) => { path: string; code: ProblemCode }

/** Counted random numbers in [0, 1): the same seed, the same plans. */
function drawFrom(seed: number): Draw {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)) ^ mixed
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
}

const pick = <T>(list: readonly T[], draw: Draw): T => list[Math.floor(draw() * list.length)]

function put(plan: Record<string, unknown>, path: string, value: unknown): void {
  const keys = path.split('.')
  const last = keys.pop() ?? ''
  const owner = keys.reduce<Record<string, unknown>>((object, key) => (object[key] ??= {}) as Record<string, unknown>, plan)
  owner[last] = value
}

const numeric = Object.entries<Quantity>(quantities).filter(([path]) => !path.startsWith('comparator.widths.'))
const options = Object.entries(choices) as [string, Choice][]

const faults: readonly Fault[] = [
  (plan, draw) => {
    const [path, { max }] = pick(numeric, draw)
    put(plan, path, max * 2 + 1)
    return { path, code: 'out_of_range' }
  },
  (plan, draw) => {
    const [path, { min }] = pick(numeric, draw)
    put(plan, path, -Math.abs(min) * 3 - 1)
    return { path, code: 'out_of_range' }
  },
  (plan, draw) => {
    const [path] = pick(numeric, draw)
    put(plan, path, pick<unknown>(['12 nm', '', true, [], {}, [1], 'x'.repeat(500)], draw))
    return { path, code: 'wrong_type' }
  },
  (plan, draw) => {
    const [path] = pick(numeric.filter(([, quantity]) => quantity.nullMeans === undefined), draw)
    put(plan, path, null)
    return { path, code: 'wrong_type' }
  },
  (plan, draw) => {
    const [path] = pick(numeric.filter(([, quantity]) => quantity.integer), draw)
    put(plan, path, 4.5)
    return { path, code: 'wrong_type' }
  },
  (plan, draw) => {
    const [known] = pick(numeric, draw)
    const path = `${known.slice(0, -3)}${pick(['', 'x', '_hz', '_uF', '__'], draw)}q`
    put(plan, path, 1)
    return { path, code: 'unknown_key' }
  },
  (plan, draw) => {
    const path = pick(['__proto__x', 'constructor', 'toString', 'Schema', 'brief', 'converter.Architecture', 'budget.share', 'comparator.size'], draw)
    put(plan, path, pick<unknown>([1, null, { a: 1 }], draw))
    return { path, code: 'unknown_key' }
  },
  (plan, draw) => {
    const [path, choice] = pick(options.filter(([path]) => path !== 'converter.architecture' && path !== 'comparator.sizing'), draw)
    put(plan, path, pick([...Object.keys(choice.options).map((option) => `${option}x`), 'auto-matic', ''], draw))
    return { path, code: 'not_a_choice' }
  },
  (plan, draw) => {
    const active = (plan['converter'] as Record<string, unknown>)['architecture'] === 'sar' ? 'converter.flash.' : 'converter.sar.'
    const [path, choice] = pick(options.filter(([path, { later }]) => later && !path.startsWith(active)), draw)
    put(plan, path, choice.later?.at(0))
    return { path, code: 'not_available_yet' }
  },
  (plan) => {
    put(plan, 'comparator.sizing', 'manual')
    return { path: 'comparator.widths', code: 'missing' }
  },
  (plan, draw) => {
    put(plan, 'process.card', pick(['generic', 'generic-29', '28nm', 'x'.repeat(80)], draw))
    return { path: 'process.card', code: 'unknown_card' }
  },
  (plan, draw) => {
    const key = pick(['vdd_v', 'l_min_m', 'title', 'n', 'corner', 'cap'] as const, draw)
    put(plan, 'process.card', { ...pick(builtInCards, draw), [key]: undefined })
    return { path: `process.card.${key}`, code: 'missing' }
  },
  (plan, draw) => {
    put(plan, 'overrides', [{ item: 'power.clock', value: 1e-3 }, { item: pick(['power', 'area.encodr', ''], draw), value: 1 }])
    return { path: 'overrides.1.item', code: 'not_a_choice' }
  },
  (plan, draw) => {
    put(plan, 'corners', pick<unknown>([['typical', 'slowest'], ['typical', 5]], draw))
    return { path: 'corners.1', code: 'not_a_choice' }
  },
  (plan, draw) => {
    put(plan, 'title', pick<unknown>([5, null, ['a'], {}], draw))
    return { path: 'title', code: 'wrong_type' }
  },
]

function sound(draw: Draw): Record<string, unknown> {
  const architecture = pick(['flash', 'sar'], draw)
  return {
    schema: 'latchwright.plan/1', title: 'A broken plan',
    converter: { architecture, resolution_bits: architecture === 'flash' ? 6 : 10, sample_rate_hz: 1e8 },
    comparator: {}, budget: {}, corners: ['typical'], process: { card: 'generic-28' }, overrides: [],
  }
}

/** Faults of the text itself; they hide everything behind them, so each stands alone. */
const textFaults: readonly ((text: string, draw: Draw) => BrokenPlan)[] = [
  (text, draw) => whole(text.slice(0, 1 + Math.floor(draw() * (text.length - 2))), 'not_json'),
  (text) => whole(text.replace(/\}$/, ',}'), 'not_json'),
  (text) => whole(text.replace('100000000', 'NaN'), 'not_json'),
  (text) => whole(text.replace('{', '{ // a comment\n'), 'not_json'),
  (text) => whole(text.replaceAll('"', "'"), 'not_json'),
  (_text, draw) => whole('['.repeat(65 + Math.floor(draw() * 10_000)), 'too_deep'),
  (text) => ({ bytes: new Uint8Array(Buffer.from(`\uFEFF${text}`, 'utf16le')), faults: [{ path: '', code: 'not_text' }] }),
  (text) => ({ bytes: new Uint8Array([...Buffer.from(text), 0xc3, 0x28]), faults: [{ path: '', code: 'not_text' }] }),
  (text) => one(text.replace('100000000', '1e999'), 'converter.sample_rate_hz', 'out_of_range'),
  (text) => one(text.replace('"budget":{}', '"budget":{"noise_share":0.5,"noise_share":0.6}'), 'budget.noise_share', 'repeated_key'),
  (text) => one(text.replace('"budget":{}', '"budget":{"__proto__":{"noise_share":2}}'), 'budget.__proto__', 'unknown_key'),
  (text) => one(text.replace('plan/1', 'plan/2'), 'schema', 'newer_than_program'),
]

const one = (text: string, path: string, code: ProblemCode): BrokenPlan => ({ bytes: new TextEncoder().encode(text), faults: [{ path, code }] })
const whole = (text: string, code: ProblemCode): BrokenPlan => one(text, '', code)

function overlaps(path: string, taken: readonly string[]): boolean {
  const card = 'process.card'
  return taken.some((other) => path === other || (path.startsWith(card) && other.startsWith(card)) || path.startsWith(`${other}.`) || other.startsWith(`${path}.`))
}

/** One to three faults of the document that do not hide one another. */
function documentFaults(draw: Draw): BrokenPlan {
  const plan = sound(draw)
  const found: { path: string; code: ProblemCode }[] = []
  const wanted = 1 + Math.floor(draw() * 3)
  for (let attempt = 0; found.length < wanted && attempt < 20; attempt += 1) {
    const trial = structuredClone(plan)
    const fault = pick(faults, draw)(trial, draw)
    if (overlaps(fault.path, found.map((other) => other.path))) continue
    Object.assign(plan, trial)
    found.push(fault)
  }
  return { bytes: new TextEncoder().encode(JSON.stringify(plan)), faults: found }
}

/** So many broken plans, the same for the same seed. */
export function brokenPlans(count: number, seed: number): BrokenPlan[] {
  const draw = drawFrom(seed)
  return Array.from({ length: count }, (_, index) => (
    index % 4 === 3 ? pick(textFaults, draw)(JSON.stringify(sound(draw)), draw) : documentFaults(draw)
  ))
}
