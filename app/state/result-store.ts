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
  /** The result stands; changes that would make it feasible are still being looked for. */
  readonly seeking: boolean
  /** Why the present document was refused; the result is then the one of the last valid brief. */
  readonly problems: readonly Problem[]
  /** Set when the main side could not plan at all. */
  readonly failure: string | null
}

export interface Results extends Store<ResultState> {
  /** Asks again for the present document. */
  retry(): void
}

const none: ResultState = { result: null, revision: 0, planning: false, seeking: false, problems: [], failure: null }

const stops = (result: Result): boolean => result.findings.some((finding) => finding.severity === 'stop')

function refused(state: ResultState, error: Failure['error']): ResultState {
  const problems = error.problems ?? []
  return { ...state, planning: false, seeking: false, problems, failure: problems.length > 0 ? null : error.message }
}

/**
 * Plans each new revision of the document at once: the host gives up older requests of the same window for newer ones.
 * A reply is kept only when the document still is what was asked about. An infeasible plan is shown first and its remedies,
 * which take several plans to verify, after.
 */
export function createResults(call: Call, documents: Documents): Results {
  const store = createStore<ResultState>(none)

  const stillAsked = (asked: number) => documents.get().revision === asked

  const keep = (asked: number, reply: Reply<{ result: Result; revision: number }>, seeking: boolean) => {
    if (!stillAsked(asked) || (reply.ok && reply.value.revision !== asked)) return
    store.update((state) => (reply.ok
      ? { result: reply.value.result, revision: asked, planning: false, seeking, problems: [], failure: null }
      : refused(state, reply.error)))
  }
  const run = async () => {
    store.update((state) => ({ ...state, planning: true, seeking: false }))
    const { document, revision } = documents.get()
    const first = await call('plan.run', { document, revision, remedies: false })
    const infeasible = first.ok && stops(first.value.result)
    keep(revision, first, infeasible)
    if (!infeasible || !stillAsked(revision)) return
    const second = await call('plan.run', { document, revision, remedies: true })
    if (second.ok) keep(revision, second, false)
    else if (stillAsked(revision)) store.update((state) => ({ ...state, seeking: false }))
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

/** What a result that is not of the present document is, in a word or a few; null: it is of the present one. */
export function setBack(state: ResultState): string | null {
  if (state.planning) return 'planning'
  if (state.problems.length > 0) return 'of the last valid brief'
  return state.failure === null ? null : 'of an earlier brief'
}
