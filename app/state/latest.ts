import type { Reply } from '../../main/contract/errors'
import { createStore, type Store } from './store'

export interface LatestState<K, V> {
  readonly key: K | null
  readonly value: V | null
  /** What the value was asked with; another than `key` while a newer one is awaited. */
  readonly valueKey: K | null
  readonly busy: boolean
  readonly failure: string | null
}

export interface Latest<K, V> extends Store<LatestState<K, V>> {
  /** Asks for the value of a key; a reply is dropped when another key was asked for since. */
  ask(key: K): void
}

/** Something fetched on demand, of which only the newest is wanted; the old value stays until then. */
export function createLatest<K, V>(fetch: (key: K) => Promise<Reply<V>>, same: (a: K, b: K) => boolean): Latest<K, V> {
  const store = createStore<LatestState<K, V>>({ key: null, value: null, valueKey: null, busy: false, failure: null })
  let ticket = 0
  const ask = (key: K) => {
    const now = store.get()
    if (now.key !== null && same(now.key, key) && now.failure === null) return
    ticket += 1
    const mine = ticket
    store.set({ ...now, key, busy: true, failure: null })
    void fetch(key).then((reply) => {
      if (mine !== ticket) return
      store.set(reply.ok
        ? { key, value: reply.value, valueKey: key, busy: false, failure: null }
        : { key, value: null, valueKey: null, busy: false, failure: reply.error.message })
    })
  }
  return { ...store, ask }
}
