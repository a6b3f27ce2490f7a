import type { Result } from '../contract/result'
import type { Paper } from './theme'

/** What the sheet is made with, beside the result. */
export interface SheetOptions {
  readonly paper: Paper
  /** Shown and written into the file, in UTC. */
  readonly date: Date
  /** Of the program. */
  readonly version: string
  /** Of the plan with its defaults: the same plan, however written, has the same. */
  readonly checksum: string
}

/** What each section of the sheet is given. */
export interface SheetContext {
  readonly result: Result
  readonly options: SheetOptions
  /** Between the margins [pt]. */
  readonly width: number
}
