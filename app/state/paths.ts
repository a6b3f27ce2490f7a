/** Dotted paths into a plan document, `overrides.0.value` included. */
type Node = Record<string, unknown>

const isNode = (value: unknown): value is Node => typeof value === 'object' && value !== null

/** What stands at a path; undefined where nothing does. */
export function valueAt(root: unknown, path: string): unknown {
  if (path === '') return root
  return path.split('.').reduce<unknown>((node, key) => (isNode(node) && Object.hasOwn(node, key) ? node[key] : undefined), root)
}

/** Puts a value at a path of a draft, making the blocks on the way. */
export function putAt(root: unknown, path: string, value: unknown): void {
  const keys = path.split('.')
  const last = keys.pop()
  if (last === undefined || !isNode(root)) return
  let node = root
  for (const key of keys) {
    if (!isNode(node[key])) node[key] = {}
    node = node[key] as Node
  }
  node[last] = value
}

/** Takes a key out of a draft, and the optional blocks that are empty after it. */
export function dropAt(root: unknown, path: string): void {
  const keys = path.split('.')
  const last = keys.pop()
  const parent = valueAt(root, keys.join('.'))
  if (last === undefined || !isNode(parent)) return
  if (Array.isArray(parent)) parent.splice(Number(last), 1)
  else delete parent[last]
  if (keys.length > 0 && keys.join('.') !== 'converter' && Object.keys(parent).length === 0) dropAt(root, keys.join('.'))
}

/** Whether two JSON values are the same. */
export function sameJson(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true
  if (!isNode(a) || !isNode(b) || Array.isArray(a) !== Array.isArray(b)) return false
  const keys = Object.keys(a)
  return keys.length === Object.keys(b).length && keys.every((key) => Object.hasOwn(b, key) && sameJson(a[key], b[key]))
}
