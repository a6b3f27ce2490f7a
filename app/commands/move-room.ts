import { command } from './command'

const focusable = 'button:not([disabled]),input:not([disabled]),select,textarea,a[href],[tabindex="0"]'
const remembered = new WeakMap<Element, HTMLElement>()

function rooms(): HTMLElement[] {
  return [...document.querySelectorAll<HTMLElement>('[data-room]')].filter((room) => room.offsetParent !== null || room.getClientRects().length > 0)
}

/** Puts the keyboard into the room `step` further on, where it was there last. */
function moveBy(step: number): void {
  const all = rooms()
  const here = all.findIndex((room) => room.contains(document.activeElement))
  if (here >= 0 && document.activeElement instanceof HTMLElement) remembered.set(all[here], document.activeElement)
  const next = all[here < 0 ? 0 : (here + step + all.length) % all.length]
  if (!next) return
  const last = remembered.get(next)
  const target = last && next.contains(last) && last.getAttribute('aria-selected') !== 'false' ? last : (next.querySelector<HTMLElement>('[data-room-start]') ?? next.querySelector<HTMLElement>(focusable))
  target?.focus()
}

export const nextRoom = command({ id: 'next-room', label: 'Next room', shortcut: { key: 'F6' }, apply: () => moveBy(1) })
export const previousRoom = command({ id: 'previous-room', label: 'Previous room', shortcut: { key: 'F6', shift: true }, apply: () => moveBy(-1) })
