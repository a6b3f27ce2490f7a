import { sectionOf } from '../rooms/brief/sections'
import { command } from './command'

/** Unfolds the section of a field and puts the keyboard there. */
export const goToField = command<{ path: string }>({
  id: 'go-to-field',
  label: 'Go to a field of the brief',
  apply: (app, { path }) => {
    const section = sectionOf(path)
    if (section) app.views.fold(section, false)
    app.views.patch({ side: 'brief' })
    requestAnimationFrame(() => {
      const field = document.querySelector<HTMLElement>(`[data-path="${CSS.escape(path)}"]`)
      field?.scrollIntoView({ block: 'center' })
      field?.focus()
    })
  },
})
