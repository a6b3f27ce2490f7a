import { useEffect, useLayoutEffect, useState, type RefObject } from 'react'
import { readPalette, type Palette } from './palette'

/** The size of an element in CSS pixels, followed as it changes. */
export function useSize(element: RefObject<HTMLElement | null>): { width: number; height: number } {
  const [size, setSize] = useState({ width: 0, height: 0 })
  useLayoutEffect(() => {
    const target = element.current
    if (!target) return
    const measure = () => setSize({ width: target.clientWidth, height: target.clientHeight })
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(target)
    return () => observer.disconnect()
  }, [element])
  return size
}

/** The tokens in force, followed from light to dark, and once more when the faces are there. */
export function usePalette(element: RefObject<HTMLElement | null>): Palette | null {
  const [palette, setPalette] = useState<Palette | null>(null)
  useEffect(() => {
    const read = () => { if (element.current) setPalette(readPalette(element.current)) }
    read()
    const dark = window.matchMedia('(prefers-color-scheme: dark)')
    dark.addEventListener('change', read)
    void document.fonts.ready.then(read)
    return () => dark.removeEventListener('change', read)
  }, [element])
  return palette
}
