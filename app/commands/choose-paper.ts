import { command } from './command'

/** Chooses the paper of the sheet. */
export const choosePaper = command<{ paper: 'A4' | 'LETTER' }>({
  id: 'choose-paper',
  label: 'Choose the paper',
  apply: (app, { paper }) => app.views.patch({ paper }),
})
