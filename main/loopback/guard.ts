import { timingSafeEqual } from 'node:crypto'
import type { IncomingHttpHeaders } from 'node:http'

export const tokenHeader = 'x-latchwright-token'
export const windowHeader = 'x-latchwright-window'

const loopbackNames = ['127.0.0.1', 'localhost', '[::1]']

/** Whether a request was made under a name of this machine; any other name reached us by rebinding. The port may be a forwarded one. */
export function hostAllowed(headers: IncomingHttpHeaders): boolean {
  const host = /^(\[[0-9a-f:.]+\]|[^:@/]+)(:\d{1,5})?$/i.exec(headers.host ?? '')
  return host !== null && loopbackNames.includes(host[1].toLowerCase())
}

/** Whether a request comes from the window's own page; a program that sends no origin at all passes, and still needs the token. */
export function originAllowed(headers: IncomingHttpHeaders): boolean {
  const site = headers['sec-fetch-site']
  if (site !== undefined && site !== 'same-origin' && site !== 'none') return false
  return headers.origin === undefined || headers.origin === `http://${headers.host}`
}

/** Compares the token of a request with the host's, in constant time. */
export function tokenAllowed(headers: IncomingHttpHeaders, token: string): boolean {
  const given = Buffer.from(String(headers[tokenHeader] ?? ''))
  const expected = Buffer.from(token)
  return given.length === expected.length && timingSafeEqual(given, expected)
}

/** Name of the asking window, for replacing its older requests; null when it gave none that is usable. */
export function windowOf(headers: IncomingHttpHeaders): string | null {
  const name = headers[windowHeader]
  return typeof name === 'string' && /^[\w-]{1,64}$/.test(name) ? name : null
}
