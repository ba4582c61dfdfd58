import type { Head } from './columns/head'
import { readQuantity } from './cells/quantity'
import { TableError, type Grid, type GridRow } from './types'

const filled = ({ cells }: GridRow) => cells.filter(({ text }) => text.trim() !== '')
const hasNumber = (row: GridRow) => filled(row).some(({ text, value }) => value !== undefined || readQuantity(text, 'both', false).kind === 'number')

/** Refuses a table that cannot hold a reading: without rows, without a second column, without numbers. */
export function refuseContent(grid: Grid, head: Head): void {
  if (grid.rows.length === 0) throw new TableError('empty', 'The table is empty. Choose the file that holds the readings, another sheet of it, or paste the table.')
  if (head.header && head.below.length === 0) throw new TableError('header-only', 'The table has a header but no rows below it. Add the readings, or choose another sheet or file.')
  if (head.below.every(row => filled(row).length < 2)) {
    throw new TableError('one-column', 'The table has one column. A reading needs at least a concentration and a cloud point; check what stands between the columns, or choose another file.')
  }
  if (!head.below.some(hasNumber)) throw new TableError('no-numbers', 'The table holds no numbers. Choose the file or sheet that holds the readings.')
}
