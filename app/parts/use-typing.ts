import { useLayoutEffect, useRef, useState, type KeyboardEvent, type MouseEvent, type RefObject } from 'react'
import { formatExact } from '../../main/contract/units'
import type { Quantity } from '../../main/contract/quantities'
import { judge, stepped, type Judged } from '../text/judge'

export interface QuantityFieldProps {
  path: string
  quantity: Quantity
  document: unknown
  /** As written; undefined or null: the default counts. */
  value: number | null | undefined
  /** What counts when nothing is written; null or undefined when it is not known as a number. */
  fallback: number | null | undefined
  required: boolean
  /** Text that could not be taken. */
  draft: string | undefined
  problem: string | null
  onCommit(value: number, group?: string): void
  onClear(): void
  onDraft(text: string | null): void
  onExplain(): void
}

/** Text under way: what it was at the start, and whether it is still all selected. */
interface Typing { readonly text: string; readonly start: string; readonly fresh: boolean }

export interface TypingAccess {
  readonly input: RefObject<HTMLInputElement | null>
  /** null: nobody types here. */
  readonly text: string | null
  readonly changed: boolean
  /** What the text means, while it is another one than at the start. */
  readonly judged: Judged | null
  begin(): void
  change(text: string): void
  click(event: MouseEvent): void
  key(event: KeyboardEvent): void
  end(): void
}

const plainSpace = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ')
const keysOf = (event: KeyboardEvent): [1 | -1, boolean] | undefined => ({
  ArrowUp: [1, event.shiftKey], ArrowDown: [-1, event.shiftKey], PageUp: [1, true], PageDown: [-1, true],
} as Record<string, [1 | -1, boolean]>)[event.key]

/** The value the field shows: the written one, else the default. */
export const shownIn = ({ value, fallback }: QuantityFieldProps) => (typeof value === 'number' ? value : fallback)

/** The whole value as it can be typed back. */
function exactOf(props: QuantityFieldProps): string {
  const { quantity } = props
  const shown = shownIn(props)
  return typeof shown === 'number' ? plainSpace(formatExact(shown, quantity.unit)) : ''
}

/** Enters a text: a value, back to the default, or kept as it is with what is wrong with it. */
function enter(props: QuantityFieldProps, text: string): void {
  if (text.trim() === '' && !props.required) return props.onClear()
  const judged = judge(props.path, text, props.document, shownIn(props))
  if (!judged.ok) return props.onDraft(text)
  if (judged.value === null) return props.onClear()
  props.onDraft(null)
  if (judged.value !== props.value) props.onCommit(judged.value)
}

/** Whether an entered text says what the field would show. */
function standsFor(text: string, props: QuantityFieldProps): boolean {
  if (text.trim() === '') return typeof props.value !== 'number'
  const judged = judge(props.path, text, props.document)
  return judged.ok ? judged.value === (shownIn(props) ?? null) : text === exactOf(props)
}

/** Where a step with the arrow keys leads; null when there is nothing to step from. */
function stepFrom(props: QuantityFieldProps, text: string, [direction, large]: [1 | -1, boolean]): number | null {
  const judged = judge(props.path, text, props.document)
  const from = judged.ok && judged.value !== null ? judged.value : (props.value ?? props.fallback)
  return typeof from === 'number' ? stepped(props.path, from, direction, large, props.document) : null
}

/** Typing in a quantity's field: the full value on focus, entered with Enter or on leaving, stepped with the arrow keys. */
export function useTyping(props: QuantityFieldProps): TypingAccess {
  const input = useRef<HTMLInputElement>(null)
  const [typing, setTyping] = useState<Typing | null>(null)
  const changed = typing !== null && typing.text !== typing.start
  useLayoutEffect(() => {
    if (typing?.fresh) input.current?.select()
  }, [typing?.fresh, typing?.start])
  const restart = (text: string) => setTyping({ text, start: text, fresh: true })
  const [seen, setSeen] = useState({ value: props.value, fallback: props.fallback })
  if (seen.value !== props.value || seen.fallback !== props.fallback) {
    setSeen({ value: props.value, fallback: props.fallback })
    if (typing && !changed && props.draft === undefined && !standsFor(typing.text, props)) restart(exactOf(props))
  }
  const commit = () => {
    if (!typing || !changed) return
    enter(props, typing.text)
    setTyping({ ...typing, start: typing.text })
  }
  const key = (event: KeyboardEvent) => {
    const step = keysOf(event)
    if (step) {
      const next = stepFrom(props, typing?.text ?? '', step)
      if (next === null) return
      restart(plainSpace(formatExact(next, props.quantity.unit)))
      if (next !== props.value) props.onCommit(next, `step ${props.path}`)
    } else if (event.key === 'Enter') commit()
    else if (event.key === 'Escape') {
      props.onDraft(null)
      restart(exactOf(props))
    } else return
    event.preventDefault()
  }
  return {
    input, changed, key,
    text: typing?.text ?? null,
    judged: typing && changed && typing.text.trim() !== '' ? judge(props.path, typing.text, props.document, shownIn(props)) : null,
    begin: () => {
      restart(props.draft ?? exactOf(props))
      props.onExplain()
    },
    change: (text) => setTyping((now) => ({ start: now?.start ?? '', text, fresh: false })),
    click: (event) => {
      if (!typing?.fresh || input.current?.selectionStart !== input.current?.selectionEnd) return
      input.current?.select()
      setTyping({ ...typing, fresh: false })
      event.preventDefault()
    },
    end: () => {
      commit()
      setTyping(null)
    },
  }
}
