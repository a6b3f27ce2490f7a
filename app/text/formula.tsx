import { Fragment, type ReactNode } from 'react'

const pattern = /_\{([^}]*)\}|\^\{([^}]*)\}|_([\p{L}\d]+(?:,[\p{L}\d]+)*[+−]?)|\^\(([^()]*)\)|\^([−-]?[\p{L}\d]+(?:\.\d+)?)/gu

/** A formula or help text in which f_s and 2^N stand as they are printed. */
export function Formula({ text }: { text: string }): ReactNode {
  const parts: ReactNode[] = []
  let from = 0
  for (const match of text.matchAll(pattern)) {
    const before = text.charAt(match.index - 1)
    if (before === '' || /\s/.test(before)) continue
    parts.push(text.slice(from, match.index))
    const low = match[1] ?? match[3]
    parts.push(low === undefined ? <sup>{match[2] ?? match[4] ?? match[5]}</sup> : <sub>{low}</sub>)
    from = match.index + match[0].length
  }
  parts.push(text.slice(from))
  return parts.map((part, index) => <Fragment key={index}>{part}</Fragment>)
}
