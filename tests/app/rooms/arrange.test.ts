import { describe, expect, it } from 'vitest'
import { arrangeLadder, arrangeLanes, cellAt, heldWithin, neighbour, towards } from '../../../app/rooms/bank/arrange'
import { detailOf } from '../../../app/rooms/bank/paint'
import { tintOf } from '../../../app/rooms/bank/palette'

const counts = [3, 7, 15, 31, 63, 127, 255, 511, 1023]
const frames = [[760, 430], [560, 180], [1200, 640], [300, 600]] as const
const whole = { scale: 1, x: 0, y: 0 }

describe('the bank along the ladder', () => {
  it.each(counts.flatMap((count) => frames.map(([width, height]) => [count, width, height] as const)))('%d cells in %d × %d stay apart and inside', (count, width, height) => {
    const bank = arrangeLadder(count, width, height)
    expect(bank.cells).toHaveLength(count)
    expect(new Set(bank.cells.map(({ row, column }) => `${row}/${column}`)).size).toBe(count)
    expect(bank.cell_width).toBeLessThan(bank.pitch_x)
    expect(bank.cell_height).toBeLessThan(bank.pitch_y)
    for (const { x, y } of bank.cells) {
      expect(x).toBeGreaterThanOrEqual(0)
      expect(y).toBeGreaterThanOrEqual(0)
      expect(x + bank.cell_width).toBeLessThanOrEqual(width)
      expect(y + bank.cell_height).toBeLessThanOrEqual(height)
    }
  })

  it('starts at the bottom left and goes on without a jump', () => {
    const { cells, rows } = arrangeLadder(63, 760, 430)
    expect(cells[0]).toMatchObject({ row: rows - 1, column: 0 })
    cells.slice(1).forEach((cell, index) => {
      expect(Math.abs(cell.row - cells[index].row) + Math.abs(cell.column - cells[index].column)).toBe(1)
    })
  })

  it('walks in the directions of the picture and stops at its edges', () => {
    const bank = arrangeLadder(63, 760, 430)
    const up = neighbour(bank, 0, 0, -1)
    expect(bank.cells[up]).toMatchObject({ row: bank.rows - 2, column: 0 })
    expect(neighbour(bank, 0, -1, 0)).toBe(0)
    expect(neighbour(bank, 0, 0, 1)).toBe(0)
  })

  it('finds the cell under a point at any zoom', () => {
    const bank = arrangeLadder(255, 760, 430)
    for (const zoom of [whole, { scale: 3, x: -120, y: -60 }]) {
      const { x, y } = bank.cells[100]
      expect(cellAt(bank, zoom, (x + 1) * zoom.scale + zoom.x, (y + 1) * zoom.scale + zoom.y)).toBe(100)
    }
    expect(cellAt(bank, whole, -5, -5)).toBeNull()
  })

  it('brings a selected cell into sight, and never leaves the frame', () => {
    const bank = arrangeLadder(1023, 760, 430)
    const zoom = towards(bank, { scale: 4, x: 0, y: 0 }, 0, 760, 430)
    const { x, y } = bank.cells[0]
    expect(x * 4 + zoom.x).toBeGreaterThanOrEqual(0)
    expect((y + bank.cell_height) * 4 + zoom.y).toBeLessThanOrEqual(430)
    expect(heldWithin({ scale: 2, x: 500, y: -5000 }, 100, 100)).toEqual({ scale: 2, x: 0, y: -100 })
  })
})

describe('the bank of a SAR', () => {
  it('has a row for each lane and runs from cycle to cycle', () => {
    const lanes = [0, 1].flatMap((lane) => [1, 2, 3, 4].map((cycle) => ({ lane, cycle })))
    const bank = arrangeLanes(lanes, 760, 430)
    expect([bank.rows, bank.columns]).toEqual([2, 4])
    expect(bank.cells[5]).toMatchObject({ row: 1, column: 1 })
  })
})

describe('a cell', () => {
  it('loses the strokes first and then the text as cells get smaller', () => {
    expect(detailOf(70, 50)).toEqual({ strokes: true, text: true })
    expect(detailOf(36, 20)).toEqual({ strokes: false, text: true })
    expect(detailOf(18, 14)).toEqual({ strokes: false, text: false })
  })
  it('has one of six tints', () => {
    expect([0, 0.49, 0.5, 0.65, 0.75, 0.85, 0.95, 1.4, null].map(tintOf)).toEqual([0, 0, 1, 2, 3, 4, 5, 5, 5])
  })
})
