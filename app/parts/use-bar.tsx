import { isOver } from '../state/selection'

/** A use drawn as in the cells of the bank: a stroke that reaches towards a dashed limit. */
export function UseBar({ use, tone }: { use: number | null; tone: string }) {
  const limit = 0.8
  const length = use === null ? 0 : Math.min(1, use * limit)
  return (
    <svg className="use-bar" width="100%" height="7" aria-hidden="true">
      <line x1="0" x2="100%" y1="3.5" y2="3.5" stroke="var(--rule)" />
      <rect x="0" y="2" width={`${length * 100}%`} height="3" fill={`var(--${tone})`} />
      {isOver(use) && <rect x={`${limit * 100}%`} y="2" width={`${(length - limit) * 100}%`} height="3" fill="var(--over)" />}
      <line x1={`${limit * 100}%`} x2={`${limit * 100}%`} y1="0" y2="7" stroke="var(--ink)" />
    </svg>
  )
}

/** A part of a whole. */
export function ShareBar({ share }: { share: number }) {
  return (
    <svg className="use-bar" width="100%" height="7" aria-hidden="true">
      <line x1="0" x2="100%" y1="3.5" y2="3.5" stroke="var(--rule)" />
      <rect x="0" y="2" width={`${Math.max(0, Math.min(1, share)) * 100}%`} height="3" fill="var(--copper)" />
    </svg>
  )
}
