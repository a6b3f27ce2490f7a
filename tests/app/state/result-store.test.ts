import { describe, expect, it } from 'vitest'
import { createDocuments } from '../../../app/state/document-store'
import { createLatest } from '../../../app/state/latest'
import { putAt } from '../../../app/state/paths'
import { createResults, setBack } from '../../../app/state/result-store'
import type { Call } from '../../../main/contract/channels'
import { fail, succeed, type Reply } from '../../../main/contract/errors'
import type { PlanInput } from '../../../main/contract/plan'
import { fakeResult } from '../fixtures/fake-result'
import { flashTrim } from '../fixtures/plans'

interface Asked { readonly revision: number; readonly remedies: boolean; readonly document: PlanInput; answer(reply?: Reply<unknown>): Promise<void> }

/** A main side that answers only when the test says so. */
function heldHost() {
  const asked: Asked[] = []
  const sought: Asked[] = []
  const call = ((_name: string, request: { revision: number; document: PlanInput; remedies: boolean }) => new Promise((resolve) => {
    (request.remedies ? sought : asked).push({
      ...request,
      answer: async (reply) => {
        resolve(reply ?? succeed({ result: fakeResult(request.document), revision: request.revision }))
        await new Promise((done) => setTimeout(done))
      },
    })
  })) as unknown as Call
  return { asked, sought, call }
}

function started() {
  const documents = createDocuments(flashTrim)
  const host = heldHost()
  const bits = (value: number) => documents.edit('bits', (draft) => putAt(draft, 'converter.resolution_bits', value))
  return { documents, ...host, bits, results: createResults(host.call, documents) }
}

describe('the result store', () => {
  it('asks at once for each change, and drops replies for a document that changed since', async () => {
    const { asked, bits, results } = started()
    await asked[0].answer()
    bits(7)
    bits(8)
    bits(9)
    expect(asked.map(({ document }) => document.converter.resolution_bits)).toEqual([6, 7, 8, 9])
    await asked[1].answer()
    await asked[2].answer(fail('cancelled', 'A newer request replaced this one.'))
    expect(results.get().result?.comparators).toHaveLength(63)
    expect(results.get().failure).toBeNull()
    expect(results.get().planning).toBe(true)
    await asked[3].answer()
    expect(results.get().result?.comparators).toHaveLength(511)
    expect(results.get().planning).toBe(false)
  })

  it('shows an infeasible plan at once and its remedies when they are found', async () => {
    const { asked, sought, bits, results } = started()
    const stopped = { ...fakeResult(flashTrim), findings: [{ severity: 'stop', code: 'time_over_limit', message: 'Too slow.', path: null, remedy: null, remedies: [] }] }
    await asked[0].answer(succeed({ result: stopped, revision: asked[0].revision }))
    expect(results.get()).toMatchObject({ planning: false, seeking: true, result: stopped })
    expect(sought).toHaveLength(1)
    const remedied = { ...stopped, findings: [{ ...stopped.findings[0], remedy: 'half the rate' }] }
    await sought[0].answer(succeed({ result: remedied, revision: asked[0].revision }))
    expect(results.get()).toMatchObject({ seeking: false, result: remedied })
    bits(7)
    expect(results.get()).toMatchObject({ planning: true, seeking: false })
  })

  it('drops a reply that names another revision', async () => {
    const { asked, results } = started()
    await asked[0].answer(succeed({ result: fakeResult(flashTrim), revision: 99 }))
    expect(results.get().result).toBeNull()
  })

  it('keeps the last good picture when the document is refused, with every problem', async () => {
    const { asked, bits, results } = started()
    await asked[0].answer()
    bits(17)
    const problem = { code: 'out_of_range', path: 'converter.resolution_bits', value: '17', allowed: '2 to 10', hint: 'Choose fewer.' } as const
    await asked[1].answer(fail('bad_document', 'Refused.', [problem]))
    expect(results.get().problems).toEqual([problem])
    expect(results.get().result?.comparators).toHaveLength(63)
    expect(results.get().planning).toBe(false)
    bits(6)
    await asked[2].answer()
    expect(results.get().problems).toEqual([])
  })

  it('says when the main side could not plan, and can be asked again', async () => {
    const { asked, results } = started()
    await asked[0].answer(fail('compute_failed', 'It stopped.'))
    expect(results.get().failure).toBe('It stopped.')
    results.retry()
    await asked[1].answer()
    expect(results.get().failure).toBeNull()
    expect(results.get().result).not.toBeNull()
  })
})

describe('the newest of what is asked for', () => {
  it('drops what was asked for before', async () => {
    const answers: ((value: Reply<string>) => void)[] = []
    const latest = createLatest<number, string>(() => new Promise((resolve) => answers.push(resolve)), (a, b) => a === b)
    latest.ask(1)
    latest.ask(2)
    latest.ask(2)
    expect(latest.get().valueKey).toBeNull()
    expect(answers).toHaveLength(2)
    answers[1](succeed('two'))
    answers[0](succeed('one'))
    await new Promise((done) => setTimeout(done))
    expect(latest.get().value).toBe('two')
    expect(latest.get().busy).toBe(false)
    latest.ask(3)
    expect(latest.get()).toMatchObject({ key: 3, value: 'two', valueKey: 2, busy: true })
  })
})

describe('a result that is not of the present document', () => {
  it('is said to be so while another is planned, and when the brief was refused', () => {
    const fresh = { result: null, revision: 1, planning: false, seeking: false, problems: [], failure: null }
    expect(setBack(fresh)).toBeNull()
    expect(setBack({ ...fresh, planning: true })).toBe('planning')
    expect(setBack({ ...fresh, problems: [{ path: 'a', value: '', allowed: '', hint: '', code: 'missing' }] })).toBe('of the last valid brief')
    expect(setBack({ ...fresh, failure: 'It stopped.' })).toBe('of an earlier brief')
  })
})
