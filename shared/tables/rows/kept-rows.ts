import { fold } from '../cells/fold'
import { headingWeight, type Head } from '../columns/head'
import { isSummaryWord } from '../columns/header-words'
import { undecided, type Finding, type ReadCell } from '../readers/finding'
import { columnFor, type Plan } from '../columns/plan'
import type { GridRow } from '../types'

/** Why a row is no reading. */
export function keptFinding(code: Finding['code'], message: string, detail: string, column: number | null = null): Finding {
  return { column, code, tone: 'kept', message, detail }
}

/** Cells that begin with a digit or a sign are neither headings nor words; most cells of a table are. */
const isWord = (cell: ReadCell | undefined) => cell !== undefined && cell.value === undefined && cell.text.length < 80 && !/^(?:$|[\d\s.+-])/.test(cell.text)

/** Whether a row says what the head says, in two cells or more and nothing else. */
function says(row: readonly ReadCell[], head: GridRow | null): boolean {
  if (!head || !row.some(isWord)) return false
  const pairs = head.cells.map((cell, index) => [fold(cell.text), fold(row[index]?.text ?? '')] as const).filter(([, own]) => own !== '')
  return pairs.length >= 2 && pairs.every(([text, own]) => text === own)
}

const leastHeadings = 1.5

/** A row of headings that are not those of the table: what stands below it may be another table. */
function isOtherHeader(row: readonly ReadCell[], plan: Plan): boolean {
  const filled = row.filter((cell, index) => cell.text.trim() !== '' && plan.columns[index]?.meaning !== 'note')
  return filled.length >= 2 && filled.every(isWord) && filled.reduce((sum, cell) => sum + headingWeight(cell.text), 0) >= leastHeadings
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

/**
 * Why a row below the header is no reading: the header again, or a mean of the rest.
 * Another header waits for a person, because rows below it would be read under the wrong salt.
 */
export function keptRow(cells: readonly ReadCell[], head: Head, plan: Plan, isAgreed: boolean): Finding | null {
  if (says(cells, head.header) || says(cells, head.units)) return keptFinding('repeated-header', 'The header again', 'Kept with the file; the rows below it are read like those above.')
  const summary = summaryFinding(cells, plan)
  if (summary || !head.header || !isOtherHeader(cells, plan)) return summary
  if (isAgreed) return keptFinding('repeated-header', 'Another header', 'Kept with the file; the rows below it are read like those above.')
  return undecided(null, 'repeated-header', 'Another header', `The rows below it are read under the header of row ${head.header.number}. Agree if they hold the same; if not, cut the table into one file each.`)
}
