import { migrations } from './list'

/** One step from a document version to the next; `change` may count on the form of `from`. */
export interface Migration {
  readonly from: string
  readonly to: string
  /** The new document, and what a person should know was changed or dropped. */
  readonly change: (document: Readonly<Record<string, unknown>>) => { document: Record<string, unknown>; changes: string[] }
}

export interface Migrated {
  readonly document: Readonly<Record<string, unknown>>
  readonly changes: readonly string[]
}

/**
 * Brings a document to the newest version, step by step. Nothing happens in silence: every step says what it did.
 *
 * @param document  a plan of any version the program knows; others are left as they are
 * @param steps     the migrations, oldest first
 */
export function migrate(document: Readonly<Record<string, unknown>>, steps: readonly Migration[] = migrations): Migrated {
  return steps.reduce<Migrated>((done, step) => {
    if (done.document['schema'] !== step.from) return done
    const { document: next, changes } = step.change(done.document)
    return {
      document: { ...next, schema: step.to },
      changes: [...done.changes, `The document was brought from ${step.from} to ${step.to}.`, ...changes],
    }
  }, { document, changes: [] })
}
