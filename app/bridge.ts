import type { Call, ChannelName } from '../main/contract/channels'
import { fail, type Reply } from '../main/contract/errors'

/** How the window reaches the main side: one call, and which host answers. */
export interface Bridge {
  readonly host: 'desktop' | 'loopback'
  readonly call: Call
  /** The plan file that the host was started with; null when there is none. */
  given(): Promise<{ name: string; text: string } | null>
}

type Preload = Readonly<Record<string, ((request: unknown) => Promise<unknown>) | undefined>>

declare global {
  interface Window { latchwright?: Preload }
}

const tokenKey = 'latchwright.token'

interface Entry { readonly token: string; readonly given: boolean }

/** The token of the first page's address, kept for reloads and taken out of the address; and whether a file was named at the start. */
function takeEntry(): Entry {
  const fragment = new URLSearchParams(window.location.hash.slice(1))
  const token = fragment.get('token')
  if (token === null) return { token: window.sessionStorage.getItem(tokenKey) ?? '', given: false }
  window.sessionStorage.setItem(tokenKey, token)
  window.history.replaceState(null, '', window.location.pathname)
  return { token, given: fragment.has('open') }
}

async function overDesktop(preload: Preload, name: ChannelName, request: unknown): Promise<unknown> {
  const channel = preload[name]
  return channel ? channel(request) : fail('unknown_channel', `This program has no ${name}.`)
}

/** Names this window to the host, so that its older requests can be given up for newer ones. */
const windowName = crypto.randomUUID()

async function overLoopback(token: string, path: string, request: unknown): Promise<unknown> {
  const response = await fetch(path, {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'x-latchwright-token': token, 'x-latchwright-window': windowName },
    body: JSON.stringify(request),
  })
  const reply: unknown = await response.json().catch(() => null)
  return isReply(reply) ? reply : fail('compute_failed', `The program answered with ${response.status}.`)
}

function isReply(value: unknown): value is Reply<unknown> {
  return typeof value === 'object' && value !== null && 'ok' in value && typeof value.ok === 'boolean'
}

/** The bridge of the host this page runs in. Its calls never throw. */
export function createBridge(): Bridge {
  const preload = window.latchwright
  const entry = preload ? { token: '', given: false } : takeEntry()
  const send = (name: ChannelName, request: unknown) =>
    (preload ? overDesktop(preload, name, request) : overLoopback(entry.token, `/api/${name}`, request))
  const call = async (name: ChannelName, request: unknown) => {
    try {
      return await send(name, request)
    } catch {
      return fail('compute_failed', 'The program does not answer. Is it still running?')
    }
  }
  const given = async () => {
    if (!entry.given) return null
    const reply = await overLoopback(entry.token, '/given-plan', {}).catch(() => null)
    return isReply(reply) && reply.ok ? (reply.value as { name: string; text: string } | null) : null
  }
  return { host: preload ? 'desktop' : 'loopback', call: call as Call, given }
}
