import { command } from './command'

/** Selects a comparator, the same one in every room. */
export const selectComparator = command<{ index: number }>({
  id: 'select-comparator',
  label: 'Select a comparator',
  enabled: (app) => app.results.get().result !== null,
  apply: (app, { index }) => {
    const count = app.results.get().result?.comparators.length ?? 1
    app.views.patch({ selected: Math.max(1, Math.min(count, index)) })
  },
})
