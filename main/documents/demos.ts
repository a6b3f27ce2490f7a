/** A worked plan that comes with the program. */
export interface Demo {
  readonly id: string
  readonly title: string
  readonly document: unknown
}

const files = import.meta.glob<{ title?: string }>('../../assets/demo/*.json', { eager: true, import: 'default' })

function demo([path, document]: [string, { title?: string }]): Demo {
  const name = path.split('/').at(-1) ?? path
  const id = name.replace(/\.bank\.json$|\.json$/, '')
  return { id, title: document.title ?? id, document }
}

/** The demo plans in the order of their file names, taken in at build time. */
export const demos: readonly Demo[] = Object.entries(files).sort(([a], [b]) => (a < b ? -1 : 1)).map(demo)
