import { createRoot } from 'react-dom/client'
import { I18nProvider } from 'react-aria-components'
import { createBridge } from './bridge'
import { listenForShortcuts } from './commands/shortcuts'
import { browserFiles } from './files/browser-files'
import { desktopFiles } from './files/desktop-files'
import { Desk } from './rooms/desk'
import { begin } from './state/begin'
import { AppContext } from './state/use-store'
import './styles/fonts.css'
import './styles/tokens.css'
import './styles/base.css'
import './styles/layout.css'
import './styles/controls.css'
import './rooms/bar/bar.css'
import './rooms/brief/brief.css'
import './rooms/bank/bank.css'
import './rooms/ledger/ledger.css'
import './rooms/below/below.css'
import './rooms/corners/corners.css'

const bridge = createBridge()
const files = bridge.host === 'desktop' ? desktopFiles(bridge.call) : browserFiles()
const app = await begin(bridge, files)
listenForShortcuts(app)

createRoot(document.getElementById('root')!).render(
  <I18nProvider locale="en-GB">
    <AppContext value={app}><Desk /></AppContext>
  </I18nProvider>,
)
