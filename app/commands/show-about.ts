import { command } from './command'

export const showAbout = command({
  id: 'show-about',
  label: 'About',
  apply: (app) => app.views.patch({ dialog: { kind: 'about' } }),
})
