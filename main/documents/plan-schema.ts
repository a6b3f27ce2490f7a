import { z } from 'zod'
import { choices, type Choice } from '../contract/choices'
import { planSchema } from '../contract/plan'
import { quantities, type Quantity } from '../contract/quantities'

/** The parts of a JSON Schema that are read here. */
export interface SchemaNode {
  type?: string
  title?: string
  description?: string
  properties?: Record<string, SchemaNode>
  items?: SchemaNode
  anyOf?: SchemaNode[]
  enum?: string[]
  const?: string
  minimum?: number
  exclusiveMinimum?: number
  maximum?: number
  minLength?: number
  maxLength?: number
  minItems?: number
  maxItems?: number
}

export type Path = readonly (string | number)[]

function describeQuantity(quantity: Quantity): string {
  const unit = quantity.unit === '' ? '' : ` [${quantity.unit}]`
  const empty = quantity.nullMeans === undefined ? '' : ` null: ${quantity.nullMeans}.`
  return `${quantity.symbol}${unit}. ${quantity.help}${empty}`
}

function describe(node: SchemaNode, path: string): void {
  const quantity = (quantities as Record<string, Quantity>)[path]
  const choice = (choices as Record<string, Choice>)[path]
  if (quantity) Object.assign(node, { title: quantity.label, description: describeQuantity(quantity) })
  if (choice) {
    const later = choice.later ? ` Still to come: ${choice.later.join(', ')}.` : ''
    Object.assign(node, { title: choice.label, description: choice.help + later })
  }
  for (const [key, child] of Object.entries(node.properties ?? {})) describe(child, path === '' ? key : `${path}.${key}`)
}

function build(): SchemaNode {
  const schema = z.toJSONSchema(planSchema, { io: 'input', target: 'draft-2020-12' }) as SchemaNode
  describe(schema, '')
  return { ...schema, title: 'Latchwright plan', description: 'One converter, one process card, one comparator, budgets, overrides. SI units; the unit is in the key.' }
}

/** The JSON Schema of a plan as it may be written; derived from the same definition that checks plans. */
export const planJsonSchema: SchemaNode = build()

/** The variants of a node with their wrapping taken off. */
export function variants(node: SchemaNode): SchemaNode[] {
  return node.anyOf ? node.anyOf.flatMap(variants) : [node]
}

function child(node: SchemaNode, step: string | number): SchemaNode | null {
  for (const variant of variants(node)) {
    if (typeof step === 'number' && variant.items) return variant.items
    if (variant.properties && Object.hasOwn(variant.properties, step)) return variant.properties[step]
  }
  return null
}

/** What the schema says about a place in a plan; null where there is nothing. */
export function schemaAt(path: Path): SchemaNode | null {
  return path.reduce<SchemaNode | null>((node, step) => (node ? child(node, step) : null), planJsonSchema)
}

/** The keys that an object at a place may have, in their order. */
export function keysAt(path: Path): string[] {
  const node = schemaAt(path)
  return node ? variants(node).flatMap((variant) => Object.keys(variant.properties ?? {})) : []
}

function pathsOf(node: SchemaNode, path: string): string[] {
  return variants(node).flatMap((variant) => Object.entries(variant.properties ?? {})).flatMap(([key, inner]) => {
    const here = path === '' ? key : `${path}.${key}`
    return [here, ...pathsOf(inner, here)]
  })
}

/** Every path of a plan, parents before children, in the order in which a plan is written. */
export const planPaths: readonly string[] = pathsOf(planJsonSchema, '')
