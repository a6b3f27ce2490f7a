/**
 * The same function with its last answers kept: same arguments, same answer, no second computation.
 *
 * @param compute  pure function of the numbers and words in its key
 * @param key      the arguments as one string
 * @param kept     how many answers are kept before the oldest goes, ≥ 1
 */
export function remembering<A extends readonly unknown[], R>(
  compute: (...args: A) => R, key: (...args: A) => string, kept: number,
): (...args: A) => R {
  const answers = new Map<string, R>()
  return (...args) => {
    const name = key(...args)
    if (answers.has(name)) return answers.get(name) as R
    const answer = compute(...args)
    if (answers.size >= kept) answers.delete(answers.keys().next().value as string)
    answers.set(name, answer)
    return answer
  }
}
