import type { Working } from '../../../main/contract/result'

/** The workings of these ids, in the order of the ids; `id.2` and the like are further workings of `id`. */
export function workingsOf(workings: readonly Working[], ids: readonly string[]): Working[] {
  return ids.flatMap((wanted) => workings.filter(({ id }) => id === wanted || id.startsWith(`${wanted}.`)))
}
