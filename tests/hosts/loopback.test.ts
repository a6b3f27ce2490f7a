import { request as httpRequest, type IncomingHttpHeaders } from 'node:http'
import { connect } from 'node:net'
import { readFile, symlink, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { tmpdir } from 'node:os'
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
import { startLoopback } from '../../main/loopback'
import { bodyLimit_bytes } from '../../main/loopback/body'
import { pressStyle } from '../../main/usecases/window-policy'
import { loopback, plainCompute } from './hosts'
import { windowFolder } from './window-folder'

vi.mock('electron', () => import('./electron-fake'))

interface Answer { status: number; headers: IncomingHttpHeaders; body: string }
let host: Awaited<ReturnType<typeof loopback>>
beforeAll(async () => { host = await loopback() })
afterAll(() => host.close())

/** One request with exactly these headers and this path, nothing tidied up. */
function send(path: string, { method = 'GET', headers = {}, body }: { method?: string; headers?: Record<string, string>; body?: string } = {}, port = host.port): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const request = httpRequest({ host: '127.0.0.1', port, path, method, headers, setHost: !('host' in headers) }, (response) => {
      let text = ''
      response.setEncoding('utf8').on('data', (chunk: string) => { text += chunk })
      response.on('end', () => resolve({ status: response.statusCode ?? 0, headers: response.headers, body: text }))
    })
    request.on('error', reject)
    request.end(body)
  })
}
const good = () => ({ 'content-type': 'application/json', 'x-latchwright-token': host.token })
const about = (headers: Record<string, string>) => send('/api/about', { method: 'POST', headers, body: '{}' })

describe('who is answered', () => {
  test('the page with its token', async () => {
    const answer = await about({ ...good(), origin: `http://127.0.0.1:${host.port}`, host: `127.0.0.1:${host.port}` })
    expect(answer.status).toBe(200)
    expect(JSON.parse(answer.body)).toMatchObject({ ok: true, value: { host: 'loopback' } })
  })

  test.each([[''], ['wrong'], ['x'.repeat(32)]])('not the token %j', async (token) => {
    expect((await about({ ...good(), 'x-latchwright-token': token })).status).toBe(403)
  })

  test('not without a token', async () => {
    expect((await about({ 'content-type': 'application/json' })).status).toBe(403)
  })

  test.each(['evil.example', 'evil.example:80', '127.0.0.1.evil.example', 'localhost@evil.example', '127.0.0.2', '0.0.0.0', ''])('not the host name %j', async (name) => {
    expect((await about({ ...good(), host: name })).status).toBe(403)
    expect((await send('/', { headers: { host: name } })).status).toBe(403)
  })

  test.each(['localhost:8080', '[::1]:4000', 'LOCALHOST', '127.0.0.1:1'])('a forwarded port as %s', async (name) => {
    expect((await about({ ...good(), host: name, origin: `http://${name}` })).status).toBe(200)
  })

  test.each(['http://evil.example', 'null', 'http://localhost:1', 'https://127.0.0.1'])('not the origin %s', async (origin) => {
    expect((await about({ ...good(), origin })).status).toBe(403)
  })

  test.each(['cross-site', 'same-site'])('no %s page', async (site) => {
    expect((await about({ ...good(), 'sec-fetch-site': site })).status).toBe(403)
  })

  test('only on this machine', async () => {
    const elsewhere = await new Promise((resolve) => {
      const socket = connect({ host: '127.0.0.2', port: host.port })
      socket.once('connect', () => { socket.destroy(); resolve('answered') }).once('error', () => resolve('refused'))
    })
    expect(elsewhere).toBe('refused')
  })
})

describe('what is taken', () => {
  test('POST alone', async () => {
    expect((await send('/api/about', { headers: good() })).status).toBe(405)
    expect((await send('/', { method: 'PUT' })).status).toBe(405)
  })
  test('JSON alone', async () => {
    expect((await about({ ...good(), 'content-type': 'text/plain' })).status).toBe(415)
    expect((await send('/api/about', { method: 'POST', headers: good(), body: '{' })).status).toBe(400)
    expect((await send('/api/about', { method: 'POST', headers: good(), body: '' })).status).toBe(400)
  })
  test('not more than the limit, said or unsaid', async () => {
    const body = `"${'x'.repeat(bodyLimit_bytes)}"`
    const said = await send('/api/about', { method: 'POST', headers: { ...good(), 'content-length': String(body.length) }, body })
    const unsaid = await send('/api/about', { method: 'POST', headers: { ...good(), 'transfer-encoding': 'chunked' }, body })
    expect([said.status, unsaid.status]).toEqual([413, 413])
    expect((await about(good())).status).toBe(200)
  })
  test('a plan text of the largest size', async () => {
    const answer = await send('/api/document.read', { method: 'POST', headers: good(), body: JSON.stringify({ text: '\n'.repeat(5_000_000) }) })
    expect(JSON.parse(answer.body)).toMatchObject({ error: { code: 'bad_document' } })
  })
})

