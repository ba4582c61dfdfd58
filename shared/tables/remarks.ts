import type { Head } from './head'
import type { Plan } from './plan'

const counted = (number: number, one: string, many: string) => `${number} ${number === 1 ? one : many}`

/** Sentences about the whole file. */
export function remarksOf({ header, below }: Head, plan: Plan): string[] {
  const hidden = below.filter(row => row.isHidden).length
  const cells = below.flatMap(row => row.cells)
  const formulas = cells.filter(cell => cell.formula !== undefined).length
  const merged = cells.filter(cell => cell.isMerged).length
  const remarks: string[] = []
  if (!header) remarks.push('No header was found. What the columns hold is guessed from their numbers: check each of them.')
  if (hidden > 0) remarks.push(`${counted(hidden, 'row is', 'rows are')} hidden in the sheet and read like the others.`)
  if (formulas > 0) remarks.push(`${counted(formulas, 'cell holds a formula', 'cells hold formulas')}. The values that the file keeps are taken; formulas are never run.`)
  if (merged > 0) remarks.push(`${counted(merged, 'cell is', 'cells are')} part of merged cells and taken to hold what the first of them holds.`)
  if (plan.isMixed) remarks.push('Decimals are marked by points in some cells and by commas in others; both are read.')
  return remarks
}
