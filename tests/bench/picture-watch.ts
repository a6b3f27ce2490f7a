/** Times of one change, on the clock of the page [ms]. */
export interface Marks {
  /** The key that entered it. */
  readonly key: number
  /** The last byte of the planner's reply; null when the browser did not note it. */
  readonly reply: number | null
  /** The frame with the new bank was handed to the screen. */
  readonly picture: number
  /** Whether the bank's pixels are other ones than before. */
  readonly changed: boolean
}

interface Watched { bench?: { next: Promise<Marks> } }

/**
 * Runs in the page. From a key that enters a change, waits until the bank says `planning` and no more, which goes in the
 * same commit as the new picture, and then for the frame that shows it.
 */
export function watchPictures(): void {
  const state = document.querySelector('.bank-state')
  const bank = () => document.querySelector<HTMLCanvasElement>('.bank canvas')?.toDataURL() ?? ''
  if (!state) throw new Error('The window has no line that says what the bank is doing.')
  let before = bank()

  const finish = (key: number, resolve: (marks: Marks) => void) => requestAnimationFrame(() => setTimeout(() => {
    const picture = performance.now()
    const replies = performance.getEntriesByType('resource').filter(({ name }) => name.endsWith('/api/plan.run'))
    const now = bank()
    resolve({ key, picture, reply: (replies.at(-1) as PerformanceResourceTiming | undefined)?.responseEnd ?? null, changed: now !== before })
    before = now
  }))

  const after = (key: number) => new Promise<Marks>((resolve, reject) => {
    let begun = false
    const observer = new MutationObserver(() => {
      const busy = state.querySelector('.busy') !== null
      begun ||= busy
      if (!begun || busy) return
      observer.disconnect()
      finish(key, resolve)
    })
    observer.observe(state, { childList: true, subtree: true })
    setTimeout(() => reject(new Error('No new picture within two minutes.')), 120_000)
  })

  window.addEventListener('keydown', ({ key, timeStamp }) => {
    if (!['Enter', 'ArrowUp', 'ArrowDown'].includes(key)) return
    performance.clearResourceTimings();
    (window as Watched).bench = { next: after(timeStamp) }
  }, true)
}

/** Runs in the page: the marks of the change that was entered last, once its picture is there. */
export function nextPicture(): Promise<Marks> {
  const { bench } = window as Watched
  if (!bench) throw new Error('No change was entered.')
  return bench.next
}
