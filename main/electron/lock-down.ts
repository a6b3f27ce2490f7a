import { app, session, type WebContents } from 'electron'
import { isWindowAddress } from './window-files'

/** What a page may do beyond showing itself: put a copied table on the clipboard. */
const permitted: readonly string[] = ['clipboard-sanitized-write']

/** Refuses every permission every download and every address but the window's own, for all pages of the program. */
export function lockDownSession(): void {
  const own = session.defaultSession
  own.setPermissionRequestHandler((contents, permission, decide) => decide(permitted.includes(permission) && isWindowAddress(contents.getURL())))
  own.setPermissionCheckHandler((contents, permission) => permitted.includes(permission) && isWindowAddress(contents?.getURL() ?? ''))
  own.setDevicePermissionHandler(() => false)
  own.on('will-download', (event) => event.preventDefault())
  own.webRequest.onBeforeRequest((details, decide) => decide({ cancel: !isAllowedAddress(details.url) }))
}

const isAllowedAddress = (url: string) => isWindowAddress(url) || /^(data|blob|devtools):/.test(url)

/** Refuses navigation, new windows and embedded pages in every page that is ever created. */
export function lockDownPages(): void {
  app.on('web-contents-created', (_event, contents) => lockDownPage(contents))
}

function lockDownPage(contents: WebContents): void {
  contents.setWebRTCIPHandlingPolicy('disable_non_proxied_udp')
  contents.setWindowOpenHandler(() => ({ action: 'deny' }))
  contents.on('will-navigate', (event) => event.preventDefault())
  contents.on('will-redirect', (event) => event.preventDefault())
  contents.on('will-frame-navigate', (event) => event.preventDefault())
  contents.on('will-attach-webview', (event) => event.preventDefault())
}
