/** Where the cells of a bank stand. Pure geometry, in CSS pixels. */
export interface Cell { readonly x: number; readonly y: number; readonly row: number; readonly column: number }

export interface Arrangement {
  readonly kind: 'ladder' | 'lanes'
  readonly rows: number
  readonly columns: number
  readonly cell_width: number
  readonly cell_height: number
  readonly pitch_x: number
  readonly pitch_y: number
  /** In the order of the comparators. */
  readonly cells: readonly Cell[]
}

interface Shape { width: number; height: number; pitch_x: number; pitch_y: number }

/** Room for the outline of a selected cell at the edge. */
const margin_px = 7

const clamp = (value: number, low: number, high: number) => Math.min(high, Math.max(low, value))
const aspects = { ladder: [0.8, 1.75], lanes: [0.17, 1.6] } as const

function shapeOf(kind: Arrangement['kind'], columns: number, rows: number, width: number, height: number): Shape {
  const [narrowest, widest] = aspects[kind]
  const gap = (pitch: number, part: number, most: number) => clamp(pitch * part, Math.min(1, pitch / 4), most)
  const room_x = width / columns
  const room_y = height / rows
  const gap_x = gap(room_x, 0.14, 14)
  const gap_y = gap(room_y, 0.26, 22)
  const high = room_y - gap_y
  const wide = Math.min(room_x - gap_x, high * widest)
  const cell_height = Math.min(high, wide / narrowest)
  return { width: wide, height: cell_height, pitch_x: wide + gap_x, pitch_y: cell_height + gap_y }
}

/** The number of columns that gives the largest cells, leaving few places of the last row empty. */
function bestColumns(count: number, width: number, height: number): number {
  let best = { columns: 1, score: -1 }
  for (let columns = 1; columns <= count; columns += 1) {
    const rows = Math.ceil(count / columns)
    const shape = shapeOf('ladder', columns, rows, width, height)
    const score = shape.width * shape.height * (count / (rows * columns)) ** 0.5
    if (score > best.score) best = { columns, score }
  }
  return best.columns
}

/** Flash: along the ladder in a serpentine, the lowest threshold at the bottom left. */
export function arrangeLadder(count: number, width: number, height: number): Arrangement {
  const columns = bestColumns(count, width, height)
  const rows = Math.ceil(count / columns)
  return place('ladder', count, columns, rows, width, height, (index) => {
    const up = Math.floor(index / columns)
    const along = index % columns
    return { row: rows - 1 - up, column: up % 2 === 0 ? along : columns - 1 - along }
  })
}

/** SAR: a row for each lane, its cycles from left to right. */
export function arrangeLanes(lanes: readonly { lane: number; cycle: number }[], width: number, height: number): Arrangement {
  const rows = Math.max(...lanes.map(({ lane }) => lane)) + 1
  const columns = Math.max(...lanes.map(({ cycle }) => cycle))
  return place('lanes', lanes.length, columns, rows, width, height, (index) => ({ row: lanes[index].lane, column: lanes[index].cycle - 1 }))
}

function place(kind: Arrangement['kind'], count: number, columns: number, rows: number, width: number, height: number,
  at: (index: number) => { row: number; column: number }): Arrangement {
  const shape = shapeOf(kind, columns, rows, width - 2 * margin_px, height - margin_px)
  const left = (width - columns * shape.pitch_x) / 2 + (shape.pitch_x - shape.width) / 2
  const top = (height - rows * shape.pitch_y) / 2 + (shape.pitch_y - shape.height) / 4
  const cells = Array.from({ length: count }, (_none, index): Cell => {
    const { row, column } = at(index)
    return { row, column, x: left + column * shape.pitch_x, y: top + row * shape.pitch_y }
  })
  return { kind, rows, columns, cells, cell_width: shape.width, cell_height: shape.height, pitch_x: shape.pitch_x, pitch_y: shape.pitch_y }
}

export interface Zoom { readonly scale: number; readonly x: number; readonly y: number }

/** Index (from 0) of the cell at a point of the screen, or null. */
export function cellAt({ cells, cell_width, cell_height }: Arrangement, zoom: Zoom, x: number, y: number): number | null {
  const [px, py] = [(x - zoom.x) / zoom.scale, (y - zoom.y) / zoom.scale]
  const found = cells.findIndex((cell) => px >= cell.x && px <= cell.x + cell_width && py >= cell.y && py <= cell.y + cell_height)
  return found < 0 ? null : found
}

/** Index (from 0) of the cell one step away in the picture; the same when there is none. */
export function neighbour({ cells }: Arrangement, from: number, right: number, down: number): number {
  const { row, column } = cells[from]
  const found = cells.findIndex((cell) => cell.row === row + down && cell.column === column + right)
  return found < 0 ? from : found
}

/** Keeps a picture of a size within its frame. */
export function heldWithin(zoom: Zoom, width: number, height: number): Zoom {
  return {
    scale: zoom.scale,
    x: clamp(zoom.x, width * (1 - zoom.scale), 0),
    y: clamp(zoom.y, height * (1 - zoom.scale), 0),
  }
}

/** The same zoom, moved as little as needed to have a cell in sight. */
export function towards(arrangement: Arrangement, zoom: Zoom, index: number, width: number, height: number): Zoom {
  const cell = arrangement.cells[index]
  if (!cell || zoom.scale === 1) return zoom
  const margin = 12
  const inside = (at: number, size: number, offset: number, frame: number) =>
    clamp(offset, margin - at * zoom.scale, frame - margin - (at + size) * zoom.scale)
  const moved = {
    scale: zoom.scale,
    x: inside(cell.x, arrangement.cell_width, zoom.x, width),
    y: inside(cell.y, arrangement.cell_height, zoom.y, height),
  }
  return heldWithin(moved, width, height)
}
