import type { Bridge } from '../bridge'
import type { Replies } from '../../main/contract/channels'
import type { PlanInput } from '../../main/contract/plan'
import { openRecent } from '../commands/open-recent'
import { openText } from '../commands/open-text'
import { restoreRecovery } from '../commands/restore-recovery'
import type { Files } from '../files/files'
import { createApp, type App } from './app'
import { isDirty } from './document-store'
import { valueAt } from './paths'

const autosaveDelay_ms = 700
const bare: PlanInput = { schema: 'latchwright.plan/1', converter: { architecture: 'flash', resolution_bits: 6, sample_rate_hz: 2e9 } }

/** Starts a window: the first demo is on the desk, what was left unsaved is offered, and saving is watched over. */
export async function begin(bridge: Bridge, files: Files): Promise<App> {
  const [about, cards, demos, recent] = await Promise.all([
    bridge.call('about', {}), bridge.call('cards.list', {}), bridge.call('demos.list', {}), files.recent(),
  ])
  const shown: Replies['demos.list']['demos'] = demos.ok ? demos.value.demos : []
  const app = createApp(bridge, files, (shown[0]?.document as PlanInput | undefined) ?? bare)
  app.library.set({ about: about.ok ? about.value : null, cards: cards.ok ? cards.value.cards : [], demos: shown, recent })
  await openGiven(app)
  await offerRecovery(app)
  watch(app)
  return app
}

/** Offers the plan that was not saved when the window went away last. */
async function offerRecovery(app: App): Promise<void> {
  const text = await app.files.readRecovery()
  if (text === null) return
  try {
    const document: unknown = JSON.parse(text)
    if (!isPlanLike(document)) return app.files.keepRecovery(null)
    const title = document.title ?? 'A plan'
    app.views.patch({ notice: {
      tone: 'note', text: `“${title}” was not saved when the window closed last.`, details: [],
      action: { label: 'Restore', run: () => void restoreRecovery.apply(app, { document }) },
    } })
  } catch {
    app.files.keepRecovery(null)
  }
}

/** Enough of a plan to be shown and mended; the planner says what is wrong with the rest. */
function isPlanLike(value: unknown): value is PlanInput {
  return typeof valueAt(value, 'converter.architecture') === 'string' && !Array.isArray(value)
}

/** Opens the file the program was started with: the desktop names it in the address, the loopback host hands out its text. */
async function openGiven(app: App): Promise<void> {
  const path = app.bridge.host === 'desktop' ? new URLSearchParams(window.location.hash.slice(1)).get('open') : null
  if (path !== null) return openRecent.apply(app, { path })
  const given = await app.bridge.given()
  if (given) await openText.apply(app, { text: given.text, place: { name: given.name, path: null } })
}

/** Keeps a recovery copy, tells the host what is unsaved, and takes files that are dropped on the window. */
function watch(app: App): void {
  let timer = 0
  app.files.setDirty(false, app.documents.get().document.title ?? 'Untitled plan')
  app.documents.subscribe(() => {
    const state = app.documents.get()
    const dirty = isDirty(state)
    app.files.setDirty(dirty, state.document.title ?? 'Untitled plan')
    window.clearTimeout(timer)
    timer = window.setTimeout(() => app.files.keepRecovery(dirty ? JSON.stringify(state.document) : null), autosaveDelay_ms)
  })
  window.addEventListener('beforeunload', (event) => {
    if (app.bridge.host === 'loopback' && isDirty(app.documents.get())) event.preventDefault()
  })
  window.addEventListener('dragover', (event) => event.preventDefault())
  window.addEventListener('drop', (event) => {
    event.preventDefault()
    const file = event.dataTransfer?.files[0]
    if (file) void file.text().then((text) => openText.apply(app, { text, place: { name: file.name, path: null } }))
  })
}
