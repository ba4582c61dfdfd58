import type { Grid, GridRow } from '../types'
import type { Head } from './head'

const lastText = ({ cells }: GridRow) => cells.findLastIndex(({ text }) => text.trim() !== '') + 1
const widest = (rows: readonly GridRow[]) => rows.reduce((width, row) => Math.max(width, lastText(row)), 0)

/** Behind the last heading words alone are remarks; where numbers stand there, too, cells may have slipped to the right. */
function isOfWords(rows: readonly GridRow[], column: number): boolean {
  return rows.every(({ cells }) => /\p{L}|^\s*$/u.test(cells[column]?.text ?? ''))
}

/**
 * How many columns a table has. Cells of a sheet, or between tabs, stay in their columns; between other delimiters a comma too many
 * moves them, so that there the head says how many there are, and words behind it.
 */
export function widthOf({ delimiter }: Grid, head: Head): number {
  const all = widest(head.below)
  const heads = [head.header, head.group, head.units].filter(row => row !== null)
  const headed = widest(heads)
  if (heads.length === 0 || delimiter === undefined || delimiter === '\t') return Math.max(headed, all)
  let width = headed
  while (width < all && isOfWords(head.below, width)) width++
  return width
}