describe('what is served', () => {
  test('the window, with strict headers', async () => {
    const { status, headers, body } = await send('/', { headers: { connection: 'keep-alive' } })
    expect([status, headers.connection]).toEqual([200, 'keep-alive'])
    expect(body).toContain('<title>Latchwright')
    expect(headers['content-type']).toBe('text/html; charset=utf-8')
    expect(headers['cache-control']).toBe('no-store')
    const policy = String(headers['content-security-policy'])
    expect(policy).toContain("default-src 'none'")
    expect(policy).toContain("script-src 'self';")
    expect(policy).toContain("frame-ancestors 'none'")
    expect(policy).not.toMatch(/unsafe|http:|https:|\*/)
    expect(headers).toMatchObject({ 'x-content-type-options': 'nosniff', 'referrer-policy': 'no-referrer', 'cross-origin-opener-policy': 'same-origin' })
    expect(headers['access-control-allow-origin']).toBeUndefined()
  })
  test('its scripts, to be kept', async () => {
    const { headers } = await send('/assets/main-AbCd1234.js?x=1')
    expect(headers['content-type']).toBe('text/javascript; charset=utf-8')
    expect(headers['cache-control']).toContain('immutable')
  })
  test('no body for HEAD', async () => {
    const { status, body, headers } = await send('/', { method: 'HEAD' })
    expect([status, body]).toEqual([200, ''])
    expect(Number(headers['content-length'])).toBeGreaterThan(10)
  })
  test.each([
    '/../secret.txt', '/assets/../../secret.txt', '/%2e%2e/secret.txt', '/..%2fsecret.txt', '/..%5csecret.txt', '/..\\secret.txt', '//secret.txt',
    '/assets/..%2f..%2fsecret.txt', '/%00', '/index.html%00.js', '/%', '/.hidden', '/assets', '/C:/secret.txt', '/etc/passwd', '/enter/guess', '/enter/',
  ])('nothing at %s', async (path) => {
    const { status, body, headers } = await send(path, { headers: { connection: 'keep-alive' } })
    expect([status, headers.connection]).toEqual([404, 'close'])
    expect(body).not.toContain('not for the window')
  })
  test('nothing through a link that leads out', async () => {
    const root = await windowFolder()
    await symlink(join(root, '..', 'secret.txt'), join(root, 'link.txt'))
    const other = await startLoopback({ root, compute: plainCompute() })
    expect((await send('/link.txt', {}, other.port)).status).toBe(404)
    await other.close()
  })
})

describe('the plan it was started with', () => {
  test('is handed to the page that has the token', async () => {
    const planFile = join(tmpdir(), `latchwright given ${process.pid}.bank.json`)
    await writeFile(planFile, '{"title":"given"}')
    const other = await loopback({ planFile })
    expect(new URLSearchParams(new URL(other.url).hash.slice(1)).get('open')).toBe(`latchwright given ${process.pid}.bank.json`)
    const given = (token: string) => send('/given-plan', { method: 'POST', headers: { ...good(), 'x-latchwright-token': token }, body: '{}' }, other.port)
    expect((await given('wrong')).status).toBe(403)
    expect(JSON.parse((await given(other.token)).body)).toEqual({ ok: true, value: { name: `latchwright given ${process.pid}.bank.json`, text: '{"title":"given"}' } })
    await other.close()
  })
  test('is none without one', async () => {
    expect(JSON.parse((await send('/given-plan', { method: 'POST', headers: good(), body: '{}' })).body)).toEqual({ ok: true, value: null })
  })
  test('must be there', async () => {
    await expect(loopback({ planFile: '/nowhere/at.all' })).rejects.toThrow('/nowhere/at.all')
  })
})

test('a taken port is said plainly', async () => {
  await expect(loopback({ port: host.port })).rejects.toThrow(`Port ${host.port} is taken`)
})

test('a host that may choose takes the same port again, and another when that is taken', async () => {
  const [one, two] = [await loopback(), await loopback()]
  expect(two.port).not.toBe(one.port)
  await one.close()
  const again = await loopback({ port: one.port })
  await Promise.all([two.close(), again.close()])
})

test('every host has its own token', async () => {
  const other = await loopback()
  expect(other.token).toHaveLength(32)
  expect(other.token).not.toBe(host.token)
  await other.close()
})

test('closing ends open connections and frees the port', async () => {
  const other = await loopback()
  const socket = connect({ host: '127.0.0.1', port: other.port })
  await new Promise((resolve) => socket.once('connect', resolve))
  const ended = new Promise((resolve) => socket.once('close', resolve))
  socket.resume()
  await other.close()
  await ended
  const again = await loopback({ port: other.port })
  await again.close()
})

test('the one inline style that is allowed is that of the controls', async () => {
  const source = await readFile(new URL('../../node_modules/react-aria/dist/private/interactions/usePress.mjs', import.meta.url), 'utf8')
  const attribute = /PRESSABLE_ATTRIBUTE = '([^']+)'/.exec(source)?.[1] ?? ''
  const written = /style\.textContent = `([^`]*)`\.trim\(\)/.exec(source)?.[1] ?? ''
  expect(written.replace(/\$\{[^}]+\}/, attribute).trim()).toBe(pressStyle)
})
