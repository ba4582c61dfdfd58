import { hasOtherMark, quantityOf, quoted, taken, type Finding, type ReadCell } from '../readers/finding'
import { isMeasured, type Plan } from '../columns/plan'
import type { RowContext } from './row-context'
import type { GridRow } from '../types'

/** What the sheet does with a row: hides it, merges its cells. */
export function aboutRow(row: GridRow, cells: readonly ReadCell[], { plan, width }: RowContext): Finding[] {
  const findings: Finding[] = []
  if (row.isHidden) findings.push(taken(0, 'hidden-row', 'A hidden row', 'The sheet hides this row. It is read like the others.'))
  const merged = row.cells.findIndex((cell, index) => cell.isMerged && index < width && plan.columns[index]?.meaning !== 'kept')
  if (merged >= 0) findings.push(taken(merged, 'merged', 'Merged cells', `${quoted(cells[merged]?.text ?? '')} stands in the first of them and is taken for all.`))
  return findings
}

/** Decimals marked otherwise than in most of the table. */
export function otherMarks(cells: readonly ReadCell[], plan: Plan, others: readonly Finding[]): Finding[] {
  if (!plan.isMixed) return []
  const isOpen = (index: number) => others.some(({ column, tone }) => column === index && tone !== 'taken')
  const columns = plan.columns.filter(column => isMeasured(column) && !isOpen(column.index)).filter((column) => {
    const cell = cells[column.index]
    return cell !== undefined && hasOtherMark(cell, quantityOf(cell, column, plan), plan)
  }).map(({ index }) => index)
  const [first] = columns
  if (first === undefined) return []
  const texts = columns.map(index => cells[index]?.text.trim().replace(',', '.')).slice(0, 2).join(', ')
  const finding = plan.decimal === '.'
    ? taken(first, 'decimal-comma', 'Decimal commas', `Read as ${texts} and so on.`)
    : taken(first, 'mixed-decimals', 'Decimal points among commas', `Read as ${texts} and so on.`)
  return [{ ...finding, columns }]
}
