import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { gridOfText } from '#shared/tables/grid'
import type { FoundReading, Grid, TableChoices, Understanding } from '#shared/tables/types'
import { understand, type TableContext } from '#shared/tables/understand'
import { root } from '../house/sources'

const folder = join(root, 'tests/fixtures/tables')

export const bytesOf = (file: string) => new Uint8Array(readFileSync(join(folder, file)))

export const noContext: TableContext = { clouds: 'on-heating', fileName: 'table.csv', batches: [] }

export function understandFile(file: string, choices: TableChoices = {}, context: Partial<TableContext> = {}): Understanding {
  return understand(gridOfText(bytesOf(file), { name: file }, choices), choices, { ...noContext, fileName: file, ...context })
}

export function understandText(text: string, choices: TableChoices = {}, context: Partial<TableContext> = {}): Understanding {
  return understand(gridOfText(text, { isPaste: true }, choices), choices, { ...noContext, ...context })
}

/** A sheet as a workbook's reader gives it: numbers are values, all else is text. */
export function sheet(rows: readonly (readonly (string | number | Grid['rows'][number]['cells'][number])[])[]): Grid {
  return {
    format: 'xlsx', encoding: null, sheets: ['Sheet1'], sheet: 'Sheet1',
    rows: rows.map((cells, index) => ({
      number: index + 1, isHidden: false,
      cells: cells.map(cell => typeof cell === 'number' ? { text: String(cell), value: cell } : typeof cell === 'string' ? { text: cell } : cell),
    })),
  }
}

export function readingsOf(understanding: Understanding): FoundReading[] {
  return understanding.rows.flatMap(row => row.readings)
}

/** Row, tone and code of every problem. */
export function problemsOf(understanding: Understanding): string[] {
  return understanding.rows.flatMap(row => row.problems.map(problem => `${problem.row} ${problem.tone} ${problem.code}`))
}

/** Code and subject of every question with the answer in force, or that it is still to be answered. */
export function questionsOf({ questions }: Understanding): string[] {
  return questions.map(({ code, subject, answer, isAssumed, isBlocking }) =>
    [code, subject, isBlocking ? 'to answer' : answer, isAssumed ? 'assumed' : ''].filter(Boolean).join(' '))
}

export function rowOf(understanding: Understanding, number: number): Understanding['rows'][number] {
  const row = understanding.rows.find(candidate => candidate.row === number)
  if (!row) throw new Error(`no row ${number}`)
  return row
}
