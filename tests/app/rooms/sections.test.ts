import { describe, expect, it } from 'vitest'
import { conditionsOf, isShown, sectionOf, sections } from '../../../app/rooms/brief/sections'
import { plainFields } from '../../../app/text/labels'
import { choices } from '../../../main/contract/choices'
import { planSchema } from '../../../main/contract/plan'
import { quantities } from '../../../main/contract/quantities'
import { flashTrim, sarTen } from '../fixtures/plans'

const fields = sections.flatMap((section) => section.fields)
const known = [...Object.keys(quantities), ...Object.keys(choices), ...Object.keys(plainFields)]

describe('the sections of the brief', () => {
  it('have every quantity, every choice and every other field exactly once', () => {
    expect(fields.toSorted()).toEqual(known.toSorted())
  })

  it('have every key of the document, whatever it is added for', () => {
    const leaves = (schema: unknown, path: string): string[] => {
      const shape = (schema as { shape?: Record<string, unknown> }).shape
      const inner = (schema as { unwrap?: () => unknown }).unwrap?.()
      if (shape) return Object.entries(shape).flatMap(([key, value]) => leaves(value, path === '' ? key : `${path}.${key}`))
      return inner && !(schema as { element?: unknown }).element ? leaves(inner, path) : [path]
    }
    const written = leaves(planSchema, '').filter((path) => path !== 'schema')
    expect(written.filter((path) => !fields.includes(path))).toEqual([])
  })

  it('show the block of the architecture at work and no other', () => {
    expect(fields.filter((path) => isShown(path, flashTrim)).some((path) => path.startsWith('converter.sar.'))).toBe(false)
    expect(fields.filter((path) => isShown(path, sarTen)).some((path) => path.startsWith('converter.flash.'))).toBe(false)
    expect(isShown('comparator.trim_bits', flashTrim)).toBe(true)
    expect(isShown('comparator.trim_bits', sarTen)).toBe(false)
  })

  it('show each field in some document', () => {
    for (const path of fields) {
      for (const condition of conditionsOf(path)) expect(fields).toContain(condition.path)
    }
  })

  it('know the section of a path below a field', () => {
    expect(sectionOf('overrides.3.value')).toBe('overrides')
    expect(sectionOf('nothing.such')).toBeUndefined()
  })
})
