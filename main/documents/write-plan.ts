import { planJsonSchema, variants, type SchemaNode } from './plan-schema'

function childNode(node: SchemaNode | null, key: string): SchemaNode | null {
  if (!node) return null
  const owner = variants(node).find((variant) => variant.properties && Object.hasOwn(variant.properties, key))
  return owner?.properties?.[key] ?? null
}

function itemNode(node: SchemaNode | null): SchemaNode | null {
  return node ? variants(node).find((variant) => variant.items)?.items ?? null : null
}

function inOrder(value: unknown, node: SchemaNode | null): unknown {
  if (Array.isArray(value)) return value.map((item) => inOrder(item, itemNode(node)))
  if (typeof value !== 'object' || value === null) return value
  const known = node ? variants(node).flatMap((variant) => Object.keys(variant.properties ?? {})) : []
  const keys = Object.keys(value)
  const sorted = [...known.filter((key) => Object.hasOwn(value, key)), ...keys.filter((key) => !known.includes(key))]
  return Object.fromEntries(sorted.map((key) => [key, inOrder((value as Record<string, unknown>)[key], childNode(node, key))]))
}

/** The document with its keys in the order in which a plan is written; unknown keys follow in their own order. */
export function canonicalPlan(document: unknown): unknown {
  return inOrder(document, planJsonSchema)
}

/** The text of a plan file: two spaces, stable key order, a line break at the end. What is written is what was given. */
export function writePlan(document: unknown): string {
  return `${JSON.stringify(canonicalPlan(document), null, 2)}\n`
}
