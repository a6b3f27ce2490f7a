import type { Bridge } from '../bridge'
import type { Card } from '../../main/contract/cards'
import type { Replies } from '../../main/contract/channels'
import type { PlanInput } from '../../main/contract/plan'
import type { Working } from '../../main/contract/result'
import type { Waves } from '../../main/contract/waves'
import type { Files } from '../files/files'
import { createDocuments, type Documents } from './document-store'
import { createLatest, type Latest } from './latest'
import { createResults, type Results } from './result-store'
import { createStore, type Store } from './store'
import { createViews, type Views } from './view-store'

export interface WorkingsKey { readonly revision: number; readonly index: number }
export interface WavesKey extends WorkingsKey { readonly overdrive_v: number | null }

/** What the main side said once, at the start. */
export interface Library {
  readonly about: Replies['about'] | null
  readonly cards: readonly Card[]
  readonly demos: Replies['demos.list']['demos']
  readonly recent: readonly string[]
}

/** Stores and doors of one window; commands and rooms are given this and nothing else. */
export interface App {
  readonly bridge: Bridge
  readonly files: Files
  readonly documents: Documents
  readonly results: Results
  readonly views: Views
  readonly library: Store<Library>
  readonly workings: Latest<WorkingsKey, readonly Working[]>
  readonly waves: Latest<WavesKey, Waves>
}

const sameWorkings = (a: WorkingsKey, b: WorkingsKey) => a.revision === b.revision && a.index === b.index

/** Puts the stores of a window together around its first document. */
export function createApp(bridge: Bridge, files: Files, first: PlanInput): App {
  const documents = createDocuments(first)
  const present = () => documents.get().document as never
  return {
    bridge, files, documents,
    results: createResults(bridge.call, documents),
    views: createViews(),
    library: createStore<Library>({ about: null, cards: [], demos: [], recent: [] }),
    workings: createLatest(async (key) => {
      const reply = await bridge.call('plan.workings', { document: present(), index: key.index })
      return reply.ok ? { ok: true, value: reply.value.workings } : reply
    }, sameWorkings),
    waves: createLatest(
      (key) => bridge.call('waves.run', { document: present(), index: key.index, overdrive_v: key.overdrive_v }),
      (a, b) => sameWorkings(a, b) && a.overdrive_v === b.overdrive_v,
    ),
  }
}
