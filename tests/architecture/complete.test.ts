import { describe, expect, test } from 'vitest'
import { channels, type ChannelName } from '../../main/contract/channels'
import { choices, laterValues } from '../../main/contract/choices'
import { quantities, type Quantity } from '../../main/contract/quantities'
import { planJsonSchema, planPaths, schemaAt, variants, type SchemaNode } from '../../main/documents/plan-schema'
import { faceNames } from '../../main/headless/names'
import type { ComputePool } from '../../main/usecases/compute-pool'
import { createAnswer } from '../../main/usecases/handlers'
import { projectFiles, textOf } from './sources'

const nothing: ComputePool = {
  plan: () => Promise.reject(new Error('not asked')), waves: () => Promise.reject(new Error('not asked')), close: () => Promise.resolve(), view: () => nothing,
}
const files = projectFiles()
const at = (path: string): SchemaNode[] => {
  const node = schemaAt(path.split('.'))
  return node ? variants(node) : []
}

describe('channels', () => {
  const shared = (Object.keys(channels) as ChannelName[]).filter((name) => channels[name].hosts === 'both')

  test.each(shared)('%s is answered by both hosts', async (name) => {
    const answer = createAnswer({ compute: nothing, host: 'loopback' })
    const reply = await answer(name, null, { window: null })
    expect(reply).toMatchObject({ ok: false, error: { code: 'bad_request' } })
  })

  test('a channel that is not there is refused', async () => {
    const answer = createAnswer({ compute: nothing, host: 'loopback' })
    for (const name of ['plan.walk', 'constructor', '__proto__', '']) {
      expect(await answer(name, {}, { window: null })).toMatchObject({ ok: false, error: { code: 'unknown_channel' } })
    }
  })
})

describe('the glossary and the schema', () => {
  test.each(Object.entries<Quantity>(quantities))('%s has the same range in both', (path, quantity) => {
    const node = at(path).find(({ type }) => type === 'number' || type === 'integer')
    expect(node).toMatchObject({ type: quantity.integer ? 'integer' : 'number', minimum: quantity.min, maximum: quantity.max })
    expect(schemaAt(path.split('.'))?.title).toBe(quantity.label)
    expect(at(path).some(({ type }) => type === 'null')).toBe(quantity.nullMeans !== undefined)
    expect(quantity.help.length).toBeGreaterThan(10)
  })

  test('every number of the brief is in the glossary, every choice among the choices', () => {
    const own = planPaths.filter((path) => !path.startsWith('process.card.'))
    const numbers = own.filter((path) => at(path).some(({ type }) => type === 'number' || type === 'integer'))
    expect(numbers.filter((path) => !(path in quantities))).toEqual([])
    const enums = own.filter((path) => at(path).some((node) => node.enum !== undefined))
    expect(enums.filter((path) => !(path in choices))).toEqual([])
    expect(Object.keys(choices).filter((path) => !enums.includes(path))).toEqual([])
  })

  test('what is still to come is there to choose', () => {
    for (const [path, choice] of Object.entries(choices)) {
      const later: readonly string[] = 'later' in choice ? choice.later : []
      expect(Object.keys(choice.options), path).toEqual(expect.arrayContaining([...later]))
      expect(later.length, path).toBeLessThan(Object.keys(choice.options).length)
    }
    for (const { path } of laterValues) expect(schemaAt(path.split('.')), path).not.toBeNull()
  })

  test('the JSON Schema in the assets is that of the definition', () => {
    expect(textOf('assets/plan.schema.json')).toBe(`${JSON.stringify(planJsonSchema, null, 2)}\n`)
  })
})

describe('commands', () => {
  test.each(faceNames)('%s has a file of its own', (name) => {
    expect(files).toContain(`main/headless/${name}.ts`)
  })

  test('and all are in the README', () => {
    for (const name of faceNames) expect(textOf('README.md')).toContain(`latchwright ${name}`)
  })
})
