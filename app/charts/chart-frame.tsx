import { useRef, useState, type ReactNode } from 'react'
import { Button } from 'react-aria-components'
import { fileName } from '../files/files'
import { useApp } from '../state/use-store'
import { DataTable } from './data-table'
import { pictureOf } from './save-picture'
import { tsvOf, type Table } from './table'

interface Props {
  title: string
  /** Beside the title: what the chart is of, and its key. */
  head?: ReactNode
  table: Table
  children: ReactNode
  exportable?: boolean
  /** The chart is of something before; set back, and not to be taken along. */
  stale?: boolean
}

/** Every chart: a title, the same as a table, and ways to take either along. */
export function ChartFrame({ title, head, table, children, exportable = true, stale = false }: Props) {
  const app = useApp()
  const [asTable, setAsTable] = useState(false)
  const [copied, setCopied] = useState(false)
  const body = useRef<HTMLDivElement>(null)
  const copy = async () => {
    await navigator.clipboard.writeText(tsvOf(table)).then(() => setCopied(true), () => app.views.patch({
      notice: { tone: 'stop', text: 'The table could not be copied: the browser does not allow it here.', details: [] },
    }))
    setTimeout(() => setCopied(false), 1500)
  }
  const save = async (kind: 'svg' | 'png') => {
    const picture = body.current ? await pictureOf(body.current, kind) : null
    if (picture) await app.files.hand(picture, fileName(title, `.${kind}`))
  }
  return (
    <figure className="chart" aria-label={title}>
      <div className="chart-head">
        <h3 className="small strong">{title}</h3>
        {head}
        <div className="chart-tools">
          <Button className="button quiet small" onPress={() => setAsTable(!asTable)}>{asTable ? 'Chart' : 'Table'}</Button>
          <Button className="button quiet small" isDisabled={stale} onPress={() => void copy()}>{copied ? 'Copied' : 'Copy table'}</Button>
          {exportable && !asTable && <Button className="button quiet small" isDisabled={stale} onPress={() => void save('svg')}>SVG</Button>}
          {exportable && !asTable && <Button className="button quiet small" isDisabled={stale} onPress={() => void save('png')}>PNG</Button>}
        </div>
      </div>
      <div className="chart-body" ref={body} data-stale={stale ? '' : undefined}>{asTable ? <DataTable table={table} caption={title} /> : children}</div>
    </figure>
  )
}
