import { Button } from 'react-aria-components'
import { useApp, useStore } from '../state/use-store'
import { Icon } from './icon'

/** Something that happened and has to be known; stays until it is closed. */
export function NoticePlate() {
  const app = useApp()
  const notice = useStore(app.views, (state) => state.notice)
  if (!notice) return null
  const close = () => app.views.patch({ notice: null })
  return (
    <aside className="note-plate" data-tone={notice.tone} role={notice.tone === 'stop' ? 'alert' : 'status'}>
      <p>{notice.text}</p>
      <span>
        {notice.action && <Button className="button small" onPress={() => { close(); notice.action?.run() }}>{notice.action.label}</Button>}
        <Button className="button quiet square" aria-label="Close the notice" onPress={close}><Icon shape="close" /></Button>
      </span>
      {notice.details.length > 0 && <ul>{notice.details.slice(0, 20).map((line) => <li key={line}>{line}</li>)}</ul>}
    </aside>
  )
}
