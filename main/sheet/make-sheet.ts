import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces'
import type { Result } from '../contract/result'
import type { SheetContext, SheetOptions } from './context'
import { loadFaces, type Faces } from './faces'
import { dateOf } from './format'
import { print } from './printer'
import { bank } from './sections/bank'
import { brief } from './sections/brief'
import { budget } from './sections/budget'
import { caution } from './sections/caution'
import { commonLimits } from './sections/common-limits'
import { comparators } from './sections/comparators'
import { corners } from './sections/corners'
import { design } from './sections/design'
import { findings, stopBlock } from './sections/findings'
import { ledger } from './sections/ledger'
import { keyFigures, titleBlock } from './sections/title'
import { workings } from './sections/workings'
import { ink, lineAcross, margins, pageWidth, size } from './theme'
import { typeset } from './typeset'
import { aside } from './words'

export type { SheetOptions } from './context'

/**
 * The sheet: a result as a PDF to hand over, with embedded fonts, bookmarks and selectable text.
 * It computes nothing; the same result and options give the same bytes.
 *
 * @param result   as `plan()` gives it
 * @param options  paper, date (shown in UTC), version of the program, checksum of the plan document
 */
export async function makeSheet(result: Result, options: SheetOptions): Promise<Uint8Array> {
  const faces = await loadFaces()
  const context: SheetContext = { result, options, width: pageWidth[options.paper] - margins[0] - margins[2] }
  return print(definition(context, faces), structuredClone(faces.dictionary))
}

function contentOf(context: SheetContext): Content[] {
  return [
    titleBlock(context), caution(), ...stopBlock(context), keyFigures(context), brief(context), commonLimits(context), bank(context),
    comparators(context), design(context), budget(context), ledger(context), corners(context), findings(context), workings(context),
  ]
}

function definition(context: SheetContext, faces: Faces): TDocumentDefinitions {
  const { plan } = context.result
  const { date, version, paper } = context.options
  return {
    pageSize: paper,
    pageMargins: margins,
    version: '1.7',
    language: 'en',
    displayTitle: true,
    info: {
      title: plan.title === '' ? 'Untitled plan' : plan.title, author: plan.author, subject: `Comparator bank plan, revision ${plan.revision}`,
      keywords: 'comparator, data converter, plan', creator: `Latchwright ${version}`, creationDate: date, modDate: date,
    },
    defaultStyle: { font: 'words', fontSize: size.body, color: ink.text, lineHeight: 1.02 },
    content: typeset([openers, ...contentOf(context)], faces),
    pageBreakBefore: (node) => node.headlineLevel === 1 && node.startPosition.verticalRatio > 0.8,
    header: (page) => (page === 1 ? null : typeset(header(context), faces)),
    footer: (page, pages) => typeset(footer(context, page, pages), faces),
  }
}

/** Opens each font that pictures use before any other of the same name. */
const openers: Content = {
  text: (['words', 'figures', 'signs'] as const).flatMap((font) => [false, true].map((bold) => ({ text: '\u00a0', font, bold }))),
  fontSize: 1, margin: [0, -2, 0, 0],
}

function header({ result, width }: SheetContext): Content {
  const { title, revision } = result.plan
  return {
    stack: [
      { columns: [aside(title, { width: '*', noWrap: true }), aside(`Revision ${revision}`, { width: 'auto' })], columnGap: 12, margin: [0, 0, 0, 3] },
      lineAcross(width, ink.rule, 0.5, 0),
    ],
    margin: [margins[0], 24, margins[2], 0],
  }
}

function footer({ options }: SheetContext, page: number, pages: number): Content {
  return {
    columns: [
      aside(`${dateOf(options.date)} · Latchwright ${options.version} · planning estimates, not sign-off`, { width: '*' }),
      aside(`page ${page} of ${pages}`, { width: 'auto' }),
    ],
    margin: [margins[0], 14, margins[2], 0],
  }
}
