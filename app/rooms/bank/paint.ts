import type { ComparatorEntry } from '../../../main/contract/result'
import { drawnUse, isOver, missesLimit, tightestUse } from '../../state/selection'
import type { Arrangement, Zoom } from './arrange'
import { paintCopper } from './paint-copper'
import { tintOf, type Palette } from './palette'

export interface Scene {
  readonly arrangement: Arrangement
  readonly entries: readonly ComparatorEntry[]
  readonly palette: Palette
  readonly zoom: Zoom
  readonly width: number
  readonly height: number
  /** Index from 0. */
  readonly selected: number
}

interface Box { x: number; y: number; w: number; h: number }

/** How much of a cell is drawn at its size: both, the strokes alone, and where there is no room for them the text, then neither. */
export function detailOf(width: number, height: number): { strokes: boolean; text: boolean } {
  const strokes = width >= 24 && height >= 22
  return { strokes, text: width >= 32 && (height >= 37 || (!strokes && height >= 15)) }
}

const strokeNames = ['time', 'noise', 'offset'] as const
/** A stroke at its limit has this part of its frame; the rest shows by how much it is over. */
const limitHeight = 0.78

/** Paints the whole bank. The context is scaled to CSS pixels already. */
export function paintBank(context: CanvasRenderingContext2D, scene: Scene): void {
  const { arrangement, zoom, width, height } = scene
  context.clearRect(0, 0, width, height)
  paintCopper(context, scene)
  const w = arrangement.cell_width * zoom.scale
  const h = arrangement.cell_height * zoom.scale
  arrangement.cells.forEach((cell, index) => {
    const box = { x: cell.x * zoom.scale + zoom.x, y: cell.y * zoom.scale + zoom.y, w, h }
    const outside = box.x > width || box.y > height || box.x + w < 0 || box.y + h < 0
    if (!outside) paintCell(context, scene, box, scene.entries[index])
  })
  const chosen = arrangement.cells[scene.selected]
  if (chosen) paintOutline(context, scene, { x: chosen.x * zoom.scale + zoom.x, y: chosen.y * zoom.scale + zoom.y, w, h })
}

/** The outline of a cell; over its limit, its upper right corner is cut. */
function cellPath(context: CanvasRenderingContext2D, { x, y, w, h }: Box, notch: number): void {
  const round = Math.min(5, w * 0.12, h * 0.2)
  context.beginPath()
  context.moveTo(x + round, y)
  if (notch > 0) {
    context.lineTo(x + w - notch, y)
    context.lineTo(x + w, y + notch)
  } else context.arcTo(x + w, y, x + w, y + h, round)
  context.arcTo(x + w, y + h, x, y + h, round)
  context.arcTo(x, y + h, x, y, round)
  context.arcTo(x, y, x + w, y, round)
  context.closePath()
}

function paintCell(context: CanvasRenderingContext2D, scene: Scene, box: Box, entry: ComparatorEntry): void {
  const { palette } = scene
  const over = missesLimit(entry)
  const notch = over ? Math.max(3, Math.min(12, box.w * 0.3, box.h * 0.4)) : 0
  const tint = tintOf(tightestUse(entry))
  cellPath(context, box, notch)
  context.fillStyle = entry.tightest === null ? palette.plate : palette.tints[tint]
  context.fill()
  context.lineWidth = over ? Math.min(1.5, box.w * 0.1) : 1
  context.strokeStyle = over ? palette.over : palette.edge
  if (over || box.w > 16) context.stroke()
  if (over) paintNotch(context, palette, box, notch)
  const detail = detailOf(box.w, box.h)
  const head = detail.text ? Math.min(18, Math.max(15, box.h * 0.28)) : 3
  if (detail.strokes) paintStrokes(context, palette, frameOf(box, head), entry)
  if (detail.text) {
    const color = tint === palette.tints.length - 1 ? palette.tint_ink_last : palette.tint_ink
    paintText(context, scene, box, detail.strokes ? head : box.h, entry.tightest === null ? palette.muted : color, entry)
  }
}

