import { strFromU8, Unzip, UnzipInflate, unzipSync, type UnzipFile } from 'fflate'
import readWorkbook from 'read-excel-file/node'
import { refuseByMagic, refuseTooLarge } from '#shared/tables/refusals'
import { TableError, type Grid, type GridCell, type GridRow, type TableChoices } from '#shared/tables/types'
import { factsOf, type SheetFacts } from './sheet-facts'

/** Bytes a workbook may hold once it is unpacked: fifty times the largest upload's usual content. */
const mostInside = 100_000_000
const broken = () => new TableError('broken-xlsx', 'The XLSX file is damaged. Open it in your spreadsheet, save it again, or save the sheet as CSV.')
const tooLarge = () => new TableError('too-large-inside', 'The XLSX file unpacks to more than 100 MB. Save only the sheet with the readings, or save it as CSV.')

/** Unpacks piece by piece and counts, so that a small file never becomes a large memory. What it says of itself is not believed. */
function refuseBomb(bytes: Uint8Array): void {
  let declared = 0
  unzipSync(bytes, { filter: ({ originalSize }) => {
    declared += originalSize
    return false
  } })
  if (declared > mostInside) throw tooLarge()
  let inside = 0
  const unzip = new Unzip((file: UnzipFile) => {
    file.ondata = (error, chunk) => {
      if (error) throw broken()
      inside += chunk.length
      if (inside > mostInside) throw tooLarge()
    }
    file.start()
  })
  unzip.register(UnzipInflate)
  const piece = 65_536
  for (let from = 0; from < bytes.length; from += piece) unzip.push(bytes.subarray(from, from + piece), from + piece >= bytes.length)
}

const day = (value: Date) => value.toISOString().slice(0, 10)
const millisecondsPerDay = 86_400_000
const firstSerialDay = Date.UTC(1899, 11, 30)

type Value = string | number | boolean | Date | null

function cellOf(value: Value): GridCell {
  if (value === null) return { text: '' }
  if (typeof value === 'number') return { text: String(value), value }
  if (value instanceof Date) return { text: day(value), value: (value.getTime() - firstSerialDay) / millisecondsPerDay, isDate: true }
  return { text: String(value) }
}

/** Repeats of a merged range hold what its first cell holds, and say so. */
function spreadMerged(rows: GridRow[], merges: SheetFacts['merges']): void {
  for (const { top, left, bottom, right } of merges) {
    const first = rows[top]?.cells[left]
    if (!first || first.text === '') continue
    for (let row = top; row <= Math.min(bottom, rows.length - 1); row++) {
      for (let column = left; column <= right; column++) {
        if (row !== top || column !== left) rows[row]!.cells[column] = { ...first, isMerged: true }
      }
    }
  }
}

function rowsOf(data: readonly (readonly Value[])[], facts: SheetFacts): GridRow[] {
  const rows = data.map((values, index): GridRow => ({
    number: index + 1,
    cells: values.map((value, column) => {
      const formula = facts.formulas.get(`${index}:${column}`)
      return { ...cellOf(value), ...(formula !== undefined && { formula }) }
    }),
    isHidden: facts.hidden.has(index),
  }))
  spreadMerged(rows, facts.merges)
  return rows.filter(row => row.cells.some(cell => cell.text.trim() !== ''))
}

type Sheet = { sheet: string, data: Value[][] }

const holds = ({ data }: Sheet, isWanted: (value: Value) => boolean) => data.some(row => row.some(isWanted))

/** The sheet asked for, else the first that holds numbers, else the first that holds anything. */
function chosenSheet(sheets: readonly Sheet[], wanted: string | undefined): Sheet | undefined {
  return sheets.find(({ sheet }) => sheet === wanted)
    ?? sheets.find(sheet => holds(sheet, value => typeof value === 'number'))
    ?? sheets.find(sheet => holds(sheet, value => value !== null)) ?? sheets[0]
}

/**
 * A sheet of a workbook as a grid: values as the file caches them (formulas are never run), hidden rows, merged ranges.
 * @throws TableError pdf, ods, old-xls, broken-xlsx, too-large-inside, too-many-rows, too-many-columns, empty
 */
export async function gridOfWorkbook(bytes: Uint8Array, choices: TableChoices): Promise<Grid> {
  refuseByMagic(bytes)
  try {
    refuseBomb(bytes)
    const sheets = await readWorkbook(Buffer.from(bytes)) as Sheet[]
    const chosen = chosenSheet(sheets, choices.sheet)
    if (!chosen) throw new TableError('empty', 'The workbook holds no sheet.')
    refuseTooLarge(chosen.data.length, Math.max(0, ...chosen.data.slice(0, 100).map(row => row.length)))
    const parts = unzipSync(bytes, { filter: ({ name }) => name.startsWith('xl/w') || name.startsWith('xl/_rels/') })
    const texts = new Map(Object.entries(parts).map(([name, part]) => [name, strFromU8(part)]))
    const rows = rowsOf(chosen.data, factsOf(texts, chosen.sheet))
    if (rows.length === 0) throw new TableError('empty', `The sheet “${chosen.sheet}” is empty. Choose the sheet that holds the table.`)
    return { format: 'xlsx', encoding: null, sheets: sheets.map(({ sheet }) => sheet), sheet: chosen.sheet, rows }
  }
  catch (error) {
    // Whatever the unpacking and reading trip over is a file they cannot read.
    throw error instanceof TableError ? error : broken()
  }
}
