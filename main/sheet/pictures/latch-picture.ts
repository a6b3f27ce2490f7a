import type { Design } from '../../contract/result'
import { formatSi } from '../../contract/units'
import { ink } from '../theme'
import { label, line, path, type Picture } from './svg'

/** A device as it is drawn: where its channel stands, and to which side its gate looks. */
interface Device { readonly x: number; readonly y: number; readonly kind: 'n' | 'p'; readonly gate: -1 | 1 }

const half = 9
const thin = { 'stroke-width': 0.8 }
const wire = (x1: number, y1: number, x2: number, y2: number): string => line(x1, y1, x2, y2, ink.text, thin)
const dot = (x: number, y: number): string => path(`M${x - 1.4},${y}a1.4,1.4 0 1 0 2.8,0a1.4,1.4 0 1 0 -2.8,0Z`, { fill: ink.text })

/** Channel, gate plate and gate lead of a transistor; the gate of a p device carries a ring. */
function device({ x, y, kind, gate }: Device): string[] {
  const channel = x + gate * 5
  const plate = x + gate * 7.4
  const lead = kind === 'p' ? plate + gate * 3.2 : plate
  const ring = kind === 'p' ? [path(`M${plate},${y}a1.6,1.6 0 1 0 ${gate * 3.2},0a1.6,1.6 0 1 0 ${gate * -3.2},0Z`, { stroke: ink.text, ...thin })] : []
  return [
    wire(x, y - half, x, y - 5), wire(x, y - 5, channel, y - 5), wire(channel, y - 5, channel, y + 5), wire(channel, y + 5, x, y + 5),
    wire(x, y + 5, x, y + half), wire(plate, y - 5, plate, y + 5), ...ring, wire(lead, y, x + gate * 14, y),
  ]
}

/** The strong-arm latch with the widths that were reached, drawn once and labelled. */
export function latchPicture(widths: Design['widths'], width: number): Picture {
  const middle = width / 2
  const [a, b] = [middle - 34, middle + 34]
  const [outer, further] = [a - 34, b + 34]
  const rows = { vdd: 12, p: 34, out: 58, n: 80, x: 100, input: 122, tail: 160, ground: 178 }
  const marks = [
    wire(outer - 14, rows.vdd, further + 14, rows.vdd), label(outer - 14, rows.vdd - 4, 'V_DD'),
    ...device({ x: a, y: rows.p, kind: 'p', gate: 1 }), ...device({ x: b, y: rows.p, kind: 'p', gate: -1 }),
    ...device({ x: a, y: rows.n, kind: 'n', gate: 1 }), ...device({ x: b, y: rows.n, kind: 'n', gate: -1 }),
    ...device({ x: a, y: rows.input, kind: 'n', gate: -1 }), ...device({ x: b, y: rows.input, kind: 'n', gate: 1 }),
    ...device({ x: middle, y: rows.tail, kind: 'n', gate: -1 }),
    ...columns([a, b], rows), ...crossing(a, b, rows), ...resets(outer, further, a, b, rows), ...foot(middle, a, b, rows),
    ...values(widths, { a, b, middle, outer, further }, rows),
  ]
  return { width, height: rows.ground + 14, marks }
}

type Rows = Record<'vdd' | 'p' | 'out' | 'n' | 'x' | 'input' | 'tail' | 'ground', number>
type Places = Record<'a' | 'b' | 'middle' | 'outer' | 'further', number>

function columns(xs: readonly number[], rows: Rows): string[] {
  return xs.flatMap((x) => [
    wire(x, rows.vdd, x, rows.p - half), wire(x, rows.p + half, x, rows.n - half), wire(x, rows.n + half, x, rows.input - half),
    dot(x, rows.out), dot(x, rows.x),
  ])
}

/** Each side's gates to the other side's output. */
function crossing(a: number, b: number, rows: Rows): string[] {
  const [ga, gb] = [a + 14, b - 14]
  return [
    wire(ga, rows.p, ga, rows.n), wire(gb, rows.p, gb, rows.n), wire(ga, rows.out + 5, b, rows.out + 5), wire(gb, rows.out - 5, a, rows.out - 5),
    dot(ga, rows.out + 5), dot(gb, rows.out - 5), dot(b, rows.out + 5), dot(a, rows.out - 5),
  ]
}

/** Reset devices: from the supply to the outputs, and on to the drains of the input pair. */
function resets(outer: number, further: number, a: number, b: number, rows: Rows): string[] {
  return ([[outer, a, -1], [further, b, 1]] as const).flatMap(([x, inner, gate]) => [
    ...device({ x, y: rows.p, kind: 'p', gate }), wire(x, rows.vdd, x, rows.p - half), wire(x, rows.p + half, x, rows.out), wire(x, rows.out, inner, rows.out),
    ...device({ x, y: rows.n, kind: 'p', gate }), wire(x, rows.out, x, rows.n - half), wire(x, rows.n + half, x, rows.x), wire(x, rows.x, inner, rows.x),
  ])
}

function foot(middle: number, a: number, b: number, rows: Rows): string[] {
  const joint = rows.input + half + 8
  return [
    wire(a, rows.input + half, a, joint), wire(b, rows.input + half, b, joint), wire(a, joint, b, joint), dot(middle, joint),
    wire(middle, joint, middle, rows.tail - half), wire(middle, rows.tail + half, middle, rows.ground),
    line(middle - 8, rows.ground, middle + 8, rows.ground, ink.text, { 'stroke-width': 1.4 }),
  ]
}

function values(widths: Design['widths'], { a, b, middle, outer, further }: Places, rows: Rows): string[] {
  const show = (x: number, y: number, value: number, anchor: 'start' | 'middle' | 'end'): string =>
    label(x, y, formatSi(value, 'm'), { voice: 'figures', anchor, fill: ink.copper, 'font-size': 6.8, 'font-weight': 'bold' })
  return [
    show(middle, rows.p + 2.4, widths.cross_p_m, 'middle'), show(middle, rows.n + 2.4, widths.cross_n_m, 'middle'),
    show(a + 5, rows.input + 2.4, widths.input_m, 'start'), show(middle + 6, rows.tail + 2.4, widths.tail_m, 'start'),
    show(further + 6, rows.out + 2.4, widths.reset_m, 'start'),
    label(a - 16, rows.input + 2.4, 'in +', { anchor: 'end' }), label(b + 16, rows.input + 2.4, 'in −'),
    label(middle - 16, rows.tail + 2.4, 'clock', { anchor: 'end' }), label(outer - 16, rows.p + 2.4, 'clock', { anchor: 'end' }),
    label(outer - 16, rows.n + 2.4, 'clock', { anchor: 'end' }), label(further + 16, rows.p + 2.4, 'clock'), label(further + 16, rows.n + 2.4, 'clock'),
    label(a - 4, rows.out - 4, 'O', { anchor: 'end' }), label(b + 4, rows.out - 4, 'O'), label(a - 4, rows.x - 3, 'X', { anchor: 'end' }), label(b + 4, rows.x - 3, 'X'),
  ]
}
