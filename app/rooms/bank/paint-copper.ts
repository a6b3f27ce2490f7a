import type { Scene } from './paint'

interface Point { x: number; y: number }

/** The copper line: under each row, with a tap to every cell, turning at the ends like the ladder itself. */
export function paintCopper(context: CanvasRenderingContext2D, scene: Scene): void {
  const { arrangement, zoom, palette } = scene
  const rail = (arrangement.pitch_y - arrangement.cell_height) * 0.45
  const taps = arrangement.cells.map((cell): Point => ({
    x: (cell.x + arrangement.cell_width / 2) * zoom.scale + zoom.x,
    y: (cell.y + arrangement.cell_height + rail) * zoom.scale + zoom.y,
  }))
  context.strokeStyle = palette.copper
  context.fillStyle = palette.copper
  context.lineWidth = arrangement.cell_width * zoom.scale < 20 ? 1 : 1.5
  context.lineJoin = 'round'
  const overhang = (arrangement.pitch_x / 2) * zoom.scale
  if (arrangement.kind === 'ladder') paintLadder(context, taps, overhang, (arrangement.pitch_y - arrangement.cell_height) * zoom.scale)
  else paintLanes(context, scene, taps, overhang)
  if (arrangement.cell_width * zoom.scale >= 20) paintTaps(context, taps, rail * zoom.scale)
}

function paintLadder(context: CanvasRenderingContext2D, taps: readonly Point[], overhang: number, gap: number): void {
  const bend = Math.min(6, gap / 2)
  context.beginPath()
  taps.forEach((tap, index) => {
    const last = taps[index - 1]
    if (!last) return context.moveTo(tap.x - overhang * 0.8, tap.y)
    if (last.y === tap.y) return context.lineTo(tap.x, tap.y)
    const outwards = Math.sign(tap.x - (taps[index + 1]?.x ?? tap.x - 1)) || 1
    const edge = tap.x + outwards * overhang
    context.arcTo(edge, last.y, edge, tap.y, bend)
    context.arcTo(edge, tap.y, tap.x, tap.y, bend)
    context.lineTo(tap.x, tap.y)
  })
  const end = taps[taps.length - 1]
  const before = taps[taps.length - 2]
  if (end) context.lineTo(end.x + (before && before.x > end.x ? -1 : 1) * overhang * 0.8, end.y)
  context.stroke()
}

function paintLanes(context: CanvasRenderingContext2D, { arrangement }: Scene, taps: readonly Point[], overhang: number): void {
  for (let row = 0; row < arrangement.rows; row += 1) {
    const own = taps.filter((_tap, index) => arrangement.cells[index].row === row)
    const [first, last] = [own[0], own[own.length - 1]]
    if (!first || !last) continue
    const tip = last.x + overhang
    context.beginPath()
    context.moveTo(first.x - overhang * 0.8, first.y)
    context.lineTo(tip, last.y)
    context.moveTo(tip - 6, last.y - 4)
    context.lineTo(tip, last.y)
    context.lineTo(tip - 6, last.y + 4)
    context.stroke()
  }
}

function paintTaps(context: CanvasRenderingContext2D, taps: readonly Point[], rail: number): void {
  context.beginPath()
  for (const { x, y } of taps) {
    context.moveTo(x, y)
    context.lineTo(x, y - rail)
  }
  context.stroke()
  for (const { x, y } of taps) {
    context.beginPath()
    context.arc(x, y, 2.2, 0, 2 * Math.PI)
    context.fill()
  }
}
