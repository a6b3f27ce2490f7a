import { existsSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

/**
 * Finds a file of the built program, such as `built('renderer', 'index.html')`, from wherever this code runs:
 * inside the build output (whatever chunk it landed in), inside a package, or straight from the sources. Nothing above the
 * program's own folder, the one with its package.json, is looked at.
 *
 * @param parts  path below the build output folder
 * @returns      absolute path
 * @throws       Error when the program has not been built
 */
export function built(...parts: string[]): string {
  let folder = dirname(fileURLToPath(import.meta.url))
  for (;;) {
    const found = [join(folder, ...parts), join(folder, 'out', ...parts)].find((path) => existsSync(path))
    if (found !== undefined) return found
    const parent = dirname(folder)
    if (parent === folder || existsSync(join(folder, 'package.json'))) throw new Error(`${parts.join('/')} is missing from the build. Run: npm run build`)
    folder = parent
  }
}
