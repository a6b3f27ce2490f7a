import { expect } from 'vitest'
import { resultSchema } from '../../main/contract/result'
import { planned } from './plans'

function unusable(value: unknown, path = 'result'): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [`${path} ${value}`]
  return typeof value === 'object' && value !== null ? Object.entries(value).flatMap(([key, inner]) => unusable(inner, `${path}.${key}`)) : []
}

/** A full result, whatever was asked for: every number finite, the shape as agreed, a stop where and only where a limit is missed. */
export function expectAnswer(document: unknown): void {
  const result = planned(document)
  expect(unusable(result)).toEqual([])
  expect(resultSchema.safeParse(result).error?.issues ?? []).toEqual([])
  const missed = result.comparators.some((c) => Object.values(c.use).some((use) => use === null || use > 1))
  const stopped = result.findings.some((f) => f.severity === 'stop')
  if (missed) expect(stopped).toBe(true)
  expect(result.corners.every((corner) => corner.meets)).toBe(!missed)
}
