import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { readDocumentFile, saveFile } from '../../main/documents/files'
import { migrate, type Migration } from '../../main/documents/migrations/migrate'
import { migrations } from '../../main/documents/migrations/list'
import { planPaths } from '../../main/documents/plan-schema'
import { readPlan, validatePlan } from '../../main/documents/read-plan'
import { writePlan } from '../../main/documents/write-plan'
import { planSchemaId } from '../../main/contract/plan'
import { smallest } from './samples'

function shuffled(value: unknown): unknown {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return value
  return Object.fromEntries(Object.entries(value).reverse().map(([key, inner]) => [key, shuffled(inner)]))
}

function completed(): unknown {
  const reply = validatePlan(smallest)
  if (!reply.ok) throw new Error(reply.error.message)
  return reply.value.plan
}

describe('writing', () => {
  test('same keys, same text, whatever order they came in', () => {
    expect(writePlan(shuffled(completed()))).toBe(writePlan(completed()))
    expect(writePlan(completed())).toMatch(/^\{\n {2}"schema": "latchwright.plan\/1",\n {2}"title"/)
    expect(writePlan(completed()).endsWith('}\n')).toBe(true)
  })

  test('what was written reads back the same, defaults left out as they were', () => {
    const reply = readPlan(writePlan(smallest))
    expect(reply).toMatchObject({ ok: true, value: { document: smallest, changes: [] } })
  })

  test('nothing is lost, not even what is not known', () => {
    const odd = { zebra: 1, ...smallest, converter: { ...smallest.converter, ['__proto__x']: [1, { b: 2, a: 1 }] } }
    expect(JSON.parse(writePlan(odd))).toEqual(odd)
    const hostile = JSON.parse('{"__proto__": {"a": 1}, "schema": "x"}') as unknown
    expect(writePlan(hostile)).toContain('"__proto__"')
  })
})

describe('files', () => {
  let folder = ''
  beforeAll(async () => { folder = await mkdtemp(join(tmpdir(), 'latchwright-')) })
  afterAll(async () => { await rm(folder, { recursive: true }) })

  test('saved whole, nothing left beside it', async () => {
    const path = join(folder, 'a.bank.json')
    expect(await saveFile(path, 'first')).toEqual({ ok: true, value: { path } })
    expect(await saveFile(path, new Uint8Array([104, 105]))).toMatchObject({ ok: true })
    expect(await readFile(path, 'utf8')).toBe('hi')
    expect(await readdir(folder)).toEqual(['a.bank.json'])
    expect(await readDocumentFile(path)).toEqual({ ok: true, value: new Uint8Array([104, 105]) })
  })

  test('faults are values that name the path and the cause', async () => {
    expect(await readDocumentFile(join(folder, 'none'))).toMatchObject({ ok: false, error: { code: 'not_found', message: expect.stringContaining('none') as string } })
    expect(await readDocumentFile(folder)).toMatchObject({ ok: false, error: { code: 'read_failed', message: expect.stringContaining('folder') as string } })
    expect(await saveFile(join(folder, 'no', 'such', 'file'), 'x')).toMatchObject({ ok: false, error: { code: 'write_failed' } })
    await saveFile(join(folder, 'large'), ' '.repeat(5_100_000))
    const large = await readDocumentFile(join(folder, 'large'))
    expect(large.ok && readPlan(large.value)).toMatchObject({ ok: false, error: { problems: [{ code: 'too_large' }] } })
    expect(await saveFile('/dev/null', 'x')).toMatchObject({ ok: true })
  })
})

describe('migrations', () => {
  const steps: Migration[] = [
    { from: 'latchwright.plan/0', to: 'latchwright.plan/1', change: ({ name, ...rest }) => ({ document: { ...rest, title: name }, changes: ['“name” is now “title”.'] }) },
  ]

  test('a document is brought to the newest version, and every step says what it did', () => {
    const { document, changes } = migrate({ schema: 'latchwright.plan/0', name: 'x' }, steps)
    expect(document).toEqual({ schema: 'latchwright.plan/1', title: 'x' })
    expect(changes).toEqual([expect.stringContaining('plan/0 to latchwright.plan/1'), '“name” is now “title”.'])
  })

  test('one of the newest version is left as it is', () => {
    const document = { schema: planSchemaId, title: 'x' }
    expect(migrate(document, steps)).toEqual({ document, changes: [] })
  })

  test('the list leads in a chain to the version of the program', () => {
    const chain = migrations.map((step) => step.from).concat(planSchemaId)
    migrations.forEach((step, index) => { expect(step.to).toBe(chain[index + 1]) })
    expect(new Set(chain).size).toBe(chain.length)
  })
})

test('the schema knows every path of a plan once', () => {
  expect(new Set(planPaths).size).toBe(planPaths.length)
  expect(planPaths).toContain('converter.flash.ladder_ohm')
  expect(planPaths).toContain('process.card.n.vt_v')
})
