import type { Call, Problem } from '../../main/contract/channels'
import type { Failure, Reply } from '../../main/contract/errors'
import type { Result } from '../../main/contract/result'
import type { Documents } from './document-store'
import { createStore, type Store } from './store'

export interface ResultState {
  /** The last result there is; of the document's revision `revision`. */
  readonly result: Result | null
  readonly revision: number
  readonly planning: boolean
  /** Why the present document was refused; the result is then the one of the last valid brief. */
  readonly problems: readonly Problem[]
  /** Set when the main side could not plan at all. */
  readonly failure: string | null
}

export interface Results extends Store<ResultState> {
  /** Asks again for the present document. */
  retry(): void
}

const none: ResultState = { result: null, revision: 0, planning: false, problems: [], failure: null }

function refused(state: ResultState, error: Failure['error']): ResultState {
  const problems = error.problems ?? []
  return { ...state, planning: false, problems, failure: problems.length > 0 ? null : error.message }
}

/**
 * Plans each new revision of the document at once: the host gives up older requests of the same window for newer ones.
 * A reply is kept only when the document still is what was asked about.
 */
export function createResults(call: Call, documents: Documents): Results {
  const store = createStore<ResultState>(none)

  const keep = (asked: number, reply: Reply<{ result: Result; revision: number }>) => {
    if (documents.get().revision !== asked || (reply.ok && reply.value.revision !== asked)) return
    store.update((state) => (reply.ok
      ? { result: reply.value.result, revision: asked, planning: false, problems: [], failure: null }
      : refused(state, reply.error)))
  }
  const run = async () => {
    store.update((state) => ({ ...state, planning: true }))
    const { document, revision } = documents.get()
    keep(revision, await call('plan.run', { document, revision }))
  }
  let seen = documents.get().revision
  documents.subscribe(() => {
    if (documents.get().revision === seen) return
    seen = documents.get().revision
    void run()
  })
  void run()
  return { ...store, retry: () => void run() }
}

/** Whether the picture on the screen is of the document as it stands. */
export const isCurrent = (state: ResultState): boolean => state.problems.length === 0 && state.failure === null
