import type { Content, TableCell } from 'pdfmake/interfaces'
import { formatSi } from '../../contract/units'
import { inScale, scaleOf } from '../columns'
import type { SheetContext } from '../context'
import { dash } from '../format'
import { budgetItems, budgetPicture } from '../pictures/budget-picture'
import { svgOf } from '../pictures/svg'
import { ruled } from '../theme'
import { aside, columnHead, heading, right } from '../words'

/** Where the error power goes, as picture and table, and the converter that comes out. */
export function budget({ result, width }: SheetContext): Content {
  const { quantities, predicted, plan } = result
  const allowed = quantities.error_power_allowed_v2
  const asked = formatSi(plan.converter.enob_bits, 'bit')
  const picture: Content = {
    stack: [
      heading('Error budget', width, `Allowed error power ${formatSi(allowed, 'V²')}, for ${asked} effective. Filled: used, ${powerCorner(result)}. Outline: allowed.`),
      { svg: svgOf(budgetPicture(result.budget, allowed, width)), margin: [0, 2, 0, 8] },
    ],
    unbreakable: true,
  }
  const figures: Content = {
    stack: [
      table(result, allowed),
      ...(result.budget.some((item) => item.used_v2 === null) ? [aside(`${dash}  The latch could not be evaluated: see the findings.`)] : []),
      { columns: predictions(predicted).map(([label, value]) => ({ width: 'auto', stack: [aside(label), right(value, { alignment: 'left' })] })),
        columnGap: 30, margin: [0, 8, 0, 0] },
    ],
    unbreakable: true,
  }
  return [picture, figures]
}

/** The corner that used power and predicted figures belong to. */
function powerCorner({ corners, ledger }: SheetContext['result']): string {
  const corner = corners.find((one) => one.power_w === ledger.power_w)
  return corner === undefined || corners.length === 1 ? `at ${corners[0].name}` : `at ${corner.name}, the corner of the largest power`
}

function table(result: SheetContext['result'], allowed: number): Content {
  const scale = scaleOf([allowed], 'V²')
  const body: TableCell[][] = result.budget.map(({ item, allowed_v2, used_v2 }) => [
    budgetItems[item].name,
    right(inScale(allowed_v2, scale)),
    right(inScale(used_v2, scale)),
    right(rms(allowed_v2)),
    right(used_v2 === null ? dash : rms(used_v2)),
  ])
  const known = result.budget.every((item) => item.used_v2 !== null)
  const total = result.budget.reduce((sum, item) => sum + (item.used_v2 ?? 0), 0)
  const bold = { bold: true }
  const sum: TableCell[] = [
    { text: 'All of it', bold: true }, right(inScale(allowed, scale), bold), right(known ? inScale(total, scale) : dash, bold),
    right(rms(allowed), bold), right(known ? rms(total) : dash, bold),
  ]
  const heads = [columnHead('Item'), ...[`Allowed, ${scale.name}`, `Used, ${scale.name}`, 'Allowed, rms', 'Used, rms'].map((text) => columnHead(text, 'right'))]
  return { table: { headerRows: 1, widths: ['*', 'auto', 'auto', 'auto', 'auto'], body: [heads, ...body, sum] }, layout: { ...ruled, paddingLeft: (i) => (i === 0 ? 0 : 14) } }
}

const rms = (power: number): string => (power < 0 ? dash : formatSi(Math.sqrt(power), 'V'))

function predictions(predicted: SheetContext['result']['predicted']): [string, string][] {
  return [
    ['Predicted effective bits', formatSi(predicted.enob_bits, 'bit')],
    ['Predicted SNDR', formatSi(predicted.sndr_db, 'dB')],
    ['Walden figure, P ÷ (2^ENOB f_s)', predicted.walden_j === null ? dash : `${formatSi(predicted.walden_j, 'J')} per step`],
    ['Schreier figure', formatSi(predicted.schreier_db, 'dB')],
  ]
}
