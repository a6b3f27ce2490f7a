/** The columns of the bench table: title, width, and the text of a row. */
const columns = [
  ['measured', 72, ({ what }) => what],
  ['runs', 5, ({ runs }) => String(runs)],
  ['median', 9, ({ median_ms }) => figure(median_ms)],
  ['95 %', 9, ({ high_ms }) => figure(high_ms)],
  ['CPU', 9, ({ cpu_ms }) => figure(cpu_ms)],
  ['aim', 8, ({ aim_ms }) => figure(aim_ms)],
  ['', 10, ({ median_ms, cpu_ms, aim_ms }) => verdict(median_ms, cpu_ms, aim_ms)],
]

/** Three digits, no exponent; — for what is not there. */
function figure(value) {
  if (value === null) return '—'
  return value >= 100 ? String(Math.round(value)) : String(Number(value.toPrecision(3)))
}

function verdict(median_ms, cpu_ms, aim_ms) {
  if (aim_ms === null) return ''
  if (median_ms <= aim_ms) return 'met'
  return cpu_ms !== null && cpu_ms <= aim_ms ? 'CPU only' : 'missed'
}

const line = (cells) => cells.map((cell, i) => (i === 0 ? cell.padEnd(columns[i][1]) : cell.padStart(columns[i][1]))).join('').trimEnd()

export const headLine = () => line(columns.map(([title]) => title))

/** @param {{ what: string, runs: number, median_ms: number, high_ms: number, cpu_ms: number | null, aim_ms: number | null }} row */
export const rowLine = (row) => line(columns.map(([, , text]) => text(row)))
