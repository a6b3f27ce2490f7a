import type { App } from '../state/app'
import { run, type Shortcut } from './command'
import { shortcutCommands } from './index'

const isMac = () => /Mac|iPhone|iPad/.test(window.navigator.platform)

/** A shortcut as it is printed on keys. */
export function shortcutText(shortcut: Shortcut): string {
  const key = shortcut.key.length === 1 ? shortcut.key.toUpperCase() : shortcut.key
  if (isMac()) return `${shortcut.shift ? '⇧' : ''}${shortcut.mod ? '⌘' : ''}${key}`
  return [shortcut.mod && 'Ctrl', shortcut.shift && 'Shift', key].filter(Boolean).join('+')
}

/** The same for `aria-keyshortcuts`. */
export function ariaShortcut(shortcut: Shortcut): string {
  return [shortcut.mod && (isMac() ? 'Meta' : 'Control'), shortcut.shift && 'Shift', shortcut.key].filter(Boolean).join('+')
}

function matches(event: KeyboardEvent, shortcut: Shortcut): boolean {
  const mod = isMac() ? event.metaKey : event.ctrlKey
  const other = isMac() ? event.ctrlKey : event.metaKey
  return event.key.toLowerCase() === shortcut.key.toLowerCase() && mod === Boolean(shortcut.mod) && !other && !event.altKey
    && event.shiftKey === Boolean(shortcut.shift)
}

/** A field with text under way undoes its own typing first. */
function ownsUndo(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.dataset.typing === 'yes'
}

/** Listens for the shortcuts of all commands; returns what stops it. */
export function listenForShortcuts(app: App): () => void {
  const listen = (event: KeyboardEvent) => {
    const chosen = shortcutCommands.find(({ shortcut }) => shortcut !== null && matches(event, shortcut))
    if (!chosen || event.defaultPrevented) return
    if ((chosen.id === 'undo' || chosen.id === 'redo') && ownsUndo(event.target)) return
    if (app.views.get().dialog !== null) return
    event.preventDefault()
    commitTyping(event.target)
    run(app, chosen, undefined)
  }
  window.addEventListener('keydown', listen)
  return () => window.removeEventListener('keydown', listen)
}

/** What is typed but not entered yet counts when a command is called by its keys: leaving the field enters it. */
function commitTyping(target: EventTarget | null): void {
  if (!(target instanceof HTMLElement) || target.dataset.typing !== 'yes') return
  target.blur()
  target.focus()
}
