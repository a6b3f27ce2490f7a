import { mkdir, mkdtemp, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/** A stand-in for the built window, in a folder that also holds what must not be served. */
export async function windowFolder(): Promise<string> {
  const root = await mkdtemp(join(tmpdir(), 'latchwright-window-'))
  await mkdir(join(root, 'renderer', 'assets'), { recursive: true })
  await writeFile(join(root, 'secret.txt'), 'not for the window')
  await writeFile(join(root, 'renderer', 'index.html'), '<!doctype html><title>Latchwright</title>')
  await writeFile(join(root, 'renderer', 'assets', 'main-AbCd1234.js'), 'export {}')
  await writeFile(join(root, 'renderer', '.hidden'), 'hidden')
  return join(root, 'renderer')
}
