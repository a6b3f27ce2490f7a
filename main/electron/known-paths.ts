/**
 * Which files a window may touch without asking. A page can name a path only if the same path reached this window
 * before through a dialog, the recent list or the command line.
 */
export interface KnownPaths {
  /** May be read: shown as recent, or named on the command line. */
  offer(window: number, path: string): void
  /** May be read and written: chosen in a dialog, or opened before. */
  grant(window: number, path: string): void
  mayRead(window: number, path: string): boolean
  mayWrite(window: number, path: string): boolean
  forget(window: number): void
}

/** Starts with nothing known to any window. */
export function createKnownPaths(): KnownPaths {
  const offered = new Map<number, Set<string>>()
  const granted = new Map<number, Set<string>>()
  const add = (known: Map<number, Set<string>>, window: number, path: string) => {
    known.set(window, (known.get(window) ?? new Set()).add(path))
  }
  const has = (known: Map<number, Set<string>>, window: number, path: string) => known.get(window)?.has(path) ?? false
  return {
    offer: (window, path) => add(offered, window, path),
    grant: (window, path) => add(granted, window, path),
    mayRead: (window, path) => has(offered, window, path) || has(granted, window, path),
    mayWrite: (window, path) => has(granted, window, path),
    forget: (window) => {
      offered.delete(window)
      granted.delete(window)
    },
  }
}
