import { protocol } from 'electron'
import { dirname } from 'node:path'
import { built } from '../usecases/built-files'
import { readStatic } from '../usecases/window-files'
import { securityHeaders } from '../usecases/window-policy'

const scheme = 'latchwright'

/** Address of the window's page. */
export const windowAddress = `${scheme}://window/index.html`

/** Whether an address belongs to the window's own page. */
export function isWindowAddress(address: string): boolean {
  const url = URL.canParse(address) ? new URL(address) : null
  return url !== null && url.protocol === `${scheme}:` && url.host === 'window'
}

/** Makes the window's own address a secure origin. Must run before the program is ready. */
export function registerWindowScheme(): void {
  protocol.registerSchemesAsPrivileged([{ scheme, privileges: { standard: true, secure: true, supportFetchAPI: true } }])
}

/** Serves the built window under its own address, with the same rules as the browser host. */
export function serveWindowFiles(root = dirname(built('renderer', 'index.html'))): void {
  protocol.handle(scheme, async (request) => {
    const file = isWindowAddress(request.url) && request.method === 'GET' ? await readStatic(root, new URL(request.url).pathname) : null
    if (file === null) return new Response('', { status: 404, headers: securityHeaders })
    return new Response(new Uint8Array(file.body), { headers: { ...securityHeaders, 'content-type': file.type, 'cache-control': file.cache } })
  })
}
