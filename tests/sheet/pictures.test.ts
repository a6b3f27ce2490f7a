import { describe, expect, it } from 'vitest'
import { bankPicture } from '../../main/sheet/pictures/bank-picture'
import { budgetPicture } from '../../main/sheet/pictures/budget-picture'
import { latchPicture } from '../../main/sheet/pictures/latch-picture'
import { stripPicture } from '../../main/sheet/pictures/strip-picture'
import { svgOf, type Picture } from '../../main/sheet/pictures/svg'
import { ink } from '../../main/sheet/theme'
import { largeFlash, stoppedFlash, tenCycleSar, trimmedFlash } from './fixture'

const width = 511
const cellsOf = (picture: Picture): number => picture.marks.filter((mark) => mark.startsWith('<rect') && mark.includes('stroke-width')).length
const notchesOf = (picture: Picture): number => picture.marks.filter((mark) => mark.startsWith('<path') && mark.includes(`fill="${ink.over}"`)).length
const within = (picture: Picture): boolean =>
  picture.marks.every((mark) => [...mark.matchAll(/ (?:x|x1|x2)="(-?[\d.]+)"/g)].every(([, x]) => Number(x) >= 0 && Number(x) <= picture.width))

describe('the bank picture', () => {
  it('has a cell for every comparator, inside its width', () => {
    for (const result of [trimmedFlash(), tenCycleSar(), largeFlash()]) {
      const picture = bankPicture(result.comparators, width)
      expect(cellsOf(picture)).toBe(result.comparators.length)
      expect(within(picture)).toBe(true)
    }
  })

  it('notches what is over its limit, and only that', () => {
    expect(notchesOf(bankPicture(trimmedFlash().comparators, width))).toBe(0)
    expect(notchesOf(bankPicture(stoppedFlash().comparators, width))).toBe(63)
    const [first, ...rest] = trimmedFlash().comparators
    const over = { ...first, use: { ...first.use, offset: 1.04 }, tightest: 'offset' as const }
    expect(notchesOf(bankPicture([over, ...rest], width))).toBe(1)
  })

  it('drops the strokes before it drops the cells', () => {
    const strokes = (picture: Picture): number => picture.marks.filter((mark) => mark.includes(`fill="${ink.time}"`)).length
    expect(strokes(bankPicture(trimmedFlash().comparators, width))).toBe(63)
    expect(strokes(bankPicture(largeFlash().comparators, width))).toBe(0)
  })

  it('threads a flash in one copper line, and each lane of a SAR in its own', () => {
    const threads = (picture: Picture): number => picture.marks.filter((mark) => mark.includes(`stroke="${ink.copper}"`)).length
    expect(threads(bankPicture(trimmedFlash().comparators, width))).toBe(1)
    const sar = tenCycleSar().comparators
    expect(threads(bankPicture([...sar, ...sar.map((entry) => ({ ...entry, lane: 1 }))], width))).toBe(2)
  })
})

describe('the other pictures', () => {
  it('draws the budget to scale', () => {
    const { budget, quantities } = trimmedFlash()
    const picture = budgetPicture(budget, quantities.error_power_allowed_v2, width)
    const bars = picture.marks.filter((mark) => mark.includes('height="8"') && !mark.includes('stroke=')).map((mark) => Number(mark.match(/width="([\d.]+)"/)?.[1]))
    expect(bars).toHaveLength(6)
    expect(bars[4] / bars[0]).toBeCloseTo(0.21 / 0.43, 2)
  })

  it('marks a budget that is overspent', () => {
    const { budget, quantities } = trimmedFlash()
    const over = budget.map((item) => ({ ...item, used_v2: (item.used_v2 ?? 0) * 2 }))
    expect(notchesOf(budgetPicture(over, quantities.error_power_allowed_v2, width))).toBeGreaterThan(0)
    expect(notchesOf(budgetPicture(budget, quantities.error_power_allowed_v2, width))).toBe(0)
  })

  it('leaves a gap in a line where nothing is known', () => {
    const picture = stripPicture({ lines: [{ name: 'limit', values: [1e-3, null, 2e-3], color: ink.text }], unit: 'V', ends: ['1', '3'], along: 'cycle' }, width, 100)
    expect(picture.marks.join('').match(/ d="(M[^"]*)"/)?.[1].match(/M/g)).toHaveLength(2)
  })

  it('survives lines that are all zero, or negative', () => {
    for (const values of [[0, 0], [-1e-12, -1e-12]]) {
      const svg = svgOf(stripPicture({ lines: [{ name: 'limit', values, color: ink.text }], unit: 's', ends: ['1', '2'], along: 'cycle' }, width, 100))
      expect(svg).not.toMatch(/NaN|Infinity/)
    }
  })

  it('writes the widths beside the devices', () => {
    const svg = svgOf(latchPicture(trimmedFlash().design.widths, 226))
    for (const text of ['3.62 µm', '1.84 µm', '4.71 µm', '920 nm']) expect(svg).toContain(text)
  })
})
