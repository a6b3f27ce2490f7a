import { readdirSync, readFileSync } from 'node:fs'
import { join, relative, sep } from 'node:path'
import { fileURLToPath } from 'node:url'

export const root = fileURLToPath(new URL('../..', import.meta.url))

/** What tools leave at the top and version control leaves out. */
const leftOut = /^(node_modules|out|out-.*|release|dist|shots|coverage|test-results|playwright-report|\.git|.*\.log|\.DS_Store)$/

function walk(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name)
    return entry.isDirectory() ? walk(path) : [path]
  })
}

/** Names at the top of the project, without what version control leaves out. */
export const topNames: readonly string[] = readdirSync(root).filter((name) => !leftOut.test(name))

/** Every file of the project, from its root, with forward slashes. */
export function projectFiles(): string[] {
  return topNames.flatMap((name) => {
    const path = join(root, name)
    const entry = readdirSync(root, { withFileTypes: true }).find((found) => found.name === name)
    return entry?.isDirectory() ? walk(path) : [path]
  }).map((path) => relative(root, path).split(sep).join('/'))
}

export function textOf(file: string): string {
  return readFileSync(join(root, file), 'utf8')
}

export const isCode = (file: string): boolean => /\.(ts|tsx|mjs)$/.test(file)
