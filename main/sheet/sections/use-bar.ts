import type { CanvasElement } from 'pdfmake/interfaces'
import { ink } from '../theme'

const full = 1.2

/** How much of a limit is used: a stroke over its track, the limit a tick. Clipped beyond 1.2 of the limit. */
export function useBar(use: number | null, width: number, color: string): CanvasElement[] {
  const limit = width / full
  const track: CanvasElement = { type: 'line', x1: 0, y1: 1, x2: width, y2: 1, lineWidth: 0.5, lineColor: ink.rule }
  const tick: CanvasElement = { type: 'line', x1: limit, y1: -0.6, x2: limit, y2: 2.6, lineWidth: 0.6, lineColor: ink.text }
  if (use === null || use <= 0) return [track, tick]
  return [track, { type: 'rect', x: 0, y: 0, w: Math.min(use, full) * limit, h: 2, color: use > 1 ? ink.over : color }, tick]
}
