import { beforeAll, describe, expect, it } from 'vitest'
import type { Limits, Result } from '../../main/contract/result'
import { bankOf } from '../../main/planner/bank-of'
import { sigmaLimits } from '../../main/planner/stages/offset-limits'
import { planned, read } from '../planner/plans'
import worked from './worked-cases.json'

/** 0.3 %, as written beside the cases. */
const share = 0.003

interface LimitsCase { what: string; plan: unknown; expect: Record<string, unknown> }

const caseOf = (what: string): LimitsCase => worked.cases.find((entry) => entry.what === what) as LimitsCase

function expectNear(actual: number | null | undefined, wanted: unknown, what: string): void {
  expect(Math.abs(actual! / (wanted as number) - 1), `${what}: ${actual} instead of ${wanted}`).toBeLessThanOrEqual(share)
}

function expectAll(result: Result, key: keyof Limits, wanted: unknown): void {
  const each = Array.isArray(wanted) ? (wanted as number[]) : result.comparators.map(() => wanted)
  expect(result.comparators).toHaveLength(each.length)
  result.comparators.forEach(({ limits }, i) => expectNear(limits[key], each[i], `${key} of ${i + 1}`))
}

describe('worked limits of a flash (computed independently, not published)', () => {
  const { plan, expect: wanted } = caseOf('limits, flash')
  let result: Result
  beforeAll(() => { result = planned(plan) })

  it('LSB and error budget', () => {
    expectNear(result.quantities.lsb_v, wanted.lsb_v, 'LSB')
    const { allow, quant, jitter, sampler, reference } = wanted.budget_v2 as Record<string, number>
    expectNear(result.quantities.error_power_allowed_v2, allow, 'allowed')
    const expected = { quantisation: quant, jitter, sampling_noise: sampler, reference }
    for (const [item, power] of Object.entries(expected)) expectNear(result.budget.find((line) => line.item === item)!.allowed_v2, power, item)
  })

  it.each(['window_s', 'overdrive_v', 'tau_s', 'integration_s', 'noise_v', 'offset_v'] as const)('%s of all 31 comparators', (key) => {
    expectAll(result, key, wanted[key])
  })

  it('spread by yield', () => {
    const { plan: complete, card } = read(plan)
    const { s } = bankOf(complete, card)
    const { inl, dnl } = sigmaLimits(s)
    const { inl_terminal, dnl: byDnl } = wanted.sigma_yield_lsb as Record<string, number>
    expectNear(inl / s.lsb, inl_terminal, 'terminal INL')
    expectNear(dnl / s.lsb, byDnl, 'DNL')
  })
})

describe('worked limits of a synchronous SAR (computed independently, not published)', () => {
  const { plan, expect: wanted } = caseOf('limits, synchronous SAR')
  let result: Result
  beforeAll(() => { result = planned(plan) })

  it.each(['window_s', 'overdrive_v', 'tau_s'] as const)('%s of all nine cycles', (key) => expectAll(result, key, wanted[key]))
})
