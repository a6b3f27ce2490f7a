import type { Reply } from '../../main/contract/errors'
import type { Place } from '../state/document-store'

export interface Opened { readonly text: string; readonly place: Place }

/** Files as the host lets the window have them. null: the person cancelled. */
export interface Files {
  open(path: string | null): Promise<Reply<Opened | null>>
  /** Saves where it was saved before; asks for a place when there is none or `ask` says so. */
  save(text: string, options: { place: Place | null; ask: boolean; suggestedName: string }): Promise<Reply<Place | null>>
  /** Hands out a file that is not the plan itself: the sheet, a table. */
  hand(base64: string, name: string): Promise<Reply<{ name: string } | null>>
  recent(): Promise<readonly string[]>
  keepRecovery(text: string | null): void
  readRecovery(): Promise<string | null>
  setDirty(dirty: boolean, title: string): void
}

/** A file name from a title: letters and digits, the rest as single dashes. */
export function fileName(title: string, ending: string): string {
  const plain = title.normalize('NFKD').replace(/[^\p{L}\p{N}]+/gu, '-').replace(/^-+|-+$/g, '').slice(0, 80)
  return `${plain === '' ? 'plan' : plain}${ending}`
}
