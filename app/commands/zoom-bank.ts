import { command } from './command'

export const zoomRange = { min: 1, max: 12 } as const

/** Brings the bank nearer or farther; 1 fits all of it. */
export const zoomBank = command<{ scale: number; x: number; y: number }>({
  id: 'zoom-bank',
  label: 'Zoom the bank',
  apply: (app, { scale, x, y }) => {
    const held = Math.max(zoomRange.min, Math.min(zoomRange.max, scale))
    app.views.patch({ zoom: held === 1 ? { scale: 1, x: 0, y: 0 } : { scale: held, x, y } })
  },
})
