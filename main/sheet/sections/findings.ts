import type { Content } from 'pdfmake/interfaces'
import type { Finding, Remedy } from '../../contract/result'
import type { SheetContext } from '../context'
import { count } from '../format'
import { ink, size } from '../theme'
import { aside, heading } from '../words'
import { barred } from './caution'

const marks: Record<Finding['severity'], { readonly sign: string; readonly color: string }> = {
  stop: { sign: '◥', color: ink.over }, caution: { sign: '▲', color: ink.copper }, note: { sign: '●', color: ink.muted },
}
const order: readonly Finding['severity'][] = ['stop', 'caution', 'note']

/** Everything the planner has to say, the gravest first, with what would mend it. */
export function findings({ result, width }: SheetContext): Content {
  const sorted = order.flatMap((severity) => result.findings.filter((finding) => finding.severity === severity))
  const [first, ...rest] = sorted.map(one)
  if (first === undefined) return { stack: [heading('Findings', width), 'None: every limit is met and nothing needs saying.'], unbreakable: true }
  return [{ stack: [heading('Findings', width), first], unbreakable: true }, ...rest]
}

/** What stops the plan, for the first page; nothing when nothing does. */
export function stopBlock({ result }: SheetContext): Content[] {
  const stops = result.findings.filter((finding) => finding.severity === 'stop')
  if (stops.length === 0) return []
  const head: Content = { text: `◥ This plan does not meet its limits: ${count(stops.length, 'finding')} to stop at`, bold: true, color: ink.over, fontSize: 10 }
  const messages = stops.map((stop): Content => ({ text: stop.message, margin: [0, 3, 0, 0] }))
  const unique = new Map(stops.flatMap((stop) => stop.remedies).map((remedy) => [remedy.text, remedy]))
  const cures: Content[] = unique.size === 0 ? [] : [{ text: 'What would mend it', bold: true, margin: [0, 5, 0, 0] }, ...[...unique.values()].map(cure)]
  return [barred([head, ...messages, ...cures], ink.over)]
}

function one(finding: Finding): Content {
  const { sign, color } = marks[finding.severity]
  return {
    columns: [
      { width: 44, text: [{ text: sign, color }, { text: ` ${finding.severity}`, color }], fontSize: size.small, margin: [0, 1.2, 0, 0] },
      { width: '*', stack: [finding.message, aside([finding.code, finding.path].filter((part) => part !== null).join(' · ')), ...finding.remedies.map(cure)] },
    ],
    columnGap: 6, margin: [0, 3, 0, 5], unbreakable: true,
  }
}

function cure({ text, set }: Remedy): Content {
  const changes = set.map(({ path, value }) => `${path} = ${JSON.stringify(value)}`).join(', ')
  return { text: [{ text: '→ ', color: ink.copper }, text, { text: `  ${changes}`, color: ink.muted, fontSize: size.small }], margin: [0, 1, 0, 0] }
}
