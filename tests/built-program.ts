import { execFile } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'

const run = promisify(execFile)
const fileOf = (path: string) => fileURLToPath(new URL(`../${path}`, import.meta.url))

/** The command of the checkout, as `npx latchwright` runs it. */
export const commandFile = fileOf('main/tools/latchwright.mjs')

/** Builds the program when its sources are newer; for the `beforeAll` of tests that need out/. */
export async function ensureBuilt(): Promise<void> {
  await run(process.execPath, [fileOf('main/tools/prepare.mjs')])
}
