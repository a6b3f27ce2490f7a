import type { Content } from 'pdfmake/interfaces'
import type { Working } from '../../contract/result'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { ink, lineAcross, size } from '../theme'
import { aside, figure, heading } from '../words'

/** How each number came about: the formula, the same with numbers in, the result and its source. */
export function workings({ result, width }: SheetContext): Content {
  const [first, ...rest] = result.workings.map((working) => one(working, width))
  if (first === undefined) return { stack: [heading('Workings', width), 'None were handed over with this result.'], unbreakable: true }
  return [{ stack: [heading('Workings', width, 'Those common to the bank, and those of its tightest comparator.'), first], unbreakable: true }, ...rest]
}

function one(working: Working, width: number): Content {
  const value = formatSi(working.value, working.unit)
  const formula = { font: 'figures', fontSize: size.small }
  return {
    stack: [
      { columns: [{ width: '*', text: working.title, bold: true }, figure(value, { width: 'auto', bold: true })], columnGap: 12 },
      { text: working.formula, ...formula, margin: [0, 2, 0, 0] },
      { text: working.numbers, ...formula, color: ink.muted, margin: [0, 1, 0, 0] },
      aside(working.source, { margin: [0, 1, 0, 3] }),
      lineAcross(width, ink.rule, 0.5, 4),
    ],
    unbreakable: true,
  }
}
