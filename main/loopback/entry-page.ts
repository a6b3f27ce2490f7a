import { existsSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { homedir, tmpdir } from 'node:os'
import { basename, join } from 'node:path'
import { pathToFileURL } from 'node:url'

export interface EntryPage {
  /** Address of the page, a file that only this account can read. */
  readonly address: string
  remove(): void
}

/**
 * A page that leads on to an address that no command line may show, because others on a shared machine can read those.
 *
 * @param url      where it leads
 * @param browser  the executable that will read it
 */
export function writeEntryPage(url: string, browser: string): EntryPage {
  const folder = mkdtempSync(join(folderFor(browser), 'latchwright-'))
  const file = join(folder, 'window.html')
  const page = `<!doctype html><meta charset="utf-8"><title>Latchwright</title><meta http-equiv="refresh" content="0;url=${url}">\n`
  writeFileSync(file, page, { mode: 0o600, flag: 'wx' })
  return { address: pathToFileURL(file).href, remove: () => rmSync(folder, { recursive: true, force: true }) }
}

/** Chromium as a snap sees no temporary files but those in its own folder. */
function folderFor(browser: string): string {
  if (!basename(browser).startsWith('chromium') || !existsSync('/snap/bin/chromium')) return tmpdir()
  const folder = join(homedir(), 'snap', 'chromium', 'common')
  mkdirSync(folder, { recursive: true })
  return folder
}
