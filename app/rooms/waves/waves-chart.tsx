import { useMemo } from 'react'
import { CartesianGrid, Label, Line, LineChart, ReferenceArea, ReferenceLine, ResponsiveContainer, XAxis, YAxis } from 'recharts'
import type { Waves } from '../../../main/contract/waves'
import { formatSi } from '../../../main/contract/units'
import { ticksOf } from '../../charts/ticks'
import { lineStyles, thinned } from './columns'
import { isNamed } from './phases'

const drawnPoints = 600

function extent(values: readonly number[]): [number, number] {
  return [Math.min(...values), Math.max(...values)]
}

/** The voltages over time, with the phases of the decision behind them. */
export function WavesChart({ waves, name }: { waves: Waves; name: string }) {
  const data = useMemo(() => thinned(waves.rows, drawnPoints)
    .map((row) => Object.fromEntries(row.map((value, index) => [waves.columns[index], value]))), [waves])
  const drawn = Object.keys(lineStyles).filter((column) => waves.columns.includes(column))
  const [from, to] = extent(data.map((row) => row.time_s))
  const [low, high] = extent(data.flatMap((row) => drawn.map((column) => row[column])))
  const bottom = Math.min(0, low)
  return (
    <ResponsiveContainer width="100%" height="100%">
      <LineChart data={data} margin={{ top: 18, right: 12, bottom: 2, left: 0 }} accessibilityLayer title={`Waves of ${name}`}>
        {waves.phases.map((phase, index) => (
          <ReferenceArea key={index} x1={Math.max(from, phase.from_s)} x2={Math.min(to, phase.to_s)} fill={`var(--wash-${phase.name})`} fillOpacity={1} stroke="none" ifOverflow="hidden">
            {isNamed(waves, phase) && <Label value={phase.name} position="top" className="phase-name" offset={4} />}
          </ReferenceArea>
        ))}
        <CartesianGrid vertical={false} stroke="var(--rule)" strokeDasharray="2 4" />
        <XAxis dataKey="time_s" type="number" domain={[from, to]} ticks={ticksOf(from, to, 9)} tickFormatter={(value: number) => formatSi(value, 's')} stroke="var(--edge)" tick={{ fill: 'var(--muted)' }} tickLine={false} height={22} />
        <YAxis type="number" domain={[bottom, high + (high - bottom) * 0.06]} ticks={ticksOf(bottom, high, 4)} tickFormatter={(value: number) => formatSi(value, 'V', 2)} stroke="var(--edge)" tick={{ fill: 'var(--muted)' }} tickLine={false} width={62} />
        {waves.decision_s !== null && <ReferenceLine x={waves.decision_s} stroke="var(--ink)" strokeDasharray="2 3" />}
        {drawn.map((column) => (
          <Line key={column} dataKey={column} dot={false} activeDot={false} isAnimationActive={false} stroke={lineStyles[column].color}
            strokeWidth={lineStyles[column].width} strokeDasharray={lineStyles[column].dash} />
        ))}
      </LineChart>
    </ResponsiveContainer>
  )
}
