export type CsvRow = Readonly<Record<string, string>>

/** Rows of a comma-separated table by the names of its header; quoted cells may hold commas, not line ends. */
export function readCsv(text: string): CsvRow[] {
  const [header = [], ...rows] = text.trimEnd().split('\n').map(cellsOf)
  return rows.map(cells => Object.fromEntries(header.map((name, column) => [name, cells[column] ?? ''])))
}

function cellsOf(line: string): string[] {
  return [...line.matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g)].map(([, quoted, plain]) => quoted?.replaceAll('""', '"') ?? plain ?? '')
}
