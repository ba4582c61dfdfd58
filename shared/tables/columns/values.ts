import type { HeadedColumn } from './columns'
import { decimalOfDouble, type Decimal } from '../cells/decimal'
import { readQuantity } from '../cells/quantity'
import type { GridRow } from '../types'

/** What the numbers of a column have in common, before its cells are read. */
export interface ColumnValues {
  /** plain numbers, without a unit of their own */
  numbers: Decimal[]
  withUnit: number
  /** cells that state an uncertainty as ±, whose kind they do not say */
  plusMinus: number
  points: number
  commas: number
  /** 1,234 and 1.234: thousands or decimals */
  doubtful: number
}

const doubtful = /^\s*[1-9]\d{0,2}[.,]\d{3}\s*$/

/** @param mayGroup whether numbers of this column can be so large that thousands are set apart */
export function valuesOf(rows: readonly GridRow[], index: number, mayGroup: boolean): ColumnValues {
  const values: ColumnValues = { numbers: [], withUnit: 0, plusMinus: 0, points: 0, commas: 0, doubtful: 0 }
  for (const row of rows) {
    const cell = row.cells[index]
    if (!cell || cell.isDate || cell.text === '') continue
    if (cell.value !== undefined) {
      values.numbers.push(decimalOfDouble(cell.value))
      continue
    }
    const reading = readQuantity(cell.text, 'both', false)
    if (reading.kind !== 'number') continue
    if (reading.unit) values.withUnit++
    else values.numbers.push(reading.number)
    if (reading.uncertainty && !reading.uncertainty.isConcise) values.plusMinus++
    if (mayGroup && doubtful.test(cell.text)) values.doubtful++
    else if (reading.mark === '.') values.points++
    else if (reading.mark === ',') values.commas++
  }
  return values
}

export function middleOf(numbers: readonly Decimal[]): number | null {
  const sorted = numbers.map(({ value }) => value).sort((a, b) => a - b)
  return sorted[Math.floor(sorted.length / 2)] ?? null
}

export function usualDecimalsOf(numbers: readonly Decimal[]): number {
  const counts = new Map<number, number>()
  for (const { decimals } of numbers) counts.set(decimals, (counts.get(decimals) ?? 0) + 1)
  return [...counts].reduce((best, next) => next[1] > best[1] ? next : best, [0, 0] as [number, number])[0]
}

const isBetween = (low: number, high: number) => ({ value }: Decimal) => value >= low && value <= high

export function shareBetween(numbers: readonly Decimal[], low: number, high: number): number {
  return numbers.length === 0 ? 0 : numbers.filter(isBetween(low, high)).length / numbers.length
}

/** Large amounts are written in mmol; thousands are set apart in those alone. */
export function mayGroup({ meaning, unit }: HeadedColumn): boolean {
  return meaning === 'concentration' && (unit === null || unit.startsWith('mmol'))
}
