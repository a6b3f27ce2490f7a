/* Which part of the program may import which; the linter and a test read the same table. */
import { dirname, join, normalize } from 'node:path/posix'

/** Part of a file, by its path from the root; the first that fits. */
const parts = [
  ['contract', /^main\/contract\//], ['planner', /^main\/planner\//], ['documents', /^main\/documents\//], ['trials', /^main\/trials\//],
  ['sheet', /^main\/sheet\//], ['exports', /^main\/exports\//], ['usecases', /^main\/usecases\//], ['preload', /^main\/preload\.ts$/],
  ['electron', /^main\/electron(\.ts$|\/)/], ['loopback', /^main\/loopback(\.ts$|\/)/], ['headless', /^main\/headless(\.ts$|\/)/],
  ['tools', /^main\/tools\//], ['app', /^app\//], ['assets', /^assets\//], ['package', /^package\.json$/], ['independent', /^tests\/independent\//],
  ['tests', /^tests\//],
]

/** Parts that a part may import beside itself. Files and numbers are reached by the hosts through use cases, never the planner itself. */
const arrows = {
  contract: [],
  planner: ['contract'],
  documents: ['contract', 'assets'],
  trials: ['planner', 'contract'],
  sheet: ['contract', 'assets'],
  exports: ['contract'],
  usecases: ['documents', 'trials', 'sheet', 'exports', 'planner', 'contract', 'package'],
  preload: ['contract'],
  electron: ['headless', 'usecases', 'documents', 'contract', 'package'],
  loopback: ['usecases', 'documents', 'contract'],
  headless: ['loopback', 'usecases', 'documents', 'contract'],
  app: ['contract', 'assets'],
}

/** Packages of parts that may use few; null: none but these. */
const packages = {
  contract: [/^zod$/],
  planner: [],
  trials: [/^tinypool$/, /^node:worker_threads$/],
  app: [/^(?!node:|electron$|commander$|pdfmake|tinypool$|write-file-atomic$).*/],
}
const shellOnly = /^electron(\/|$)/
const shellParts = ['electron', 'preload']
const builtIn = /^(node:)?(assert|buffer|child_process|cluster|crypto|dns|events|fs|http|https|net|os|path|process|stream|tls|url|util|v8|vm|worker_threads|zlib)(\/|$)/

export function partOf(path) {
  return parts.find(([, pattern]) => pattern.test(path))?.[0] ?? null
}

function packageFault(from, specifier) {
  if (shellOnly.test(specifier) && !shellParts.includes(from)) return 'only the desktop shell may import electron'
  const allowed = packages[from]
  if (!allowed || allowed.some((pattern) => pattern.test(specifier))) {
    return from === 'app' && builtIn.test(specifier) ? 'the window has no Node' : null
  }
  return `${from} may not import ${specifier}`
}

/**
 * What is wrong with an import, or null.
 *
 * @param file       importing file, from the root of the project, with forward slashes
 * @param specifier  as written
 */
export function importFault(file, specifier) {
  const from = partOf(file)
  if (from === null || from === 'tests' || from === 'tools') return null
  if (!specifier.startsWith('.')) return from === 'independent' ? null : packageFault(from, specifier)
  const target = normalize(join(dirname(file), specifier))
  if (target.startsWith('node_modules/')) return packageFault(from, target.slice('node_modules/'.length))
  const to = partOf(`${target}.ts`.replace(/(\.json|\.css|\.mjs|\.ts|\.tsx)\.ts$/, '$1')) ?? partOf(`${target}/`)
  if (from === 'independent') return to === 'independent' || to === 'assets' || target.startsWith('tests/published/') ? null : 'the independent computation imports nothing of the program'
  if (to === from || arrows[from]?.includes(to)) return null
  return `${from} may not import ${to ?? target}`
}
