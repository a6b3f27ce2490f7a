import { Button, Dialog, Heading, Modal, ModalOverlay } from 'react-aria-components'
import { cautionText } from '../../main/contract/caution'
import { shortcutCommands } from '../commands/index'
import { savePlan } from '../commands/save-plan'
import { shortcutText } from '../commands/shortcuts'
import { useApp, useStore } from '../state/use-store'

/** The dialog that is open, if any. */
export function Dialogs() {
  const app = useApp()
  const dialog = useStore(app.views, (state) => state.dialog)
  const close = () => app.views.patch({ dialog: null })
  return (
    <ModalOverlay className="veil" isOpen={dialog !== null} isDismissable onOpenChange={(open) => { if (!open) close() }}>
      <Modal className="dialog">
        <Dialog>
          {dialog?.kind === 'about' && <About onClose={close} />}
          {dialog?.kind === 'shortcuts' && <Shortcuts onClose={close} />}
          {dialog?.kind === 'discard' && <Discard proceed={dialog.proceed} onClose={close} />}
        </Dialog>
      </Modal>
    </ModalOverlay>
  )
}

function About({ onClose }: { onClose(): void }) {
  const app = useApp()
  const about = useStore(app.library, (state) => state.about)
  return (
    <>
      <Heading slot="title" level={2}>{about?.name ?? 'Latchwright'}</Heading>
      <p className="caution">{about?.caution ?? cautionText}</p>
      <p>
        Plans the comparators of a data converter: limits, sizes, power, area and yield, each number with its workings.
        It works without a network; nothing leaves this machine.
      </p>
      <p className="muted">
        Version {about?.version ?? 'unknown'}, {app.bridge.host === 'desktop' ? 'desktop window' : 'browser window'}.
        The typefaces are Atkinson Hyperlegible and DejaVu, under their open licences.
      </p>
      <div className="actions"><Button className="button" autoFocus onPress={onClose}>Close</Button></div>
    </>
  )
}

const placeKeys: readonly (readonly [string, string])[] = [
  ['In the bank: walk the cells', 'Arrows'], ['In the bank: first, last', 'Home, End'], ['In the bank: nearer, farther, all', '+, −, 0'],
  ['In a field: one step, ten steps', '↑ ↓, Page ↑ ↓'], ['In a field: what was there before', 'Escape'], ['In a choice: back to the default', 'Delete'],
]

function Shortcuts({ onClose }: { onClose(): void }) {
  return (
    <>
      <Heading slot="title" level={2}>Keyboard</Heading>
      <dl className="keys">
        {shortcutCommands.map(({ id, label, shortcut }) => (shortcut === null ? null
          : <div key={id} style={{ display: 'contents' }}><dt>{label}</dt><dd><kbd>{shortcutText(shortcut)}</kbd></dd></div>))}
        {placeKeys.map(([label, keys]) => <div key={label} style={{ display: 'contents' }}><dt>{label}</dt><dd><kbd>{keys}</kbd></dd></div>)}
      </dl>
      <div className="actions"><Button className="button" autoFocus onPress={onClose}>Close</Button></div>
    </>
  )
}

function Discard({ proceed, onClose }: { proceed(): void; onClose(): void }) {
  const app = useApp()
  const title = useStore(app.documents, (state) => state.document.title ?? 'This plan')
  const go = () => {
    onClose()
    proceed()
  }
  return (
    <>
      <Heading slot="title" level={2}>Leave changes behind?</Heading>
      <p>“{title}” has changes that are not saved. They are lost when another plan takes its place.</p>
      <div className="actions">
        <Button className="button" onPress={go}>Leave them</Button>
        <Button className="button" onPress={() => { onClose(); void savePlan.apply(app) }}>Save first</Button>
        <Button className="button primary" autoFocus onPress={onClose}>Stay here</Button>
      </div>
    </>
  )
}
