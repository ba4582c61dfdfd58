import { fold } from '../cells/fold'
import type { Head } from '../columns/head'
import { isSummaryWord } from '../columns/header-words'
import type { Finding, ReadCell } from '../readers/finding'
import { columnFor, type Plan } from '../columns/plan'
import type { GridRow } from '../types'

/** Why a row is no reading. */
export function keptFinding(code: Finding['code'], message: string, detail: string, column: number | null = null): Finding {
  return { column, code, tone: 'kept', message, detail }
}

/** Cells that begin with a digit or a sign are neither headings nor words; most cells of a table are. */
const isWord = (cell: ReadCell | undefined) => cell !== undefined && cell.value === undefined && cell.text.length < 80 && !/^(?:$|[\d\s.+-])/.test(cell.text)

function says(row: readonly ReadCell[], head: GridRow | null): boolean {
  if (!head || !row.some(isWord)) return false
  const wanted = head.cells.map((cell, index) => [fold(cell.text), row[index]] as const).filter(([text]) => text !== '')
  const same = wanted.filter(([text, cell]) => cell !== undefined && isWord(cell) && fold(cell.text) === text).length
  return wanted.length >= 2 && same >= Math.max(2, wanted.length * 0.6)
}

const isCalculated = (cell: ReadCell | undefined) => /^=?(?:AVERAGE|MEDIAN|STDEV|STABW|MITTELWERT|SUM|SUMME|MOYENNE|PROMEDIO|GJENNOMSNITT)[A-Z.]*\(/i.test(cell?.formula ?? '')

function summaryFinding(cells: readonly ReadCell[], plan: Plan): Finding | null {
  const concentration = columnFor(plan, 'concentration')
  const salt = columnFor(plan, 'salt')
  const text = concentration ? cells[concentration.index]?.text.trim() ?? '' : ''
  const isWithoutConcentration = text === '' || !/\d/.test(text)
  const column = cells.findIndex(cell => isWord(cell) && isSummaryWord(fold(cell.text)))
  const isNamed = column >= 0 && (isWithoutConcentration || column === salt?.index)
  const isWorkedOut = isWithoutConcentration && cells.some(isCalculated)
  if (!isNamed && !isWorkedOut) return null
  return keptFinding('summary-row', 'A summary row', isWithoutConcentration ? 'No concentration. Kept with the file, left out of the series.' : 'It sums up other rows. Kept with the file, left out of the series.')
}

/** Why a row below the header is no reading: the header again, or a mean of the rest. */
export function keptRow(cells: readonly ReadCell[], head: Head, plan: Plan): Finding | null {
  if (says(cells, head.header) || says(cells, head.units)) return keptFinding('repeated-header', 'The header again', 'Kept with the file; the rows below it are read like those above.')
  return summaryFinding(cells, plan)
}
