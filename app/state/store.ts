/** A value with listeners: the smallest store that React and plain code can share. */
export interface Store<T> {
  get(): T
  set(next: T): void
  update(change: (now: T) => T): void
  subscribe(listener: () => void): () => void
}

/** A store that tells its listeners when its value is another one. */
export function createStore<T>(initial: T): Store<T> {
  let value = initial
  const listeners = new Set<() => void>()
  const set = (next: T) => {
    if (Object.is(next, value)) return
    value = next
    for (const listener of [...listeners]) listener()
  }
  return {
    get: () => value,
    set,
    update: (change) => set(change(value)),
    subscribe: (listener) => {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
  }
}
