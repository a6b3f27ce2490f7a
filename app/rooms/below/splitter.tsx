import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react'

const smallest = 160
const step_px = 24
const largest = () => Math.max(smallest, window.innerHeight - 320)

function apply(height: number): number {
  const held = Math.round(Math.max(smallest, Math.min(largest(), height)))
  document.querySelector<HTMLElement>('.desk')?.style.setProperty('--below', `${held}px`)
  return held
}

/** The edge between the bank and the rooms below; dragged, or moved with the arrow keys. */
export function Splitter() {
  const [height, setHeight] = useState(288)
  const start = useRef<{ y: number; height: number } | null>(null)
  const here = (target: Element) => target.parentElement?.clientHeight ?? height
  const onKey = (event: KeyboardEvent) => {
    const direction = { ArrowUp: 1, ArrowDown: -1 }[event.key]
    if (direction === undefined) return
    event.preventDefault()
    setHeight(apply(here(event.currentTarget) + direction * step_px))
  }
  const onDown = (event: PointerEvent<HTMLDivElement>) => {
    event.currentTarget.setPointerCapture(event.pointerId)
    start.current = { y: event.clientY, height: here(event.currentTarget) }
  }
  const onMove = (event: PointerEvent) => {
    if (start.current) setHeight(apply(start.current.height + start.current.y - event.clientY))
  }
  return (
    <div className="splitter" role="separator" aria-orientation="horizontal" aria-label="Height of the rooms below the bank" tabIndex={0}
      aria-valuenow={height} aria-valuemin={smallest} aria-valuemax={largest()} onKeyDown={onKey} onPointerDown={onDown}
      onPointerMove={onMove} onPointerUp={() => { start.current = null }} />
  )
}
