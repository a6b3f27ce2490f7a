import { useLayoutEffect, useMemo, useRef, useState, type KeyboardEvent } from 'react'
import type { Result } from '../../../main/contract/result'
import { run } from '../../commands/command'
import { selectComparator } from '../../commands/select-comparator'
import { zoomBank } from '../../commands/zoom-bank'
import { chosenEntry } from '../../state/selection'
import { useApp, useStore } from '../../state/use-store'
import { arrangeLadder, arrangeLanes, heldWithin, neighbour, towards, type Arrangement } from './arrange'
import { describeCell } from './describe'
import { paintBank } from './paint'
import { usePalette, useSize } from './use-canvas'
import { usePointer } from './use-pointer'

function arrange(result: Result, width: number, height: number): Arrangement {
  const { comparators } = result
  if (comparators[0].cycle === null) return arrangeLadder(comparators.length, width, height)
  return arrangeLanes(comparators.map(({ lane, cycle }) => ({ lane, cycle: cycle ?? 1 })), width, height)
}

/** The bank as a canvas, with a grid of the same cells for the keyboard and for readers. */
export function Picture({ result }: { result: Result }) {
  const app = useApp()
  const frame = useRef<HTMLDivElement>(null)
  const canvas = useRef<HTMLCanvasElement>(null)
  const { width, height } = useSize(frame)
  const palette = usePalette(frame)
  const wanted = useStore(app.views, (state) => state.zoom)
  const chosen = useStore(app.views, (state) => state.selected)
  const zoom = useMemo(() => heldWithin(wanted, width, height), [wanted, width, height])
  const arrangement = useMemo(() => arrange(result, width, height), [result, width, height])
  const selected = chosenEntry(result, chosen).index - 1

  useLayoutEffect(() => {
    const target = canvas.current
    const context = target?.getContext('2d')
    if (!target || !context || !palette || width === 0) return
    const ratio = window.devicePixelRatio
    if (target.width !== Math.round(width * ratio)) target.width = Math.round(width * ratio)
    if (target.height !== Math.round(height * ratio)) target.height = Math.round(height * ratio)
    context.setTransform(ratio, 0, 0, ratio, 0, 0)
    paintBank(context, { arrangement, entries: result.comparators, palette, zoom, width, height, selected })
  }, [arrangement, result, palette, zoom, width, height, selected])

  const select = (index: number) => {
    run(app, selectComparator, { index: index + 1 })
    run(app, zoomBank, towards(arrangement, zoom, index, width, height))
  }
  usePointer(frame, { arrangement, zoom, width, height, select })
  return (
    <div className="bank-frame" ref={frame}>
      <canvas ref={canvas} aria-hidden="true" />
      {width > 0 && <Cells result={result} arrangement={arrangement} zoom={zoom} selected={selected} select={select} />}
    </div>
  )
}

interface CellsProps {
  result: Result
  arrangement: Arrangement
  zoom: { scale: number; x: number; y: number }
  selected: number
  select(index: number): void
}

const moves: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1],
}

/** One row of the grid at a time is there for readers: the one with the selected cell. */
function Cells({ result, arrangement, zoom, selected, select }: CellsProps) {
  const app = useApp()
  const cell = arrangement.cells[selected]
  const [focused, setFocused] = useState(false)
  const onKey = (event: KeyboardEvent) => {
    const move = moves[event.key]
    if (event.ctrlKey || event.metaKey || event.altKey) return
    if (move) select(neighbour(arrangement, selected, ...move))
    else if (event.key === 'Home') select(0)
    else if (event.key === 'End') select(arrangement.cells.length - 1)
    else if (event.key === '+' || event.key === '=') run(app, zoomBank, about(1.5))
    else if (event.key === '-') run(app, zoomBank, about(1 / 1.5))
    else if (event.key === '0') run(app, zoomBank, { scale: 1, x: 0, y: 0 })
    else return
    event.preventDefault()
  }
  const about = (factor: number) => {
    const [x, y] = [cell.x + arrangement.cell_width / 2, cell.y + arrangement.cell_height / 2]
    return { scale: zoom.scale * factor, x: zoom.x - x * zoom.scale * (factor - 1), y: zoom.y - y * zoom.scale * (factor - 1) }
  }
  return (
    <div role="grid" className="bank-grid" tabIndex={0} data-room-start aria-label="Comparators" aria-rowcount={arrangement.rows}
      aria-colcount={arrangement.columns} aria-activedescendant="bank-cell" onKeyDown={onKey}
      onFocus={() => setFocused(true)} onBlur={() => setFocused(false)}>
      <div role="row" aria-rowindex={cell.row + 1}>
        <div role="gridcell" id="bank-cell" aria-colindex={cell.column + 1} aria-selected="true" data-focused={focused ? '' : undefined}
          style={{
            left: cell.x * zoom.scale + zoom.x, top: cell.y * zoom.scale + zoom.y,
            width: arrangement.cell_width * zoom.scale, height: arrangement.cell_height * zoom.scale,
          }}>
          <span className="hidden">{describeCell(result.comparators[selected], result.plan.converter.lanes)}</span>
        </div>
      </div>
    </div>
  )
}

