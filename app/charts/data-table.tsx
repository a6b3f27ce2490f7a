import type { Table } from './table'

/** A plain table of words and figures. */
export function DataTable({ table, caption }: { table: Table; caption: string }) {
  return (
    <table className="data">
      <caption className="hidden">{caption}</caption>
      <thead>
        <tr>{table.columns.map(({ title, number }) => <th key={title} scope="col" className={number ? 'number' : ''}>{title}</th>)}</tr>
      </thead>
      <tbody>
        {table.rows.map((row, index) => (
          <tr key={index}>
            {row.map((text, column) => (column === 0
              ? <th key={column} scope="row" className={table.columns[column].number ? 'number' : ''}>{text}</th>
              : <td key={column} className={table.columns[column].number ? 'number' : ''}>{text}</td>))}
          </tr>
        ))}
      </tbody>
    </table>
  )
}
