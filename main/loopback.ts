import { randomBytes } from 'node:crypto'
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { userInfo } from 'node:os'
import { dirname } from 'node:path'
import { fail } from './contract/errors'
import { answerApi, send, type Api } from './loopback/api'
import { openAppWindow } from './loopback/app-window'
import { hostAllowed } from './loopback/guard'
import { built } from './usecases/built-files'
import { poolCompute, type ComputePool } from './usecases/compute-pool'
import { createAnswer } from './usecases/handlers'
import { readPlanText, type PlanText } from './usecases/plan-text'
import { readStatic } from './usecases/window-files'
import { securityHeaders } from './usecases/window-policy'

/** How long an idle connection stays open: a page that comes back after a pause must not meet one that is just closing. */
const idle_ms = 600_000
/** More than any browser opens to one host. */
const mostConnections = 64

export interface LoopbackOptions {
  /** Port, 0…65535; 0 or absent: the usual one of this account, so that the page finds its recovery copy again, or else any free one. */
  port?: number
  /** Open the window in an installed browser as well, where there is a display. */
  open?: boolean
  /** A plan file to start with, as named on the command line; the page never names one. */
  planFile?: string
  /** Folder of the built window; default: that of the build output. */
  root?: string
  /** Where to compute; default: worker threads. The host closes it. */
  compute?: ComputePool
}

export interface Loopback {
  /** Address with the token in its fragment, for the person who started the host. */
  readonly url: string
  readonly port: number
  /** Whether a browser window was opened. */
  readonly opened: boolean
  close(): Promise<void>
}

/**
 * Serves the window to a browser of this machine, on 127.0.0.1 only.
 *
 * @returns the running host
 * @throws  Error with a message for the person at the terminal when the port is taken, the plan file cannot be read or nothing is built
 */
export async function startLoopback(options: LoopbackOptions = {}): Promise<Loopback> {
  const root = options.root ?? dirname(built('renderer', 'index.html'))
  const given = options.planFile === undefined ? null : await givenPlan(options.planFile)
  const compute = options.compute ?? poolCompute()
  const api: Api = { answer: createAnswer({ compute, host: 'loopback' }), token: randomBytes(24).toString('base64url'), given }
  const fragment = `#token=${api.token}${given === null ? '' : `&open=${encodeURIComponent(given.name)}`}`
  const entry = `/enter/${randomBytes(24).toString('base64url')}`
  const site: Site = { api, root, fragment, entries: new Set([entry]), entered: () => undefined }
  const server = createServer((request, response) => {
    respond(site, request, response).catch(() => {
      if (response.headersSent) response.destroy()
      else send(response, 500, fail('compute_failed', 'The host could not answer this request.'))
    })
  })
  server.keepAliveTimeout = idle_ms
  server.maxConnections = mostConnections
  const port = options.port ? await listen(server, options.port) : await listen(server, usualPort()).catch(() => listen(server, 0))
  const removeEntry = options.open === true ? openAppWindow(`http://127.0.0.1:${port}${entry}`) : null
  site.entered = removeEntry ?? site.entered
  const close = async () => {
    site.entered()
    const closed = new Promise<void>((resolve) => server.close(() => resolve()))
    await compute.close()
    server.closeAllConnections()
    await closed
  }
  return { url: `http://127.0.0.1:${port}/${fragment}`, port, opened: removeEntry !== null, close }
}

async function givenPlan(path: string): Promise<PlanText> {
  const read = await readPlanText(path)
  if (!read.ok) throw new Error(read.error.message)
  return read.value
}

interface Site { readonly api: Api; readonly root: string; readonly fragment: string; readonly entries: Set<string>; entered: () => void }

async function respond(site: Site, request: IncomingMessage, response: ServerResponse): Promise<void> {
  if (!hostAllowed(request.headers)) return send(response, 403, fail('refused', 'Use 127.0.0.1 or localhost to reach this host.'))
  const pathname = (request.url ?? '/').split(/[?#]/)[0]
  if (pathname.startsWith('/api/') || pathname === '/given-plan') return answerApi(site.api, request, response, pathname)
  if (request.method !== 'GET' && request.method !== 'HEAD') return send(response, 405, fail('refused', 'Only GET is answered here.'))
  // An entry works once: command lines of running programs can be read by others on a shared machine, the token must not be in one.
  if (site.entries.delete(pathname)) {
    site.entered()
    response.writeHead(302, { ...securityHeaders, location: `/${site.fragment}`, 'cache-control': 'no-store' })
    response.end()
    return
  }
  await sendFile(site.root, request, response, pathname)
}

async function sendFile(root: string, request: IncomingMessage, response: ServerResponse, pathname: string): Promise<void> {
  const file = await readStatic(root, pathname)
  if (file === null) return send(response, 404, fail('not_found', 'There is no such file.'))
  response.writeHead(200, { ...securityHeaders, 'content-type': file.type, 'content-length': file.body.length, 'cache-control': file.cache })
  response.end(request.method === 'HEAD' ? undefined : file.body)
}

/** Pages keep what they remember by port, and accounts of a shared machine need ports of their own. */
const usualPort = () => 47_000 + (userInfo().uid + 1000) % 1000

function listen(server: Server, port: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const failed = (error: NodeJS.ErrnoException) => reject(new Error(listenMessage(error, port)))
    server.once('error', failed)
    server.listen({ host: '127.0.0.1', port, exclusive: true }, () => {
      server.off('error', failed)
      resolve((server.address() as AddressInfo).port)
    })
  })
}

function listenMessage(error: NodeJS.ErrnoException, port: number): string {
  if (error.code === 'EADDRINUSE') return `Port ${port} is taken. Choose another with --port, or leave it out for any free one.`
  if (error.code === 'EACCES') return `Port ${port} needs rights this account does not have. Choose one above 1023.`
  return `The host could not start on port ${port}: ${error.message}`
}
