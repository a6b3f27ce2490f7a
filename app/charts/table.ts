/** A table as a chart shows it; copied as TSV. */
export interface Table {
  readonly columns: readonly { readonly title: string; readonly number: boolean }[]
  readonly rows: readonly (readonly string[])[]
}

/** Tab-separated text, as spreadsheets take it. */
export function tsvOf(table: Table): string {
  const clean = (text: string) => text.replace(/[\t\r\n]+/g, ' ')
  return [table.columns.map(({ title }) => title), ...table.rows].map((row) => row.map(clean).join('\t')).join('\n')
}
