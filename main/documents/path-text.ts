const longestStep = 60

/** A key as it is quoted in a message: cut short, however long it is in the document. */
export const shortKey = (key: string | number): string => {
  const text = String(key)
  return text.length > longestStep ? `${text.slice(0, longestStep - 1)}…` : text
}

/** A place in a document as keys and positions with dots between them. */
export const dotted = (path: readonly (string | number)[]): string => path.map(shortKey).join('.')

/** As many problems of one document are told; whoever collects them stops at one more. */
export const mostProblems = 100
