import { existsSync } from 'node:fs'
import { chmod, mkdtemp, readFile, stat, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { expect, test, vi } from 'vitest'
import { findBrowser, hasDisplay, openAppWindow } from '../../main/loopback/app-window'
import { loopback } from './hosts'

vi.mock('electron', () => import('./electron-fake'))

test('a display is known by its variables, or by the system', () => {
  expect(hasDisplay({ platform: 'linux', env: {} })).toBe(false)
  expect(hasDisplay({ platform: 'linux', env: { DISPLAY: ':0' } })).toBe(true)
  expect(hasDisplay({ platform: 'linux', env: { WAYLAND_DISPLAY: 'wayland-0' } })).toBe(true)
  expect(hasDisplay({ platform: 'darwin', env: {} })).toBe(true)
})

test('a browser is looked for on the path, one that can be started', async () => {
  const folder = await mkdtemp(join(tmpdir(), 'latchwright-path-'))
  const env = { PATH: folder }
  await writeFile(join(folder, 'google-chrome'), '')
  expect(findBrowser({ platform: 'linux', env })).toBeNull()
  await chmod(join(folder, 'google-chrome'), 0o755)
  await writeFile(join(folder, 'chromium-browser'), '')
  expect(findBrowser({ platform: 'linux', env })).toBe(join(folder, 'google-chrome'))
  expect(openAppWindow('http://127.0.0.1:1/', { platform: 'linux', env })).toBeNull()
})

test('the browser gets an entry that works once, never the token', async () => {
  const folder = await mkdtemp(join(tmpdir(), 'latchwright-path-'))
  await writeFile(join(folder, 'chromium'), `#!/bin/sh\nprintf '%s\\n' "$@" > "${folder}/asked"\n`, { mode: 0o755 })
  const kept = { PATH: process.env.PATH, DISPLAY: process.env.DISPLAY }
  Object.assign(process.env, { PATH: `${folder}:${kept.PATH}`, DISPLAY: ':77' })
  const host = await loopback({ open: true })
  try {
    expect(host.opened).toBe(true)
    const asked = await vi.waitFor(async () => {
      const text = await readFile(join(folder, 'asked'), 'utf8')
      expect(text).toContain('--app=')
      return text
    })
    expect(asked).not.toContain(host.token)
    expect(asked).not.toContain('/enter/')
    const page = fileURLToPath(/--app=(\S+)/.exec(asked)?.[1] ?? '')
    expect([(await stat(page)).mode & 0o777, (await stat(dirname(page))).mode & 0o777]).toEqual([0o600, 0o700])
    const entry = /url=([^"]+)/.exec(await readFile(page, 'utf8'))?.[1] ?? ''
    const answer = await fetch(entry, { redirect: 'manual' })
    expect([answer.status, answer.headers.get('location')]).toEqual([302, `/#token=${host.token}`])
    expect((await fetch(entry, { redirect: 'manual' })).status).toBe(404)
    expect(existsSync(dirname(page))).toBe(false)
  } finally {
    process.env.PATH = kept.PATH
    if (kept.DISPLAY === undefined) delete process.env.DISPLAY
    else process.env.DISPLAY = kept.DISPLAY
    await host.close()
  }
})
