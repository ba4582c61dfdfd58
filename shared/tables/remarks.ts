import type { Head } from './columns/head'
import type { Plan } from './columns/plan'
import type { FoundReading, GridCell } from './types'

const isWithoutSamples = ({ columns }: Plan) => columns.some(({ meaning, uncertaintyMeaning }) => meaning === 'uncertainty' && uncertaintyMeaning === 'sd-of-replicates')
  && !columns.some(({ meaning }) => meaning === 'samples')

const list = (headings: readonly string[]) => headings.map(heading => `“${heading}”`).join(', ')
const counted = (number: number, one: string, many: string) => `${number} ${number === 1 ? one : many}`

/** Readings of the branch in which the campaign does not cloud. */
function otherBranch(readings: readonly FoundReading[], clouds: 'on-heating' | 'on-cooling'): string[] {
  const other = clouds === 'on-heating' ? 'cooling' : 'heating'
  const count = readings.filter(({ direction }) => direction === other).length
  return count === 0 ? [] : [`${counted(count, 'reading was', 'readings were')} taken on ${other}; the campaign clouds ${clouds.replace('-', ' ')}. They are kept and drawn, and do not enter the fit.`]
}

/** Sentences about the whole file. */
export function remarksOf({ header, below }: Head, plan: Plan, readings: readonly FoundReading[], clouds: 'on-heating' | 'on-cooling'): string[] {
  const hidden = below.filter(row => row.isHidden).length
  const count = (test: (cell: GridCell) => boolean) => below.reduce((sum, { cells }) => cells.reduce((rest, cell) => test(cell) ? rest + 1 : rest, sum), 0)
  const formulas = count(cell => cell.formula !== undefined)
  const merged = count(cell => cell.isMerged ?? false)
  const remarks: string[] = []
  if (!header) remarks.push('No header was found. What the columns hold is guessed from their numbers: check each of them.')
  if (hidden > 0) remarks.push(`${counted(hidden, 'row is', 'rows are')} hidden in the sheet and read like the others.`)
  if (formulas > 0) remarks.push(`${counted(formulas, 'cell holds a formula', 'cells hold formulas')}. The values that the file keeps are taken; formulas are never run.`)
  if (merged > 0) remarks.push(`${counted(merged, 'cell is', 'cells are')} part of merged cells and taken to hold what the first of them holds.`)
  if (plan.readByValues.length > 0) remarks.push(`${list(plan.readByValues)} ${plan.readByValues.length === 1 ? 'is' : 'are'} read by what the column holds, not by a heading that is known. Check the meaning.`)
  if (plan.leftBehind.length > 0) remarks.push(`${list(plan.leftBehind)} ${plan.leftBehind.length === 1 ? 'stays' : 'stay'} with the file: another column was taken for what the heading says. Change what a column holds if that is wrong.`)
  if (isWithoutSamples(plan)) remarks.push('The table does not say how many samples stand behind its standard deviations. They are kept as given and enter no weights.')
  if (plan.isMixed) remarks.push('Decimals are marked by points in some cells and by commas in others; both are read.')
  return [...remarks, ...otherBranch(readings, clouds)]
}
