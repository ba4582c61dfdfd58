import type { Point } from '#shared/science/fitting/types'
import { readCell } from './cell'

export const columns = ['x', 'y', 'sd'] as const
export type Column = typeof columns[number]
export type SheetRow = Record<Column, string>

export const columnNames: Record<Column, string> = { x: 'concentration', y: 'cloud point', sd: 'standard uncertainty' }

/** One thing wrong with a cell; the sentence names the row. */
export interface CellProblem {
  row: number
  column: Column
  /** what is wrong, with the row in front */
  finding: string
  /** what may have been meant, as it would be typed */
  suggestion: string | null
}

/** A row that is ready to be fitted; number is its place in the sheet, from 1. */
export interface SheetReading extends Point {
  number: number
}

export interface CheckedSheet {
  readings: SheetReading[]
  problems: CellProblem[]
  /** rows that hold anything at all */
  filled: number
  /** rows with a concentration but without a usable cloud point */
  gaps: { x: number, row: number }[]
}

/** Cloud points of aqueous solutions lie in here [°C]; common practice, wide on both sides. */
const plausible = { lowest: -20, highest: 150 } as const

/** Cloud points written in kelvin; outside the plausible range in °C on purpose. */
const kelvin = { zero: 273.15, lowest: 263, highest: 400 } as const

export function emptyRow(): SheetRow {
  return { x: '', y: '', sd: '' }
}

function badNumber(text: string, row: number): string {
  return `Row ${row}: “${text.trim()}” is not a number.`
}

function isKelvinLike(value: number): boolean {
  return value >= kelvin.lowest && value <= kelvin.highest
}

/** One such value is a slip of the decimal point; a whole column of them is another unit. */
function isColumnInKelvin(rows: readonly SheetRow[]): boolean {
  const values = rows.map(({ y }) => readCell(y)).filter(cell => cell.kind === 'number').map(({ value }) => value)
  return values.length > 1 && values.every(isKelvinLike)
}

function outOfRange(column: Column, value: number, row: number, isInKelvin: boolean): { finding: string, suggestion: string | null } | null {
  if (column === 'x' && value < 0) return { finding: `Row ${row}: a concentration cannot be negative.`, suggestion: String(-value) }
  if (column === 'sd' && value < 0) return { finding: `Row ${row}: a standard uncertainty cannot be negative.`, suggestion: String(-value) }
  if (column !== 'y' || (value >= plausible.lowest && value <= plausible.highest)) return null
  if (isInKelvin) return { finding: `Row ${row}: ${value} looks like kelvin; the sheet counts in °C.`, suggestion: String(Number((value - kelvin.zero).toFixed(4))) }
  const shifted = [10, 100, 1000].map(factor => value / factor).find(tenth => tenth >= 1 && tenth <= 100)
  return {
    finding: `Row ${row}: ${value} °C is outside ${plausible.lowest} to ${plausible.highest} °C. Is a decimal point missing?`.replace('-', '−'),
    suggestion: shifted === undefined ? null : String(Number(shifted.toPrecision(6))),
  }
}

function checkCell(text: string, column: Column, row: number, isInKelvin: boolean): CellProblem | number | null {
  const cell = readCell(text)
  if (cell.kind === 'empty') return null
  if (cell.kind === 'bad') return { row, column, finding: badNumber(text, row), suggestion: cell.suggestion }
  const problem = outOfRange(column, cell.value, row, isInKelvin)
  return problem ? { row, column, ...problem } : cell.value
}

/** Reads a whole sheet: what can be fitted, and every problem at once. Empty rows and unfinished ones are no problem. */
export function checkSheet(rows: readonly SheetRow[], hasUncertainty: boolean): CheckedSheet {
  const checked: CheckedSheet = { readings: [], problems: [], filled: 0, gaps: [] }
  const isInKelvin = isColumnInKelvin(rows)
  rows.forEach((cells, index) => {
    const row = index + 1
    const used = hasUncertainty ? columns : columns.slice(0, 2)
    if (used.every(column => cells[column].trim() === '')) return
    checked.filled += 1
    const results = new Map(used.map(column => [column, checkCell(cells[column], column, row, isInKelvin)]))
    const problems = [...results.values()].filter(result => result !== null && typeof result === 'object')
    checked.problems.push(...problems)
    const [x, y, sd] = [results.get('x'), results.get('y'), results.get('sd')]
    if (typeof x !== 'number') return
    if (typeof y === 'number' && problems.length === 0) checked.readings.push({ number: row, x, y, ...(typeof sd === 'number' && { sd }) })
    else if (problems.length > 0) checked.gaps.push({ x, row })
  })
  return checked
}
