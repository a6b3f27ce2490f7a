import { scaleLinear } from 'd3-scale'
import { curveStepAfter, line as lineShape } from 'd3-shape'
import { formatSi } from '../../contract/units'
import { spread } from '../format'
import { ink } from '../theme'
import { label, line, path, type Picture } from './svg'

/** A line of a strip: one value for each place along the bank. */
export interface StripLine {
  readonly name: string
  readonly values: readonly (number | null)[]
  readonly color: string
  readonly dash?: string
}

export interface Strip {
  readonly lines: readonly StripLine[]
  readonly unit: string
  /** What the first and the last place are called, and what runs along the bottom. */
  readonly ends: readonly [string, string]
  readonly along: string
}

const left = 44
const right = 96
const top = 8
const bottom = 22

/** Limits and what is reached, step by step along the ladder or from cycle to cycle. */
export function stripPicture(strip: Strip, width: number, height: number): Picture {
  const count = strip.lines[0].values.length
  const known = strip.lines.flatMap((one) => one.values.filter((value) => value !== null))
  const x = scaleLinear([0, count], [left, width - right])
  const y = scaleLinear(domainOf(known), [height - bottom, top]).nice(4)
  const ticks = y.ticks(4)
  const grid = ticks.flatMap((tick) => [
    line(left, y(tick), width - right, y(tick), ink.rule, { 'stroke-width': 0.5 }),
    label(left - 5, y(tick) + 2.3, formatSi(tick, strip.unit), { voice: 'figures', anchor: 'end', 'font-size': 6.4 }),
  ])
  const base = height - bottom
  const ladder = line(left, base, width - right, base, ink.copper, { 'stroke-width': 1 })
  const curves = strip.lines.map((one) => stepped(one, x, y))
  const texts = [...names(strip, y, width), ...foot(strip, width, height, y.domain()[0] > 0)]
  return { width, height, marks: [...grid, ladder, ...curves, ...texts] }
}

/** From zero, or closer where all values lie close together; then the axis says so by its numbers. */
function domainOf(values: readonly number[]): [number, number] {
  const [low, high] = spread(values)
  if (low > 0.8 * high) return [low - Math.max(0.4 * (high - low), 0.04 * high), high + Math.max(0.2 * (high - low), 0.02 * high)]
  return [Math.min(0, low), Math.max(0, high) || 1]
}

type Scale = (value: number) => number

function stepped({ values, color, dash }: StripLine, x: Scale, y: Scale): string {
  const points = [...values, values.at(-1) ?? null].map((value, i): [number, number | null] => [i, value])
  const shape = lineShape<[number, number | null]>().curve(curveStepAfter)
    .defined(([, value]) => value !== null).x(([i]) => x(i)).y(([, value]) => y(value ?? 0))
  return path(shape(points) ?? '', { stroke: color, 'stroke-width': 1.2, ...(dash ? { 'stroke-dasharray': dash } : {}) })
}

/** Each line's name beside its end, moved apart where they would touch. */
function names(strip: Strip, y: Scale, width: number): string[] {
  const placed = strip.lines.flatMap((one) => {
    const last = one.values.filter((value) => value !== null).at(-1)
    return last === undefined ? [] : [{ one, at: y(last) }]
  }).sort((a, b) => a.at - b.at)
  placed.forEach((name, i) => { if (i > 0) name.at = Math.max(name.at, placed[i - 1].at + 9) })
  return placed.map(({ one, at }) => label(width - right + 6, at + 2.3, one.name, { fill: one.color, 'font-weight': 'bold' }))
}

function foot({ ends, along }: Strip, width: number, height: number, zoomed: boolean): string[] {
  const y = height - bottom + 12
  const text = zoomed ? `${along} · the axis does not start at zero` : along
  return [
    label(left, y, ends[0], { voice: 'figures', 'font-size': 6.4 }),
    label((left + width - right) / 2, y, text, { anchor: 'middle' }),
    label(width - right, y, ends[1], { voice: 'figures', anchor: 'end', 'font-size': 6.4 }),
  ]
}
