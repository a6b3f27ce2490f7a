const shapes = {
  chevron: 'M6 4l4 4-4 4',
  down: 'M4 6l4 4 4-4',
  check: 'M3.5 8.5l3 3 6-7',
  close: 'M4 4l8 8M12 4l-8 8',
  plus: 'M8 3.5v9M3.5 8h9',
  minus: 'M3.5 8h9',
  fit: 'M3 6V3h3M10 3h3v3M13 10v3h-3M6 13H3v-3',
  undo: 'M6 4L3 7l3 3M3 7h6.5a3.5 3.5 0 010 7H7',
  redo: 'M10 4l3 3-3 3M13 7H6.5a3.5 3.5 0 000 7H9',
} as const

/** A small drawing beside words; it says nothing on its own. */
export function Icon({ shape }: { shape: keyof typeof shapes }) {
  return (
    <svg width="16" height="16" viewBox="0 0 16 16" fill="none" stroke="currentColor" strokeWidth="1.5" strokeLinecap="round"
      strokeLinejoin="round" aria-hidden="true">
      <path d={shapes[shape]} />
    </svg>
  )
}
