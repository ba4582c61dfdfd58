import type { HeadedColumn } from './columns'
import type { DateOrder } from '../cells/dates'
import type { DecimalMark } from '../cells/number'
import type { ColumnMeaning, Grid } from '../types'

/** A column with what its values say, by which its cells are read. */
export interface PlannedColumn extends HeadedColumn {
  /** middle of the plain numbers of the column, in its own unit; null: it has none */
  middle: number | null
  /** decimals that most of its numbers have */
  usualDecimals: number
  /** thousands may be set apart by a comma or point, as in 1,250 mmol/L */
  mayGroup: boolean
  /** true: the unit is still to be asked for */
  isUnitOpen: boolean
}

/** How the table is read: settled before the first row is. */
export interface Plan {
  format: Grid['format']
  columns: readonly PlannedColumn[]
  /** the mark of most numbers */
  decimal: DecimalMark
  /** true: both marks stand for decimals, cell by cell */
  isMixed: boolean
  dateOrder: DateOrder
  /** salt of every row that names none; null: unknown */
  salt: string | null
  /** true: exported by us; read back without filling in or joining anything */
  isOwnExport: boolean
  /** headings of columns that stay with the file because others were taken for what they say */
  leftBehind: readonly string[]
  /** headings of columns whose meaning comes from their values */
  readByValues: readonly string[]
}

/** Columns in which only numbers make sense. */
export const isMeasured = ({ meaning }: PlannedColumn) => meaning === 'concentration' || meaning === 'cloud-point' || meaning === 'uncertainty'

export function columnFor(plan: Plan, meaning: ColumnMeaning): PlannedColumn | undefined {
  return plan.columns.find(column => column.meaning === meaning)
}

export function columnsFor(plan: Plan, meaning: ColumnMeaning): PlannedColumn[] {
  return plan.columns.filter(column => column.meaning === meaning)
}
