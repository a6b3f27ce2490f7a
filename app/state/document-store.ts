import { applyPatches, enablePatches, produceWithPatches, type Patch } from 'immer'
import type { PlanInput } from '../../main/contract/plan'
import { createStore, type Store } from './store'
import { sameJson } from './paths'

enablePatches()

/** One thing a person did, by the name it is undone with. */
export interface Step {
  readonly id: number
  readonly label: string
  readonly patches: readonly Patch[]
  readonly inverse: readonly Patch[]
  /** Steps of the same group that follow each other are one: a held arrow key is one undo. */
  readonly group: string | null
}

/** Where the document was opened from or saved to. */
export interface Place {
  readonly name: string
  readonly path: string | null
}

export interface DocumentState {
  /** The document as written: no defaults filled in. */
  readonly document: PlanInput
  /** Grows by one with every change, undo and redo included. */
  readonly revision: number
  readonly past: readonly Step[]
  readonly future: readonly Step[]
  /** The step after which it was saved: 0 at the start, null when it never was. */
  readonly savedStep: number | null
  readonly place: Place | null
  readonly savedAt: string | null
}

export interface Documents extends Store<DocumentState> {
  /** Changes the document through a recipe, as one named step. Nothing changed: no step. */
  edit(label: string, recipe: (draft: PlanInput) => void, group?: string): void
  undo(): void
  redo(): void
  /** Puts another document here; its history starts anew. */
  open(document: PlanInput, options?: { place?: Place | null; unsaved?: boolean }): void
  /** The state of `step` is on disk now. */
  markSaved(step: number, place: Place, at: string): void
}

const longestHistory = 500

/** The step the document stands at; 0 before the first. */
export const currentStep = (state: DocumentState): number => state.past[state.past.length - 1]?.id ?? 0

/** Whether there is something that is not saved. */
export const isDirty = (state: DocumentState): boolean => currentStep(state) !== state.savedStep

let lastStep = 0

function edited(state: DocumentState, label: string, recipe: (draft: PlanInput) => void, group: string | null): DocumentState {
  const [document, patches, inverse] = produceWithPatches(state.document, (draft) => recipe(draft as PlanInput))
  if (patches.length === 0 || sameJson(document, state.document)) return state
  const top = state.past[state.past.length - 1]
  const joins = group !== null && top !== undefined && top.group === group && top.id !== state.savedStep && state.future.length === 0
  lastStep += 1
  const step: Step = joins
    ? { ...top, label, patches: [...top.patches, ...patches], inverse: [...inverse, ...top.inverse] }
    : { id: lastStep, label, patches, inverse, group }
  const kept = joins ? state.past.slice(0, -1) : state.past.slice(-longestHistory)
  return { ...state, document, revision: state.revision + 1, past: [...kept, step], future: [] }
}

function undone(state: DocumentState): DocumentState {
  const step = state.past[state.past.length - 1]
  if (!step) return state
  const document = applyPatches(state.document, step.inverse)
  return { ...state, document, revision: state.revision + 1, past: state.past.slice(0, -1), future: [step, ...state.future] }
}

function redone(state: DocumentState): DocumentState {
  const [step, ...future] = state.future
  if (!step) return state
  const document = applyPatches(state.document, step.patches)
  return { ...state, document, revision: state.revision + 1, past: [...state.past, step], future }
}

/** The one place that holds the plan being edited. */
export function createDocuments(initial: PlanInput): Documents {
  const store = createStore<DocumentState>({
    document: initial, revision: 1, past: [], future: [], savedStep: 0, place: null, savedAt: null,
  })
  return {
    ...store,
    edit: (label, recipe, group) => store.update((state) => edited(state, label, recipe, group ?? null)),
    undo: () => store.update(undone),
    redo: () => store.update(redone),
    open: (document, options) => store.update((state) => ({
      document, revision: state.revision + 1, past: [], future: [],
      savedStep: options?.unsaved ? null : 0, place: options?.place ?? null, savedAt: null,
    })),
    markSaved: (step, place, at) => store.update((state) => ({ ...state, savedStep: step, place, savedAt: at })),
  }
}
