import { expect } from 'vitest'
import { changed, planned, stops } from './plans'

/** Plans what cannot be built, and then every remedy that it is answered with: none of them stops. */
export function expectRemedies(document: unknown): void {
  const found = planned(document, {}).findings.filter((f) => f.severity === 'stop')
  expect(found.length).toBeGreaterThan(0)
  for (const { remedy, remedies } of found) expect(remedy).toBe(remedies[0]?.text ?? null)
  const tried = new Map(found.flatMap((f) => f.remedies).map((r) => [JSON.stringify(r.set), r]))
  expect(tried.size).toBeGreaterThan(0)
  for (const { set } of tried.values()) {
    const values = Object.fromEntries(set.map(({ path, value }) => [path, value]))
    expect(stops(planned(changed(document, values))), JSON.stringify(values)).toEqual([])
  }
}
