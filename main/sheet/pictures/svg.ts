import type { Voice } from '../faces'
import { escape } from '../typeset'
import { ink } from '../theme'

/** A picture of so many points, drawn in points. */
export interface Picture {
  readonly width: number
  readonly height: number
  readonly marks: readonly string[]
}

type Attributes = Readonly<Record<string, string | number>>

const round = (value: string | number): string => (typeof value === 'number' ? String(Math.round(value * 100) / 100) : value)

function element(name: string, attributes: Attributes): string {
  return `<${name} ${Object.entries(attributes).map(([key, value]) => `${key}="${round(value)}"`).join(' ')}/>`
}

export const rect = (x: number, y: number, width: number, height: number, fill: string, more: Attributes = {}): string =>
  element('rect', { x, y, width: Math.max(0, width), height: Math.max(0, height), fill, ...more })

export const line = (x1: number, y1: number, x2: number, y2: number, stroke: string, more: Attributes = {}): string =>
  element('line', { x1, y1, x2, y2, stroke, 'stroke-width': 0.6, ...more })

export const path = (d: string, more: Attributes): string => element('path', { fill: 'none', d, ...more })

/** Text of a picture; `typeset` finds its fonts. */
export function label(x: number, y: number, text: string, more: Attributes & { voice?: Voice; anchor?: 'start' | 'middle' | 'end' } = {}): string {
  const { voice = 'words', anchor = 'start', 'font-size': size = 7, ...rest } = more
  const attributes = { 'font-size': size, x, y, fill: ink.muted, 'text-anchor': anchor, ...rest }
  const written = Object.entries(attributes).map(([key, value]) => `${key}="${round(value)}"`).join(' ')
  return `<text data-voice="${voice}" ${written}>${escape(text)}</text>`
}

/** A corner cut off at the top right: over the limit, by shape. */
export const notch = (right: number, top: number, side: number): string =>
  path(`M${round(right - side)},${round(top)}L${round(right)},${round(top)}L${round(right)},${round(top + side)}Z`, { fill: ink.over })

export const svgOf = ({ width, height, marks }: Picture): string =>
  `<svg xmlns="http://www.w3.org/2000/svg" width="${round(width)}" height="${round(height)}" viewBox="0 0 ${round(width)} ${round(height)}">${marks.join('')}</svg>`
