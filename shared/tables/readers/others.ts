import { dayOfSerial, readDate } from '../cells/dates'
import { fault, nothing, quantityOf, taken, type Finding, type Found, type ReadCell } from './finding'
import { fold } from '../cells/fold'
import { directionOf } from '../columns/header-words'
import type { Plan, PlannedColumn } from '../columns/plan'
import { dateOrders, type FoundReading } from '../types'

const isEmpty = (cell: ReadCell | undefined) => cell === undefined || cell.text.trim() === ''

/** What is nice to have and cannot be read is left out of the reading, and said. */
function without(column: number, code: Finding['code'], what: string, text: string): Found<never> {
  return { value: null, findings: [taken(column, code, `Not a ${what}: ${text.trim().slice(0, 60)}`, `The reading comes in without a ${what}; type it to give it one.`)] }
}

export function readDateCell(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<string> {
  if (isEmpty(cell)) return nothing
  if (cell.isDate) return { value: cell.text, findings: [] }
  const order = dateOrders.find(known => known === column.unit) ?? plan.dateOrder
  const date = readDate(cell.text, order)
  if (date) return { value: date, findings: [] }
  const number = cell.value ?? Number(cell.text)
  const day = Number.isFinite(number) ? dayOfSerial(number) : null
  if (day) return { value: day, findings: [taken(column.index, 'date-number', `Reads as ${day}`, 'A spreadsheet keeps days as numbers; this is the day behind the number.')] }
  return without(column.index, 'bad-date', 'date', cell.text)
}

const mostSamples = 100_000

/** How many independent samples stand behind a value. */
export function readSamples(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<number> {
  const reading = quantityOf({ ...cell, text: cell.text.replace(/^\s*n\s*=\s*/i, '') }, column, plan)
  if (reading.kind === 'empty' || reading.kind === 'not-determined') return nothing
  if (reading.kind === 'number' && Number.isInteger(reading.number.value) && reading.number.value >= 1 && reading.number.value <= mostSamples) return { value: reading.number.value, findings: [] }
  return { value: null, findings: [fault(column.index, 'not-a-number', `Not a number of samples: ${cell.text.trim().slice(0, 60)}`, 'Type a whole number from 1, or empty the cell.')] }
}

export function readPlainNumber(cell: ReadCell, column: PlannedColumn, plan: Plan, what: 'rate' | 'pH'): Found<number> {
  const reading = quantityOf(cell, column, plan)
  if (reading.kind === 'empty' || reading.kind === 'not-determined') return nothing
  const isPossible = reading.kind === 'number' && reading.number.value >= 0 && (what === 'rate' || reading.number.value <= 14)
  return isPossible ? { value: reading.number.value, findings: [] } : without(column.index, 'not-a-number', what, cell.text)
}

const letters: Readonly<Record<string, NonNullable<FoundReading['direction']>>> = { h: 'heating', c: 'cooling' }

export function readDirection(cell: ReadCell, column: PlannedColumn): Found<NonNullable<FoundReading['direction']>> {
  if (isEmpty(cell)) return nothing
  const word = fold(cell.text)
  const direction = directionOf(word) ?? letters[word]
  if (direction) return { value: direction, findings: [] }
  return { value: null, findings: [fault(column.index, 'not-a-number', `Not a direction: ${cell.text.trim().slice(0, 60)}`, 'Type heating or cooling, or empty the cell.')] }
}

const limitWords: Readonly<Record<string, FoundReading['limit']>> = {
  'exact': 'exact', '=': 'exact', 'below': 'below', '<': 'below', 'under': 'below', 'above': 'above', '>': 'above', 'over': 'above', 'salt-precipitated': 'salt-precipitated', 'salt precipitated': 'salt-precipitated',
}

export function readLimit(cell: ReadCell, column: PlannedColumn): Found<FoundReading['limit']> {
  if (isEmpty(cell)) return nothing
  const limit = limitWords[fold(cell.text)]
  if (limit) return { value: limit, findings: [] }
  return { value: null, findings: [fault(column.index, 'not-a-number', `Not a limit: ${cell.text.trim().slice(0, 60)}`, 'Type exact, below, above or salt-precipitated, or empty the cell.')] }
}

/** Words of a person. The apostrophe with which spreadsheets keep text from being a formula does not belong to them. */
export function readWords(cell: ReadCell | undefined): string | null {
  const text = cell?.text.trim().replace(/^'(?='*[=+\-@\t\r])/, '') ?? ''
  return text === '' ? null : text
}
