import { createContext, use, useSyncExternalStore } from 'react'
import type { App } from './app'
import type { Store } from './store'

/** The part of a store that a component shows; the part must be the same value while nothing changed. */
export function useStore<T, U>(store: Store<T>, pick: (state: T) => U): U {
  return useSyncExternalStore(store.subscribe, () => pick(store.get()))
}

export const AppContext = createContext<App | null>(null)

/** Everything a room may reach. */
export function useApp(): App {
  const app = use(AppContext)
  if (!app) throw new Error('This part is used outside the app.')
  return app
}
