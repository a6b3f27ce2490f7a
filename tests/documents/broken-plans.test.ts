import { expect, test } from 'vitest'
import { problemText } from '../../main/contract/errors'
import { readPlan } from '../../main/documents/read-plan'
import { brokenPlans } from './broken-plans'

const plans = brokenPlans(600, 20)

test('six hundred broken plans are refused, each with every fault named by its place', () => {
  const kinds = new Set<string>()
  for (const { bytes, faults } of plans) {
    const reply = readPlan(bytes)
    const text = new TextDecoder().decode(bytes.slice(0, 2000))
    expect(reply.ok, text).toBe(false)
    if (reply.ok) continue
    const problems = reply.error.problems ?? []
    for (const fault of faults) {
      kinds.add(fault.code)
      expect(problems, text).toContainEqual(expect.objectContaining(fault))
    }
    for (const problem of problems) {
      expect(problemText(problem)).toContain(problem.path === '' ? 'document' : problem.path)
      expect(problem.allowed, text).not.toBe('')
      expect(problem.hint, text).not.toBe('')
    }
    expect(JSON.stringify(reply.error)).not.toMatch(/NaN|Infinity|undefined|\[object/)
  }
  expect([...kinds].sort()).toEqual([
    'missing', 'newer_than_program', 'not_a_choice', 'not_available_yet', 'not_json', 'not_text', 'out_of_range', 'repeated_key', 'too_deep',
    'unknown_card', 'unknown_key', 'wrong_type',
  ])
})

test('the same seed breaks the same plans', () => {
  expect(brokenPlans(50, 20)).toEqual(plans.slice(0, 50))
})
