import type { DraftRow } from './row'
import type { RowProblem } from '../types'

const keyOf = ({ code, tone, column, message, detail, suggestion }: RowProblem) => {
  // Findings that differ in their numbers alone are one finding.
  const words = code === 'text-number' || code === 'thousands' || code === 'stated-uncertainty' || code === 'unit-in-cell' || code === 'kelvin' || code === 'fahrenheit' || code === 'date-number' || code === 'formula-like'
  // Which cells of a row have the other mark does not matter.
  if (code === 'decimal-comma' || code === 'mixed-decimals') return `${code}|${tone}`
  return words && tone === 'taken' ? `${code}|${tone}|${column}` : [code, tone, column, message, detail, suggestion].join('|')
}

function rowsText(first: number, last: number): string {
  return first === last ? `row ${first}` : `rows ${first} to ${last}`
}

/**
 * Joins findings that rows share, so that they are read and agreed to once. Decimal marks are told row after row: a stretch of commas is one finding.
 */
export function groupProblems(drafts: readonly DraftRow[]): DraftRow[] {
  const open = new Map<string, RowProblem[]>()
  const groups: RowProblem[][] = []
  for (const { problems, readings } of drafts) {
    const present = new Set<string>()
    for (const problem of problems) {
      if (problem.group !== undefined || problem.tone === 'kept') continue
      const key = keyOf(problem)
      present.add(key)
      const group = open.get(key)
      if (group) group.push(problem)
      else {
        const fresh = [problem]
        open.set(key, fresh)
        groups.push(fresh)
      }
    }
    if (readings.length > 0) closeStretches(open, present)
  }
  const grouped = new Map(groups.filter(group => group.length > 1).flatMap(group => group.map(problem => [problem, group] as const)))
  return drafts.map(draft => draft.problems.some(problem => grouped.has(problem))
    ? { ...draft, problems: draft.problems.map(problem => joined(problem, grouped.get(problem))) }
    : draft)
}

const isStretch = (key: string) => key.startsWith('decimal-comma') || key.startsWith('mixed-decimals')

function closeStretches(open: Map<string, RowProblem[]>, present: ReadonlySet<string>): void {
  for (const key of open.keys()) if (isStretch(key) && !present.has(key)) open.delete(key)
}

function joined(problem: RowProblem, group: readonly RowProblem[] | undefined): RowProblem {
  const [first, last] = [group?.[0], group?.at(-1)]
  if (!first || !last) return problem
  const marks = problem.code === 'decimal-comma' ? 'commas' : problem.code === 'mixed-decimals' ? 'points' : null
  const detail = marks ? `${rowsText(first.row, last.row).replace(/^r/, 'R')} use ${marks}. ${first.detail}` : problem.detail
  return { ...problem, detail, group: `${first.code}:${first.row}:${first.column ?? ''}` }
}
