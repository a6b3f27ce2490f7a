import type { Reply } from '../../main/contract/errors'
import { startLoopback, type Loopback, type LoopbackOptions } from '../../main/loopback'
import { directCompute } from '../../main/usecases/compute'
import type { ComputePool } from '../../main/usecases/compute-pool'
import { createAnswer } from '../../main/usecases/handlers'
import { listenOnChannels } from '../../main/electron/channels'
import { callFrom, FakeWindow } from './electron-fake'
import { windowFolder } from './window-folder'

export type Ask = (name: string, request: unknown) => Promise<Reply<unknown>>
export interface Host { readonly ask: Ask; close(): Promise<void> }

/** The planner itself, in this thread, as the port the hosts compute through. */
export function plainCompute(): ComputePool {
  const direct = directCompute()
  return { ...direct, view: () => direct }
}

export async function loopback(options: LoopbackOptions = {}): Promise<Loopback & { token: string }> {
  const host = await startLoopback({ root: await windowFolder(), compute: plainCompute(), ...options })
  return { ...host, token: new URLSearchParams(new URL(host.url).hash.slice(1)).get('token') ?? '' }
}

/** Over real HTTP, as the page does it. */
export async function loopbackHost(): Promise<Host> {
  const host = await loopback()
  const ask: Ask = async (name, request) => {
    const answer = await fetch(`http://127.0.0.1:${host.port}/api/${name}`, {
      method: 'POST', headers: { 'content-type': 'application/json', 'x-latchwright-token': host.token }, body: JSON.stringify(request),
    })
    return await answer.json() as Reply<unknown>
  }
  return { ask, close: host.close }
}

/** Through the listeners that the shell hands to Electron. */
export async function desktopHost(): Promise<Host> {
  const answer = createAnswer({ compute: plainCompute(), host: 'desktop' })
  listenOnChannels((name, request, window) => answer(name, request, { window: String(window.webContents.id) }))
  const window = new FakeWindow({ webPreferences: {} })
  const ask: Ask = async (name, request) => await callFrom(window, name, structuredClone(request)) as Reply<unknown>
  return { ask, close: async () => undefined }
}
