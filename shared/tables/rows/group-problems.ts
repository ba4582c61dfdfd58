import type { DraftRow } from './row'
import type { ProblemCode, RowProblem } from '../types'

/** Taken all over a column in the same way; only the numbers in their messages differ. */
const alike = new Set<ProblemCode>(['text-number', 'thousands', 'stated-uncertainty', 'unit-in-cell', 'kelvin', 'fahrenheit', 'date-number', 'formula-like'])
/** Told of a stretch of rows, whichever of their cells it is. */
const stretches = new Set<ProblemCode>(['decimal-comma', 'mixed-decimals'])

function keyOf({ code, tone, column, message, detail, suggestion }: RowProblem): string {
  if (stretches.has(code)) return code
  return alike.has(code) && tone === 'taken' ? [code, column].join('|') : [code, tone, column, message, detail, suggestion].join('|')
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

function closeStretches(open: Map<string, RowProblem[]>, present: ReadonlySet<string>): void {
  for (const code of stretches) if (!present.has(code)) open.delete(code)
}

function joined(problem: RowProblem, group: readonly RowProblem[] | undefined): RowProblem {
  const [first, last] = [group?.[0], group?.at(-1)]
  if (!first || !last) return problem
  const marks = problem.code === 'decimal-comma' ? 'commas' : problem.code === 'mixed-decimals' ? 'points' : null
  const detail = marks ? `${rowsText(first.row, last.row).replace(/^r/, 'R')} use ${marks}. ${first.detail}` : problem.detail
  return { ...problem, detail, group: `${first.code}:${first.row}:${first.column ?? ''}` }
}
