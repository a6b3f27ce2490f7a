import type { IncomingMessage, ServerResponse } from 'node:http'
import { fail, succeed, type Reply } from '../contract/errors'
import type { Answer } from '../usecases/handlers'
import type { PlanText } from '../usecases/plan-text'
import { securityHeaders } from '../usecases/window-policy'
import { readJson } from './body'
import { originAllowed, tokenAllowed, windowOf } from './guard'

export interface Api {
  readonly answer: Answer
  readonly token: string
  /** The plan file that was named when the host was started. */
  readonly given: PlanText | null
}

/** Answers `POST /api/<channel>` and `POST /given-plan`; the reply of a use case always has status 200. */
export async function answerApi(api: Api, request: IncomingMessage, response: ServerResponse, pathname: string): Promise<void> {
  if (!originAllowed(request.headers)) return send(response, 403, fail('refused', 'This page is not the window of this host.'))
  if (!tokenAllowed(request.headers, api.token)) {
    return send(response, 403, fail('refused', 'The token is missing or wrong. Open the address that the program printed.'))
  }
  if (request.method !== 'POST') return send(response, 405, fail('refused', 'Only POST is answered here.'))
  if (!/^application\/json\b/i.test(request.headers['content-type'] ?? '')) {
    return send(response, 415, fail('bad_request', 'The request must be application/json.'))
  }
  const body = await readJson(request)
  if (!body.ok) return send(response, body.status, fail('bad_request', body.message))
  if (pathname === '/given-plan') return send(response, 200, succeed(api.given))
  const gone = new AbortController()
  response.once('close', () => gone.abort())
  const channel = pathname.slice('/api/'.length)
  send(response, 200, await api.answer(channel, body.value, { window: windowOf(request.headers), signal: gone.signal }))
}

/** Writes a reply as JSON. */
export function send(response: ServerResponse, status: number, reply: Reply<unknown>): void {
  const body = Buffer.from(JSON.stringify(reply))
  response.writeHead(status, {
    ...securityHeaders, 'content-type': 'application/json; charset=utf-8', 'content-length': body.length, 'cache-control': 'no-store',
    ...(status >= 400 && status < 500 ? { connection: 'close' } : {}),
  })
  response.end(body)
}
