import type { Content, TableCell } from 'pdfmake/interfaces'
import type { ComparatorEntry } from '../../contract/result'
import { formatSi } from '../../contract/units'
import type { SheetContext } from '../context'
import { dash, spanOf, spread, useOf } from '../format'
import { absent, handedOn, measures, notReached, useMeasures, type Measure } from '../measures'
import { ink, ruled } from '../theme'
import { aside, columnHead, figure, heading, right, subheading, symbol } from '../words'

/** What follows from the brief, and the limits that every comparator is held to, with what the design reaches. */
export function commonLimits({ result, width }: SheetContext): Content {
  const heads = [columnHead('Quantity'), columnHead(''), columnHead('Limit', 'right'), columnHead('Reached', 'right'), columnHead('Use', 'right'), columnHead('What it asks')]
  const body = [...measures, ...handedOn].map((measure) => row(measure, result.comparators))
  const note = 'One value: the same for all. A span: it differs, see each comparator. Reached: the worst corner. Use: reached ÷ limit.'
  const unevaluated = result.comparators.some((entry) => entry.reached.delay_s === null)
  return {
    stack: [
      heading('Limits common to all comparators', width, note),
      { table: { headerRows: 1, widths: [76, 28, 'auto', 'auto', 'auto', '*'], body: [heads, ...body], dontBreakRows: true }, layout: ruled },
      ...(unevaluated ? [aside(`${dash}  ${notReached}`, { margin: [0, 4, 0, 0] })] : []),
      subheading('What follows from the brief'),
      { columns: facts(result).map(([label, value]) => ({ width: 'auto', stack: [{ text: label, color: ink.muted }, figure(value)] })), columnGap: 30 },
    ],
    unbreakable: true,
  }
}

function facts({ quantities }: SheetContext['result']): [string, string][] {
  return [
    ['One LSB', formatSi(quantities.lsb_v, 'V')],
    ['Decisions of the whole bank', formatSi(quantities.decision_rate_hz, 'Hz')],
    ['Allowed error power', formatSi(quantities.error_power_allowed_v2, 'V²')],
    ['The same as a voltage', `${formatSi(Math.sqrt(quantities.error_power_allowed_v2), 'V')} rms`],
  ]
}

function row(measure: Measure, comparators: readonly ComparatorEntry[]): TableCell[] {
  const limit = measure.limit === null ? '' : shown(comparators.map((entry) => (measure.limit === null ? null : entry.limits[measure.limit])), measure.unit)
  const reached = measure.reached === null ? '' : shown(comparators.map((entry) => (measure.reached === null ? null : entry.reached[measure.reached])), measure.unit)
  const trimmed = measure.limit === 'offset_v' && comparators.some((entry) => entry.limits.trim_step_v !== null)
  const asks = trimmed ? 'Spread if it were not trimmed; a trimmed bank is held to its trim step.' : measure.asks
  const missing = measure.limit !== null && limit === dash ? absent[measure.limit] : undefined
  return [measure.label, symbol(measure.symbol), right(limit), right(missing ? '' : reached), right(useSpan(measure, comparators)), aside(missing ?? asks, { margin: [4, 1.4, 0, 0] })]
}

/** The use of a limit over the bank, where it counts as one of the six. */
function useSpan(measure: Measure, comparators: readonly ComparatorEntry[]): string {
  const one = useMeasures(comparators).find(({ limit, reached }) => limit === measure.limit && reached === measure.reached)
  if (!one) return ''
  const uses = comparators.map((entry) => entry.use[one.use]).filter((use) => use !== null)
  if (uses.length === 0) return dash
  const [low, high] = spread(uses).map(useOf)
  return low === high ? low : `${low} … ${high}`
}

function shown(values: readonly (number | null)[], unit: string): string {
  const known = values.filter((value) => value !== null)
  return known.length === 0 ? dash : spanOf(known, unit)
}
