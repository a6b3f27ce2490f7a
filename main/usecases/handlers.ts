import type { channels, ChannelName } from '../contract/channels'
import { succeed, type Reply } from '../contract/errors'
import { builtInCards } from '../documents/cards'
import { demos } from '../documents/demos'
import { readPlan, validatePlan } from '../documents/read-plan'
import { writePlan } from '../documents/write-plan'
import { about } from './about'
import { answerFrom, type Table } from './answer'
import type { ComputePool } from './compute-pool'
import { makePlanSheet, sheetDate } from './make-sheet'
import { runPlan } from './run-plan'
import { runWaves } from './run-waves'

/** The channels that every host has. */
export type SharedChannel = { [N in ChannelName]: (typeof channels)[N]['hosts'] extends 'both' ? N : never }[ChannelName]

/** Who asks. */
export interface Asker {
  /** The asking window, whose newer requests replace its older ones; null: unknown, nothing is replaced. */
  readonly window: string | null
  /** Ends the work when the window is gone. */
  readonly signal?: AbortSignal
}

export type Answer = (name: string, request: unknown, asker: Asker) => Promise<Reply<unknown>>

export interface AnswerOptions { readonly compute: ComputePool; readonly host: 'desktop' | 'loopback' }

/** The door to all channels that the desktop program and the browser host share. */
export function createAnswer({ compute, host }: AnswerOptions): Answer {
  return answerFrom(handlers(compute, host))
}

function handlers(compute: ComputePool, host: AnswerOptions['host']): Table<SharedChannel, Asker> {
  const newest = (channel: SharedChannel, { window, signal }: Asker) => compute.view(window === null ? null : `${window} ${channel}`, signal)
  return {
    about: async () => succeed({ ...about, host }),
    'cards.list': async () => succeed({ cards: builtInCards }),
    'demos.list': async () => succeed({ demos }),
    'document.read': async ({ text }) => map(readPlan(text), ({ plan, document, changes }) => ({ plan, document, changes })),
    'document.write': async ({ document }) => succeed({ text: writePlan(document) }),
    'plan.run': async ({ document, revision, remedies }, asker) => {
      const read = validatePlan(document)
      return read.ok ? map(await runPlan(newest('plan.run', asker), read.value, { remedies }), (result) => ({ result, revision })) : read
    },
    'plan.workings': async ({ document, index }, asker) => {
      const read = validatePlan(document)
      if (!read.ok) return read
      return map(await runPlan(newest('plan.workings', asker), read.value, { workingsFor: index, remedies: false }), ({ workings }) => ({ workings }))
    },
    'waves.run': async ({ document, index, overdrive_v }, asker) => {
      const read = validatePlan(document)
      return read.ok ? runWaves(newest('waves.run', asker), read.value, { index, overdrive_v }) : read
    },
    'sheet.make': async ({ document, paper, date }, { signal }) => {
      const read = validatePlan(document)
      if (!read.ok) return read
      const day = date === null ? sheetDate(process.env) : new Date(`${date}T00:00:00Z`)
      return map(await makePlanSheet(compute.view(null, signal), read.value, { paper, date: day }), ({ bytes, suggestedName }) => (
        { base64: Buffer.from(bytes).toString('base64'), suggested_name: suggestedName }))
    },
  }
}

function map<A, B>(reply: Reply<A>, change: (value: A) => B): Reply<B> {
  return reply.ok ? succeed(change(reply.value)) : reply
}
