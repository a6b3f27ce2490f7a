import { afterAll, beforeAll, expect, test } from 'vitest'
import { readPlan, type ReadPlan } from '../../main/documents/read-plan'
import { directCompute } from '../../main/usecases/compute'
import { poolCompute, type ComputePool } from '../../main/usecases/compute-pool'
import { ensureBuilt } from '../built-program'

let pool: ComputePool
let read: ReadPlan
beforeAll(async () => {
  await ensureBuilt()
  pool = poolCompute()
  const reply = readPlan(JSON.stringify({
    schema: 'latchwright.plan/1', converter: { architecture: 'flash', resolution_bits: 3, sample_rate_hz: 1e9 },
  }))
  if (!reply.ok) throw new Error(reply.error.message)
  read = reply.value
})
afterAll(() => pool.close())

test('the worker of the build computes what the planner computes', async () => {
  const direct = directCompute()
  expect(await pool.plan(read.plan, read.card, { workingsFor: 2 })).toEqual(await direct.plan(read.plan, read.card, { workingsFor: 2 }))
  const wanted = { index: 1, overdrive_v: 0.01 }
  expect(await pool.waves(read.plan, read.card, wanted)).toEqual(await direct.waves(read.plan, read.card, wanted))
})

test('an entry that is not there is the same kind of error as without workers', async () => {
  await expect(pool.waves(read.plan, read.card, { index: 4000, overdrive_v: null })).rejects.toBeInstanceOf(RangeError)
})
