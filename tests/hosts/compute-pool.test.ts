import { afterEach, expect, test } from 'vitest'
import type { Card } from '../../main/contract/cards'
import type { Plan } from '../../main/contract/plan'
import { poolCompute, type ComputePool, type PoolOptions } from '../../main/usecases/compute-pool'
import { isSuperseded } from '../../main/usecases/superseded'

const workerFile = new URL('./slow.worker.mjs', import.meta.url).pathname
const card = {} as Card
const busy = (ms: number, author = '') => ({ title: String(ms), author }) as Plan
const open: ComputePool[] = []

function pool(options: PoolOptions = {}): ComputePool {
  const made = poolCompute({ workerFile, threads: 1, grace_ms: 100, ...options })
  open.push(made)
  return made
}
const outcome = (promise: Promise<unknown>) => promise.then(() => 'done', (error: unknown) => (isSuperseded(error) ? 'replaced' : 'failed'))

afterEach(async () => {
  for (const made of open.splice(0)) await made.close()
})

test('a job runs in a worker with the options it was given', async () => {
  expect(await pool().plan(busy(1), card, { workingsFor: 3 })).toEqual({ kind: 'plan', asked: { workingsFor: 3 } })
  expect(await pool().waves(busy(1), card, { index: 2, overdrive_v: null })).toEqual({ kind: 'waves', asked: { index: 2, overdrive_v: null } })
})

test('the newest of a window wins: waiting ones go at once, the last is computed', async () => {
  const view = pool({ grace_ms: 60_000 }).view('1 plan.run')
  const first = outcome(view.plan(busy(50), card))
  const waiting = [1, 2, 3].map(() => outcome(view.plan(busy(5000), card)))
  const last = view.plan(busy(1), card, { workingsFor: 9 })
  expect(await Promise.all(waiting)).toEqual(['replaced', 'replaced', 'replaced'])
  expect(await last).toEqual({ kind: 'plan', asked: { workingsFor: 9 } })
  expect(await first).toBe('done')
})

test('a long one that runs already is ended after its grace', async () => {
  const view = pool().view('1 plan.run')
  const long = outcome(view.plan(busy(60_000), card))
  await new Promise((resolve) => setTimeout(resolve, 300))
  const started_ms = Date.now()
  expect(await outcome(view.plan(busy(1), card))).toBe('done')
  expect(await long).toBe('replaced')
  expect(Date.now() - started_ms).toBeLessThan(5000)
})

test('windows do not replace each other, nor do calls without a key', async () => {
  const made = pool()
  const calls = [made.view('1').plan(busy(20), card), made.view('2').plan(busy(20), card), made.plan(busy(20), card), made.plan(busy(20), card)]
  expect(await Promise.all(calls.map(outcome))).toEqual(['done', 'done', 'done', 'done'])
})

test('a call ends with its asker, also when the asker was gone before', async () => {
  const made = pool()
  const gone = new AbortController()
  const long = outcome(made.view(null, gone.signal).plan(busy(60_000), card))
  setTimeout(() => gone.abort(), 200)
  expect(await long).toBe('replaced')
  expect(await outcome(made.view(null, gone.signal).plan(busy(1), card))).toBe('replaced')
  expect(await outcome(made.plan(busy(1), card))).toBe('done')
})

test('an error of the worker comes back as an error, and the pool goes on', async () => {
  const made = pool()
  expect(await outcome(made.plan(busy(1, 'throws'), card))).toBe('failed')
  expect(await outcome(made.plan(busy(1), card))).toBe('done')
})

test('closing ends what runs and what waits', async () => {
  const made = pool()
  const calls = [made.plan(busy(60_000), card), made.plan(busy(60_000), card)].map(outcome)
  await made.close()
  expect(await Promise.all(calls)).toEqual(['replaced', 'replaced'])
})
