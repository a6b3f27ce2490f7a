import { clearValue } from '../../commands/clear-value'
import { run } from '../../commands/command'
import { setValue } from '../../commands/set-value'
import type { App } from '../../state/app'
import { valueAt } from '../../state/paths'
import { useApp, useStore } from '../../state/use-store'
import type { Problem } from '../../../main/contract/errors'

export interface FieldAccess {
  readonly app: App
  /** As written in the document. */
  readonly written: unknown
  /** What counts: of the last plan with its defaults filled in. */
  readonly planned: unknown
  readonly document: unknown
  readonly problem: string | null
  readonly draft: string | undefined
  set(value: unknown, group?: string): void
  clear(): void
  keep(text: string | null): void
  explain(): void
}

const said = (problem: Problem) => [problem.allowed === '' ? '' : `Allowed: ${problem.allowed}.`, problem.hint].filter(Boolean).join(' ')

/** What a field of the brief shows and does. */
export function useField(path: string): FieldAccess {
  const app = useApp()
  const document = useStore(app.documents, (state) => state.document)
  const planned = useStore(app.results, (state) => valueAt(state.result?.plan, path))
  const problem = useStore(app.results, (state) => {
    const found = state.problems.find((one) => one.path === path)
    return found ? said(found) : null
  })
  const draft = useStore(app.views, (state) => state.drafts[path])
  return {
    app, written: valueAt(document, path), planned, document, problem, draft,
    set: (value, group) => run(app, setValue, { path, value, group }),
    clear: () => run(app, clearValue, { path }),
    keep: (text) => app.views.draft(path, text),
    explain: () => app.views.patch({ explained: path }),
  }
}
