import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { vi } from 'vitest'
import type * as Fake from './electron-fake'
import { windowFolder } from './window-folder'

const out = fileURLToPath(new URL('../../out', import.meta.url))

/** Starts the desktop entry on a fresh fake Electron, with arguments as a person would give them. */
export async function startProgram(...given: string[]): Promise<typeof Fake> {
  const root = await windowFolder()
  vi.resetModules()
  vi.doMock('electron', () => import('./electron-fake'))
  const built = (...parts: string[]) => (parts[0] === 'main' ? join(out, ...parts) : join(root, '..', ...parts))
  vi.doMock('../../main/usecases/built-files', () => ({ built }))
  const kept = process.argv
  process.argv = ['electron', '.', ...given]
  const fake = await import('./electron-fake')
  try {
    await import('../../main/electron')
    await vi.waitFor(() => {
      if (fake.seen.windows.length === 0 && fake.seen.exits.length === 0) throw new Error('not started yet')
    })
  } finally {
    process.argv = kept
  }
  return fake
}

/** The same program once more, with the data that the first one kept. */
export async function restartProgram(before: typeof Fake): Promise<typeof Fake> {
  process.env['LATCHWRIGHT_TEST_HOME'] = before.home
  try {
    return await startProgram()
  } finally {
    delete process.env['LATCHWRIGHT_TEST_HOME']
  }
}