function paintNotch(context: CanvasRenderingContext2D, palette: Palette, { x, y, w }: Box, notch: number): void {
  context.beginPath()
  context.moveTo(x + w - notch + 1.5, y - 0.75)
  context.lineTo(x + w + 0.75, y - 0.75)
  context.lineTo(x + w + 0.75, y + notch - 1.5)
  context.closePath()
  context.fillStyle = palette.over
  context.fill()
}

function frameOf({ x, y, w, h }: Box, head: number): Box {
  const edge = w < 40 ? 2 : 2.5
  return { x: x + edge, y: y + head, w: w - 2 * edge, h: h - head - edge }
}

function paintStrokes(context: CanvasRenderingContext2D, palette: Palette, frame: Box, entry: ComparatorEntry): void {
  context.fillStyle = palette.plate
  context.beginPath()
  context.roundRect(frame.x, frame.y, frame.w, frame.h, 3)
  context.fill()
  const thick = Math.min(12, Math.max(3, frame.w * 0.13))
  const pitch = Math.min(frame.w / 3.2, thick * 2.1)
  strokeNames.forEach((name, place) => {
    const use = drawnUse(entry, name)
    const centre = frame.x + frame.w / 2 + (place - 1) * pitch
    if (use === null) return paintUnknown(context, palette, centre, frame, thick)
    const tall = Math.min(frame.h - 1, Math.max(1.5, use * limitHeight * frame.h))
    context.fillStyle = palette.strokes[place]
    context.fillRect(centre - thick / 2, frame.y + frame.h - tall, thick, tall)
    if (isOver(use)) {
      context.fillStyle = palette.over
      context.fillRect(centre - thick / 2, frame.y + frame.h - tall, thick, Math.min(tall, Math.max(1.5, tall - limitHeight * frame.h)))
    }
  })
  paintLimit(context, palette, frame)
}

function paintLimit(context: CanvasRenderingContext2D, palette: Palette, frame: Box): void {
  const y = Math.round(frame.y + frame.h * (1 - limitHeight)) + 0.5
  context.strokeStyle = palette.ink
  context.lineWidth = 1
  context.setLineDash([2, 2])
  context.beginPath()
  context.moveTo(frame.x + 2, y)
  context.lineTo(frame.x + frame.w - 2, y)
  context.stroke()
  context.setLineDash([])
}

/** Where there is nothing to draw: a hollow foot. */
function paintUnknown(context: CanvasRenderingContext2D, palette: Palette, centre: number, frame: Box, thick: number): void {
  context.strokeStyle = palette.muted
  context.lineWidth = 1
  context.strokeRect(centre - thick / 2 + 0.5, frame.y + frame.h - 4.5, thick - 1, 4)
}

function paintText(context: CanvasRenderingContext2D, scene: Scene, box: Box, head: number, color: string, entry: ComparatorEntry): void {
  context.font = `400 12px ${scene.palette.figures}`
  context.textBaseline = 'middle'
  context.fillStyle = color
  const text = String(entry.cycle ?? entry.index)
  const roomy = box.w >= 48
  context.textAlign = roomy ? 'left' : 'center'
  context.fillText(text, roomy ? box.x + 5 : box.x + box.w / 2, box.y + head / 2 + 0.5)
}

function paintOutline(context: CanvasRenderingContext2D, { palette }: Scene, { x, y, w, h }: Box): void {
  const gap = w > 20 ? 3 : 2
  for (const [color, thick] of [[palette.paper, 5], [palette.ink, 2]] as const) {
    context.beginPath()
    context.roundRect(x - gap, y - gap, w + 2 * gap, h + 2 * gap, Math.min(8, w * 0.2 + gap))
    context.strokeStyle = color
    context.lineWidth = thick
    context.stroke()
  }
}
