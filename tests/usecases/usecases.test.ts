import { describe, expect, test } from 'vitest'
import type { Plan } from '../../main/contract/plan'
import { validatePlan, type ReadPlan } from '../../main/documents/read-plan'
import { planChecksum, sheetDate } from '../../main/usecases/make-sheet'
import { hasStop, runPlan } from '../../main/usecases/run-plan'
import { runWaves, wavesCsv } from '../../main/usecases/run-waves'
import type { Compute } from '../../main/usecases/compute'
import { superseded } from '../../main/usecases/superseded'
import { smallest } from '../documents/samples'
import { standIn } from './stand-in'

function read(document: unknown): ReadPlan {
  const reply = validatePlan(document)
  if (!reply.ok) throw new Error(reply.error.message)
  return reply.value
}

const failing = (error: Error): Compute => ({ plan: () => Promise.reject(error), waves: () => Promise.reject(error), close: () => Promise.resolve() })

describe('planning', () => {
  test('a result also when it says stop', async () => {
    const reply = await runPlan(standIn(), read({ ...smallest, title: 'stop' }))
    expect(reply).toMatchObject({ ok: true, value: { plan: { title: 'stop' } } })
    expect(reply.ok && hasStop(reply.value)).toBe(true)
  })

  test.each([0, 4, 1000])('workings of entry %i, which is not there, are refused', async (workingsFor) => {
    expect(await runPlan(standIn(), read(smallest), { workingsFor })).toMatchObject({ ok: false, error: { code: 'bad_request' } })
  })

  test('what the planner throws becomes a reply', async () => {
    expect(await runPlan(failing(new Error('broke')), read(smallest))).toMatchObject({ ok: false, error: { code: 'compute_failed' } })
    expect(await runWaves(failing(new RangeError('no entry 9')), read(smallest), { index: 9, overdrive_v: null }))
      .toMatchObject({ ok: false, error: { code: 'bad_request', message: 'no entry 9' } })
    await expect(runPlan(failing(superseded()), read(smallest))).rejects.toMatchObject({ name: 'Superseded' })
  })
})

test('waves as CSV', async () => {
  const reply = await runWaves(standIn(), read(smallest), { index: 1, overdrive_v: 5e-3 })
  expect(reply.ok && wavesCsv(reply.value)).toBe('time_s,clock_v\n0,0\n1e-12,0.9\n')
})

describe('the sheet', () => {
  const reversed = (value: unknown): unknown => (typeof value === 'object' && value !== null && !Array.isArray(value)
    ? Object.fromEntries(Object.entries(value).reverse().map(([key, inner]) => [key, reversed(inner)])) : value)

  test('the checksum is that of the plan, not of how it was written', () => {
    const { plan } = read(smallest)
    expect(planChecksum(plan)).toMatch(/^[0-9a-f]{64}$/)
    expect(planChecksum(reversed(plan) as Plan)).toBe(planChecksum(plan))
    expect(planChecksum(read(plan).plan)).toBe(planChecksum(plan))
    expect(planChecksum(read({ ...smallest, revision: 'B' }).plan)).not.toBe(planChecksum(plan))
  })

  test('the date is that of the environment or today, in UTC', () => {
    const noon = () => Date.UTC(2026, 4, 3, 12)
    expect(sheetDate({ SOURCE_DATE_EPOCH: '1700000000' }, noon)).toEqual(new Date('2023-11-14T00:00:00Z'))
    expect(sheetDate({}, noon)).toEqual(new Date('2026-05-03T00:00:00Z'))
    expect(sheetDate({ SOURCE_DATE_EPOCH: 'soon' }, noon)).toEqual(new Date('2026-05-03T00:00:00Z'))
  })
})
