import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
import { z } from 'zod'
import type { ChannelName } from '../../main/contract/channels'
import { cardSchema } from '../../main/contract/cards'
import { channels } from '../../main/contract/channels'
import { errorCodes, type Reply } from '../../main/contract/errors'
import { planSchema } from '../../main/contract/plan'
import { resultSchema, workingSchema } from '../../main/contract/result'
import { wavesSchema } from '../../main/contract/waves'
import type { SharedChannel } from '../../main/usecases/handlers'
import { desktopHost, loopbackHost, type Host } from './hosts'

vi.mock('electron', () => import('./electron-fake'))

const document = {
  schema: 'latchwright.plan/1', title: 'Contract',
  converter: { architecture: 'flash', resolution_bits: 3, sample_rate_hz: 1e9 },
}
const broken = { ...document, converter: { ...document.converter, resolution_bits: 99, sample_rate_hz: 'fast' } }

interface Case { readonly title: string; readonly request: unknown; readonly says: z.ZodType | string }

/** What each channel is asked, and what has to come back: the shape of its value, or the code of its error. */
const cases: Record<SharedChannel, readonly Case[]> = {
  about: [
    { title: 'says what it is', request: {}, says: z.strictObject({ name: z.literal('Latchwright'), version: z.string(), caution: z.string().min(50), host: z.enum(['desktop', 'loopback']) }) },
    { title: 'takes no more', request: { path: '/etc/passwd' }, says: 'bad_request' },
  ],
  'cards.list': [{ title: 'has cards', request: {}, says: z.strictObject({ cards: z.array(cardSchema).min(1) }) }],
  'demos.list': [{ title: 'has demos', request: {}, says: z.strictObject({ demos: z.array(z.strictObject({ id: z.string(), title: z.string(), document: planSchema })) }) }],
  'document.read': [
    { title: 'reads a plan', request: { text: JSON.stringify(document) }, says: z.strictObject({ plan: planSchema, document: z.json(), changes: z.array(z.string()) }) },
    { title: 'refuses a broken plan', request: { text: JSON.stringify(broken) }, says: 'bad_document' },
    { title: 'refuses what is no JSON', request: { text: '{"schema":' }, says: 'bad_document' },
    { title: 'wants text', request: { text: 7 }, says: 'bad_request' },
  ],
  'document.write': [
    { title: 'writes as given', request: { document }, says: z.strictObject({ text: z.string().endsWith('}\n') }) },
    { title: 'wants a document', request: {}, says: 'bad_request' },
  ],
  'plan.run': [
    { title: 'plans', request: { document, revision: 4 }, says: z.strictObject({ result: resultSchema, revision: z.literal(4) }) },
    { title: 'refuses a broken plan', request: { document: broken, revision: 4 }, says: 'bad_document' },
    { title: 'wants a revision', request: { document, revision: -1 }, says: 'bad_request' },
  ],
  'plan.workings': [
    { title: 'gives the workings of one entry', request: { document, index: 2 }, says: z.strictObject({ workings: z.array(workingSchema).min(1) }) },
    { title: 'refuses an entry that is not there', request: { document, index: 4000 }, says: 'bad_request' },
    { title: 'refuses a broken plan', request: { document: broken, index: 1 }, says: 'bad_document' },
  ],
  'waves.run': [
    { title: 'gives a transient', request: { document, index: 1, overdrive_v: 0.01 }, says: wavesSchema },
    { title: 'refuses an entry that is not there', request: { document, index: 4000, overdrive_v: null }, says: 'bad_request' },
    { title: 'refuses no overdrive at all', request: { document, index: 1, overdrive_v: 0 }, says: 'bad_request' },
  ],
  'sheet.make': [
    { title: 'makes a PDF', request: { document, paper: 'A4', date: '2026-01-02' }, says: z.strictObject({ base64: z.string().startsWith('JVBERi'), suggested_name: z.string().endsWith('.pdf') }) },
    { title: 'refuses another paper', request: { document, paper: 'A3', date: null }, says: 'bad_request' },
  ],
}

