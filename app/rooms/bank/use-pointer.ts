import { useEffect, useRef, type RefObject } from 'react'
import { run } from '../../commands/command'
import { zoomBank } from '../../commands/zoom-bank'
import { useApp } from '../../state/use-store'
import { cellAt, heldWithin, type Arrangement, type Zoom } from './arrange'

interface Live {
  readonly arrangement: Arrangement
  readonly zoom: Zoom
  readonly width: number
  readonly height: number
  select(index: number): void
}

const dragStart_px = 4

/** Click selects, wheel zooms about the pointer, dragging pans. */
export function usePointer(frame: RefObject<HTMLElement | null>, live: Live): void {
  const app = useApp()
  const now = useRef(live)
  useEffect(() => { now.current = live })
  useEffect(() => {
    const target = frame.current
    if (!target) return
    const at = (event: MouseEvent) => {
      const edge = target.getBoundingClientRect()
      return { x: event.clientX - edge.left, y: event.clientY - edge.top }
    }
    let down: { x: number; y: number; zoom: Zoom } | null = null
    let dragged = false
    const zoomTo = (zoom: Zoom) => run(app, zoomBank, heldWithin(zoom, now.current.width, now.current.height))
    const wheel = (event: WheelEvent) => {
      event.preventDefault()
      const { zoom } = now.current
      const point = at(event)
      const scale = Math.max(1, Math.min(12, zoom.scale * Math.exp(-event.deltaY * 0.0015)))
      const grown = scale / zoom.scale
      zoomTo({ scale, x: point.x - (point.x - zoom.x) * grown, y: point.y - (point.y - zoom.y) * grown })
    }
    const press = (event: PointerEvent) => {
      down = { ...at(event), zoom: now.current.zoom }
      dragged = false
    }
    const move = (event: PointerEvent) => {
      if (!down) return
      const point = at(event)
      if (Math.hypot(point.x - down.x, point.y - down.y) > dragStart_px && now.current.zoom.scale > 1) dragged = true
      if (dragged) zoomTo({ ...down.zoom, x: down.zoom.x + point.x - down.x, y: down.zoom.y + point.y - down.y })
    }
    const release = (event: PointerEvent) => {
      if (!down) return
      const point = at(event)
      const hit = dragged ? null : cellAt(now.current.arrangement, now.current.zoom, point.x, point.y)
      down = null
      if (hit !== null) now.current.select(hit)
    }
    target.addEventListener('wheel', wheel, { passive: false })
    target.addEventListener('pointerdown', press)
    window.addEventListener('pointermove', move)
    window.addEventListener('pointerup', release)
    return () => {
      target.removeEventListener('wheel', wheel)
      target.removeEventListener('pointerdown', press)
      window.removeEventListener('pointermove', move)
      window.removeEventListener('pointerup', release)
    }
  }, [frame, app])
}
