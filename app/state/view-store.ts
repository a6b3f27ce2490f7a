import { createStore, type Store } from './store'

export const tabs = { waves: 'Waves', budget: 'Budget', corners: 'Corners', findings: 'Findings', workings: 'Workings' } as const
export type Tab = keyof typeof tabs

export type Dialog =
  | { readonly kind: 'about' }
  | { readonly kind: 'shortcuts' }
  | { readonly kind: 'discard'; readonly proceed: () => void }

export interface Notice {
  readonly tone: 'note' | 'stop'
  readonly text: string
  readonly details: readonly string[]
  readonly action?: { readonly label: string; readonly run: () => void }
}

export interface ViewState {
  /** Index of the selected comparator, from 1. */
  readonly selected: number
  readonly tab: Tab
  /** Sections of the brief that are folded away. */
  readonly folded: readonly string[]
  /** On a narrow window: which of the two side rooms is shown. */
  readonly side: 'brief' | 'ledger'
  /** What was typed into a field and could not be taken, by path. */
  readonly drafts: Readonly<Record<string, string>>
  /** The field that the foot of the brief explains. */
  readonly explained: string | null
  readonly dialog: Dialog | null
  readonly notice: Notice | null
  /** What the workings are narrowed to. */
  readonly filter: string
  readonly zoom: { readonly scale: number; readonly x: number; readonly y: number }
  readonly paper: 'A4' | 'LETTER'
  /** Something under way that a person waits for. */
  readonly busy: string | null
}

const initial: ViewState = {
  selected: 0, tab: 'waves', folded: ['block', 'shares', 'overrides', 'about'], side: 'brief', drafts: {}, explained: null,
  dialog: null, notice: null, filter: '', zoom: { scale: 1, x: 0, y: 0 }, paper: 'A4', busy: null,
}

export interface Views extends Store<ViewState> {
  patch(part: Partial<ViewState>): void
  /** Keeps what was typed at a path, or forgets it. */
  draft(path: string, text: string | null): void
  fold(section: string, folded: boolean): void
}

/** What is shown and where; nothing of it is part of the document. */
export function createViews(): Views {
  const store = createStore<ViewState>(initial)
  return {
    ...store,
    patch: (part) => store.update((state) => ({ ...state, ...part })),
    draft: (path, text) => store.update((state) => {
      if ((state.drafts[path] ?? null) === text) return state
      const { [path]: _gone, ...drafts } = state.drafts
      return { ...state, drafts: text === null ? drafts : { ...drafts, [path]: text } }
    }),
    fold: (section, folded) => store.update((state) => ({
      ...state, folded: folded ? [...new Set([...state.folded, section])] : state.folded.filter((name) => name !== section),
    })),
  }
}
