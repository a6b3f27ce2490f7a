import { scaleLinear } from 'd3-scale'
import { stack as stackShape } from 'd3-shape'
import type { BudgetLine } from '../../contract/result'
import { dash, plain } from '../format'
import { ink } from '../theme'
import { label, line, notch, rect, type Picture } from './svg'

/** Each item's name and colour: what costs time, what is noise, what shifts thresholds. */
export const budgetItems: Record<BudgetLine['item'], { readonly name: string; readonly color: string }> = {
  quantisation: { name: 'Quantisation', color: ink.muted },
  jitter: { name: 'Aperture jitter', color: ink.time },
  sampling_noise: { name: 'Sampling noise', color: ink.noise },
  reference: { name: 'Reference elements', color: ink.offset },
  threshold_spread: { name: 'Threshold spread', color: ink.offset },
  comparator_noise: { name: 'Comparator noise', color: ink.noise },
}

const left = 96
const right = 84
const pitch = 15

/** Where the error power goes: each item used against allowed, and all of them in a row against what is allowed. */
export function budgetPicture(budget: readonly BudgetLine[], allowed: number, width: number): Picture {
  const used = budget.map((item) => item.used_v2 ?? 0)
  const total = used.reduce((sum, value) => sum + value, 0)
  const end = Math.max(allowed, total, ...budget.map((item) => item.allowed_v2)) * 1.02
  const x = scaleLinear([0, end], [left, width - right])
  const bottom = budget.length * pitch
  const marks = [
    line(x(allowed), 0, x(allowed), bottom + 22, ink.text, { 'stroke-dasharray': '2 1.5' }),
    ...budget.flatMap((item, i) => itemMarks(item, i * pitch, x, end, allowed)),
    line(0, bottom + 2, width, bottom + 2, ink.rule),
    ...totalMarks(budget, bottom + 7, x),
    label(0, bottom + 15.4, 'All of it', { 'font-weight': 'bold', fill: ink.text }),
    label(Math.max(x(allowed), x(total)) + 5, bottom + 15.4, budget.some((item) => item.used_v2 === null) ? `${dash} not all reached` : shareOf(total, allowed), { voice: 'figures', fill: total > allowed ? ink.over : ink.text, 'font-weight': 'bold' }),
    ...(total > allowed ? [notch(x(total), bottom + 7, 5)] : []),
    label(x(allowed), bottom + 30, 'allowed', { anchor: 'middle' }),
  ]
  return { width, height: bottom + 34, marks }
}

type Scale = (value: number) => number

function itemMarks(item: BudgetLine, y: number, x: Scale, end: number, allowed: number): string[] {
  const { name, color } = budgetItems[item.item]
  const used = item.used_v2 ?? 0
  const over = item.used_v2 !== null && used > item.allowed_v2 * (1 + 1e-9)
  const granted = Math.min(Math.max(item.allowed_v2, 0), end)
  const text = item.used_v2 === null ? '— not reached' : shareOf(used, allowed)
  return [
    label(0, y + 9.4, name, { fill: ink.text }),
    rect(left, y + 3, x(granted) - left, 8, '#FFFFFF', { stroke: color, 'stroke-width': 0.5 }),
    rect(left, y + 3, Math.max(used > 0 ? 0.6 : 0, x(Math.min(used, end)) - left), 8, color),
    ...(over ? [notch(x(Math.min(used, end)), y + 3, 4)] : []),
    rect(x(Math.max(granted, used)) + 2, y + 3, text.length * 4.2 + 3, 8.4, '#FFFFFF'),
    label(x(Math.max(granted, used)) + 4, y + 9.4, text, { voice: 'figures', fill: over ? ink.over : ink.muted, 'font-size': 6.6 }),
  ]
}

/** The items one after the other, with a thread of white between. */
function totalMarks(budget: readonly BudgetLine[], y: number, x: Scale): string[] {
  const keys = budget.map((item) => item.item)
  const row = Object.fromEntries(budget.map((item) => [item.item, Math.max(0, item.used_v2 ?? 0)]))
  return stackShape<Record<string, number>>().keys(keys)([row]).map((layer, i) => {
    const [from, to] = layer[0]
    return rect(x(from), y, x(to) - x(from), 11, budgetItems[keys[i]].color, { stroke: '#FFFFFF', 'stroke-width': 0.6 })
  })
}

const shareOf = (value: number, allowed: number): string => `${plain((100 * value) / allowed, 3)} % of allowed`