const failureSchema = z.strictObject({
  ok: z.literal(false),
  error: z.strictObject({
    code: z.enum(errorCodes), message: z.string().min(10), problems: z.array(z.object({ path: z.string() })).min(1).optional(),
  }),
})

let desktop: Host
let loopback: Host
beforeAll(async () => {
  desktop = await desktopHost()
  loopback = await loopbackHost()
})
afterAll(() => loopback.close())

const withoutHost = (reply: Reply<unknown>) => JSON.parse(JSON.stringify(reply, (key, value: unknown) => (key === 'host' ? 'either' : value))) as unknown

describe.each(Object.entries(cases))('%s', (name, list) => {
  test.each([...list])('$title', async ({ request, says }) => {
    const replies = [await desktop.ask(name, request), await loopback.ask(name, request)]
    for (const reply of replies) {
      if (typeof says === 'string') expect(failureSchema.parse(reply).error.code).toBe(says)
      else expect(z.strictObject({ ok: z.literal(true), value: says }).safeParse(reply).error).toBeUndefined()
    }
    expect(withoutHost(replies[0])).toEqual(withoutHost(replies[1]))
  })
})

test.each([[null], [7], ['text'], [[]], [{ stranger: 1 }]])('no channel takes %j for a request', async (request) => {
  for (const name of Object.keys(cases) as ChannelName[]) {
    for (const reply of [await desktop.ask(name, request), await loopback.ask(name, request)]) {
      expect(failureSchema.parse(reply).error.code).toBe('bad_request')
    }
  }
})

test('a refusal says where', async () => {
  const reply = failureSchema.parse(await loopback.ask('waves.run', { document, index: 1.5, overdrive_v: null }))
  expect(reply.error.message).toContain('index')
  const plan = failureSchema.parse(await loopback.ask('plan.run', { document: broken, revision: 1 }))
  expect(plan.error.problems?.map((problem) => problem.path)).toEqual(['converter.resolution_bits', 'converter.sample_rate_hz'])
})

test('endless nesting is refused, not fatal', async () => {
  const deep = JSON.parse(`${'['.repeat(100_000)}${']'.repeat(100_000)}`) as unknown
  const answer = await desktop.ask('document.write', { document: [] })
  expect(answer.ok).toBe(true)
  const { createAnswer } = await import('../../main/usecases/handlers')
  const { plainCompute } = await import('./hosts')
  const reply = await createAnswer({ compute: plainCompute(), host: 'desktop' })('plan.run', { document: deep, revision: 1 }, { window: null })
  expect(failureSchema.parse(reply).error.code).toBe('bad_request')
})

test('the browser host has the shared channels and no others', async () => {
  for (const name of ['nothing', 'constructor', '__proto__', 'about/../about', ...Object.keys(channels)]) {
    const reply = await loopback.ask(name, {})
    const known = name in cases && Object.hasOwn(cases, name)
    if (!known && name !== 'about/../about') expect(failureSchema.parse(reply).error.code).toBe('unknown_channel')
  }
})

test('an unexpected error gets a calm reply and is reported, without its stack', async () => {
  const { answerFrom } = await import('../../main/usecases/answer')
  const reported: unknown[] = []
  const answer = answerFrom({ about: async () => { throw new Error('inside /home/someone/file.ts') } }, (error) => { reported.push(error) })
  const reply = failureSchema.parse(await answer('about', {}, null))
  expect(reply.error.code).toBe('compute_failed')
  expect(JSON.stringify(reply)).not.toMatch(/someone|\.ts|at /)
  expect(reported).toHaveLength(1)
})

test('a replaced request is told so', async () => {
  const { answerFrom } = await import('../../main/usecases/answer')
  const { superseded } = await import('../../main/usecases/superseded')
  const answer = answerFrom({ about: async () => { throw superseded() } })
  expect(failureSchema.parse(await answer('about', {}, null)).error.code).toBe('cancelled')
})
