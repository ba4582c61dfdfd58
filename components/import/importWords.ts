import type { TableImport } from '#shared/contracts/imports'
import { concentrationUnits, dateOrders, temperatureUnits, type ColumnMeaning, type Decision } from '#shared/tables/types'

export type Problem = TableImport['problems'][number]
export type Column = TableImport['columns'][number]

export const meaningLabels: Record<ColumnMeaning, string> = {
  'concentration': 'concentration', 'salt': 'salt', 'cloud-point': 'cloud point', 'uncertainty': 'uncertainty', 'samples': 'samples (n)', 'replicate': 'replicate no.',
  'batch': 'batch', 'date': 'date', 'direction': 'direction', 'rate': 'rate', 'pH': 'pH', 'limit': 'limit', 'set-aside': 'set aside because', 'note': 'kept as note', 'kept': 'kept with the file',
}

/** Units one may choose for a column; none where there is nothing to choose. */
export function unitsOf({ meaning }: Column): readonly string[] {
  if (meaning === 'concentration') return concentrationUnits
  if (meaning === 'cloud-point') return temperatureUnits
  return meaning === 'date' ? dateOrders : []
}

/** A, B, … Z, AA, … as a spreadsheet letters its columns. */
export function letterOf(index: number): string {
  const letter = String.fromCharCode(65 + index % 26)
  return index < 26 ? letter : letterOf(Math.floor(index / 26) - 1) + letter
}

export const counted = (count: number, one: string, many = `${one}s`) => `${count.toLocaleString('en-GB')} ${count === 1 ? one : many}`

/** Why nothing can be imported yet; empty when it can. */
export function obstacle({ rows, questions, readings }: TableImport): string {
  const asked = questions.filter(({ isBlocking }) => isBlocking).length
  const parts = [
    ...(asked > 0 ? [`${counted(asked, 'question')} above ${asked === 1 ? 'wants' : 'want'} an answer`] : []),
    ...(rows.toDecide > 0 ? [`${counted(rows.toDecide, 'row')} ${rows.toDecide === 1 ? 'needs' : 'need'} a decision`] : []),
    ...(rows.unreadable > 0 ? [`${counted(rows.unreadable, 'row')} cannot be read: correct ${rows.unreadable === 1 ? 'it' : 'them'} or leave ${rows.unreadable === 1 ? 'it' : 'them'} out`] : []),
  ]
  if (parts.length > 0) return `${parts.join('; ')}.`
  return readings === 0 ? 'No row holds a reading yet.' : ''
}

export interface Act { label: string, decisions: Decision[] }

function agreeLabel({ code, suggestion }: Problem, rows: number): string {
  if (code === 'same-row') return 'One reading'
  if (rows > 1) return `Agree for ${rows} rows`
  return code.endsWith('-salt') && suggestion ? `Use ${suggestion}` : suggestion ?? 'Agree'
}

/** What one may answer to a problem, for all rows that say the same. */
export function actsOf(problem: Problem, all: readonly Problem[]): Act[] {
  if (problem.tone !== 'decide' && problem.tone !== 'fault') return []
  const { group, column, suggestion, code } = problem
  const alike = group ? all.filter(other => other.group === group && other.tone === problem.tone) : [problem]
  const said = (action: Decision['action'], at: number | null) => alike.map(({ row }): Decision => ({ row, column: at, action }))
  const canAgree = suggestion !== undefined || (column === null && problem.tone === 'decide')
  return [
    ...(canAgree ? [{ label: agreeLabel(problem, alike.length), decisions: said('agree', column) }] : []),
    ...(code === 'same-row' ? [{ label: 'Two that agree', decisions: said('keep-both', column) }] : []),
    { label: alike.length > 1 ? `Leave ${alike.length} rows out` : 'Leave out', decisions: said('leave-out', null) },
  ]
}
