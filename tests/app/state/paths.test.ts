import { describe, expect, it } from 'vitest'
import { dropAt, putAt, sameJson, valueAt } from '../../../app/state/paths'

describe('paths into a plan', () => {
  it('reads, writes and takes away', () => {
    const plan: Record<string, unknown> = { converter: { architecture: 'sar' }, overrides: [{ value: 1 }] }
    putAt(plan, 'converter.sar.unit_cap_f', 1e-15)
    expect(valueAt(plan, 'converter.sar.unit_cap_f')).toBe(1e-15)
    expect(valueAt(plan, 'overrides.0.value')).toBe(1)
    expect(valueAt(plan, 'converter.none.deeper')).toBeUndefined()
    dropAt(plan, 'converter.sar.unit_cap_f')
    expect(plan.converter).toEqual({ architecture: 'sar' })
  })

  it('never reads what an object merely inherits', () => {
    expect(valueAt({}, 'constructor')).toBeUndefined()
  })

  it('knows when two values are the same', () => {
    expect(sameJson({ a: [1, { b: null }] }, { a: [1, { b: null }] })).toBe(true)
    expect(sameJson({ a: [1] }, { a: { 0: 1 } })).toBe(false)
    expect(sameJson({ a: undefined }, {})).toBe(false)
  })
})
