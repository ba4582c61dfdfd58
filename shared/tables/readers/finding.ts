import { readQuantity, type QuantityReading } from '../cells/quantity'
import { decimalOfDouble, typed } from '../cells/decimal'
import { numbersBehindDate } from '../cells/dates'
import type { Plan, PlannedColumn } from '../columns/plan'
import type { GridCell, RowProblem } from '../types'

/** A problem before its row is known. */
export type Finding = Omit<RowProblem, 'row'>

/** What a cell gave, and what about it a person should see. */
export interface Found<T> { value: T | null, findings: Finding[] }

export const nothing: { value: null, findings: Finding[] } = { value: null, findings: [] }

/** Something that cannot be read; a suggestion is what the cell may have meant. */
export function fault(column: number | null, code: Finding['code'], message: string, detail: string, suggestion?: string): Finding {
  return { column, code, tone: 'fault', message, detail, ...(suggestion === undefined ? {} : { suggestion }) }
}

/** Something that was read as the message says. */
export function taken(column: number | null, code: Finding['code'], message: string, detail: string, suggestion?: string): Finding {
  return { ...fault(column, code, message, detail, suggestion), tone: 'taken' }
}

/** Something that waits for a person. */
export function undecided(column: number | null, code: Finding['code'], message: string, detail: string, suggestion?: string): Finding {
  return { ...fault(column, code, message, detail, suggestion), tone: 'decide' }
}

export const quoted = (text: string) => `“${text.trim().slice(0, 60)}”`

/** A cell that the file holds, or one that a person corrected: then its text alone counts and either decimal mark is right. */
export interface ReadCell extends GridCell { isCorrected?: boolean }

const plainNumber = { mark: null, isGrouped: false, unit: null, uncertainty: null, limit: 'exact', isApproximate: false, isFormulaLike: false } as const

/** The number a cell holds by its file or by its text. */
export function quantityOf(cell: ReadCell, column: PlannedColumn, plan: Plan): QuantityReading {
  if (cell.isDate) return { kind: 'date' }
  if (cell.value !== undefined) return { kind: 'number', number: decimalOfDouble(cell.value), ...plainNumber }
  const reading = readQuantity(cell.text, cell.isCorrected ? 'both' : plan.decimal, column.mayGroup)
  return reading.kind === 'text' && numbersBehindDate(cell.text).length > 0 ? { kind: 'date' } : reading
}

/** A number that a spreadsheet took for a date: the candidate nearest to its column, or with as many decimals. */
export function dateFinding(cell: GridCell, column: PlannedColumn): Finding {
  const candidates = numbersBehindDate(cell.text)
  const [first = ''] = candidates
  const distance = (text: string) => Math.abs(Number(text) - (column.middle ?? Number(first))) + Math.abs((text.split('.')[1]?.length ?? 0) - column.usualDecimals) * 1e-3
  const best = candidates.reduce((nearest, next) => distance(next) < distance(nearest) ? next : nearest, first)
  return undecided(column.index, 'date-number', `A date where a number belongs: ${cell.text.trim()}`,
    `A spreadsheet makes dates of numbers such as ${best}. Agree if that was typed, or type the number.`, best)
}

/** Remarks on a number that could be read all the same. */
export function takenFindings(cell: ReadCell, column: PlannedColumn, reading: QuantityReading, plan: Plan): Finding[] {
  if (reading.kind !== 'number') return []
  const findings: Finding[] = []
  const { index } = column
  const reads = `Reads as ${typed(reading.number)}`
  if (plan.format === 'xlsx' && cell.value === undefined && !cell.isCorrected) findings.push(taken(index, 'text-number', 'A number stored as text', `${reads}.`))
  if (reading.isGrouped) findings.push(taken(index, 'thousands', reads, `The thousands of ${quoted(cell.text)} are set apart.`))
  if (reading.isApproximate) findings.push(taken(index, 'approximate', `An approximate value: ${cell.text.trim()}`, `${reads}; the mark stays with the file.`))
  if (reading.isFormulaLike) findings.push(taken(index, 'formula-like', `${reads}`, `${quoted(cell.text)} begins like a formula. Formulas are never run; the number behind the sign is taken.`))
  return findings
}

/** The decimal mark of a cell that differs from most of its table. */
export function hasOtherMark(cell: ReadCell, reading: QuantityReading, plan: Plan): boolean {
  return plan.isMixed && !cell.isCorrected && reading.kind === 'number' && reading.mark !== null && reading.mark !== plan.decimal
}

/** Faults that no number of any kind can come out of. */
export function unreadableNumber(cell: GridCell, column: number, kind: QuantityReading['kind'], what: string): Finding {
  if (kind === 'formula-like') return fault(column, 'formula-like', `A formula without a value: ${cell.text.trim().slice(0, 60)}`, 'Formulas are never run. Type the number it stands for.')
  if (cell.formula !== undefined && cell.text.trim() === '') return fault(column, 'formula', 'A formula without a value', 'The file keeps no value for it, and formulas are never run. Type the number.')
  return fault(column, 'not-a-number', `Not a ${what}: ${cell.text.trim().slice(0, 60)}`, `Type the ${what}, or leave the row out.`)
}
