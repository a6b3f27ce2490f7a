import type { Content } from 'pdfmake/interfaces'
import type { SheetContext } from '../context'
import { count, dash, dateOf, useOf } from '../format'
import { formatSi } from '../../contract/units'
import { useMeasures } from '../measures'
import { bare, ink, lineAcross, size } from '../theme'
import { aside, figure } from '../words'

/** Title, revision, author, date, checksum and program version. */
export function titleBlock({ result, options, width }: SheetContext): Content {
  const { title, revision, author } = result.plan
  const fields: [string, Content][] = [
    ['Revision', revision === '' ? dash : revision],
    ['Author', author === '' ? dash : author],
    ['Date', figure(dateOf(options.date), { fontSize: size.body })],
    ['Program', `Latchwright ${options.version}`],
  ]
  return [
    { text: [{ text: 'Comparator bank', color: ink.copper, bold: true }, { text: '  sheet', color: ink.muted }], fontSize: size.body },
    { text: title === '' ? 'Untitled plan' : title, fontSize: size.title, bold: true, margin: [0, 2, 0, 6], lineHeight: 1.05,
      outline: true, outlineText: 'Title and key figures' },
    lineAcross(width, ink.copper, 1.4, 5),
    { columns: fields.map(([label, value]) => ({ width: label === 'Author' ? '*' : 'auto', stack: [aside(label), value] })), columnGap: 26 },
    { text: [{ text: 'Plan checksum  ', color: ink.muted }, { text: options.checksum, font: 'figures', noWrap: options.checksum.length < 90 }], fontSize: size.small, margin: [0, 5, 0, 8] },
  ]
}

/** Totals and the tightest use, large. */
export function keyFigures({ result }: SheetContext): Content {
  const { ledger, predicted, plan, quantities } = result
  const cells: [string, string][] = [
    [formatSi(ledger.power_w, 'W'), ledger.power_w === null ? 'power, not reached' : 'power'],
    [formatSi(ledger.area_m2, 'm²'), ledger.area_m2 === null ? 'area, not reached' : 'area'],
    [formatSi(predicted.enob_bits, 'bit'), `effective, ${formatSi(plan.converter.enob_bits, 'bit')} asked`],
    tightestOf(result.comparators),
    [String(quantities.comparator_count), quantities.comparator_count === 1 ? 'comparator' : 'comparators'],
  ]
  const cell = ([value, label]: [string, string]): Content =>
    ({ stack: [figure(value, { fontSize: size.large, bold: true }), aside(label, { margin: [0, 1, 0, 0] })] })
  return {
    table: { widths: ['auto', 'auto', 'auto', '*', 'auto'], body: [cells.map(cell)] },
    layout: {
      ...bare, hLineWidth: () => 0.5, hLineColor: () => ink.rule, vLineWidth: (i) => (i > 0 && i < 5 ? 0.5 : 0), vLineColor: () => ink.rule,
      paddingLeft: (i) => (i === 0 ? 0 : 10), paddingRight: (i) => (i === 4 ? 0 : 10), paddingTop: () => 6, paddingBottom: () => 6,
    },
    margin: [0, 4, 0, 2],
  }
}

function tightestOf(comparators: SheetContext['result']['comparators']): [string, string] {
  const used = comparators.flatMap((entry) => (entry.tightest && entry.use[entry.tightest] !== null ? [{ entry, name: entry.tightest }] : []))
  if (used.length === 0) return [dash, 'no limit could be held against what is reached']
  const worst = used.reduce((a, b) => ((b.entry.use[b.name] ?? 0) > (a.entry.use[a.name] ?? 0) ? b : a))
  const label = useMeasures(comparators).find((m) => m.use === worst.name)?.label.toLowerCase() ?? worst.name
  const beyond = comparators.filter((entry) => entry.tightest !== null && (entry.use[entry.tightest] ?? 2) > 1).length
  const over = beyond === 0 ? '' : `; ${count(beyond, 'entry', 'entries')} over a limit`
  const where = worst.entry.cycle === null ? `no. ${worst.entry.index}` : `cycle ${worst.entry.cycle}`
  return [useOf(worst.entry.use[worst.name]), `of the limit: ${label}, ${where}${over}`.replace(/(no\.|cycle) /, '$1\u00a0')]
}
