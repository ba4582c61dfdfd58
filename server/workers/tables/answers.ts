import { mostProblems, type ImportRows } from '#shared/contracts/imports'
import { signatureOf } from '#shared/tables/signature'
import type { FoundReading, RowProblem, RowState, Understanding } from '#shared/tables/types'

/** A table in short: all but its rows. */
export interface Summary extends Omit<Understanding, 'rows'> {
  signature: string
  readings: number
  problems: RowProblem[]
  problemsLeftOff: number
}

/** What a commit takes: the readings, and what still stands in its way. */
export interface Found {
  readings: FoundReading[]
  open: { row: number, message: string }[]
  unanswered: { code: string, subject: string, message: string }[]
  signature: string
}

export interface RowsWanted { state?: RowState, onlyTelling: boolean, after: number, limit: number }
export type Question = { kind: 'summary' } | { kind: 'found' } | ({ kind: 'rows' } & RowsWanted)
export interface Answers { summary: Summary, found: Found, rows: ImportRows }

function summaryOf({ rows, ...rest }: Understanding): Summary {
  const problems = rows.flatMap(row => row.problems)
  return {
    ...rest, signature: signatureOf(rest), readings: rows.reduce((sum, row) => sum + row.readings.length, 0),
    problems: problems.slice(0, mostProblems), problemsLeftOff: Math.max(0, problems.length - mostProblems),
  }
}

function rowsOf({ rows }: Understanding, { state, onlyTelling, after, limit }: RowsWanted): ImportRows {
  const wanted = rows.filter(row => row.row > after && (!state || row.state === state) && (!onlyTelling || row.problems.length > 0))
  const items = wanted.slice(0, limit).map(({ row, state, cells, problems }) => ({ row, state, cells, problems }))
  return { items, next: wanted.length > limit ? items.at(-1)!.row : null }
}

function foundIn(understanding: Understanding): Found {
  const { rows, questions } = understanding
  return {
    readings: rows.flatMap(row => row.readings),
    open: rows.filter(({ state }) => state === 'to-decide' || state === 'unreadable').map(({ row, problems }) => ({
      row, message: problems.find(({ tone }) => tone === 'fault' || tone === 'decide')?.message ?? 'needs a look',
    })),
    unanswered: questions.filter(({ isBlocking }) => isBlocking).map(({ code, subject, message }) => ({ code, subject, message })),
    signature: signatureOf(understanding),
  }
}

export function answer(understanding: Understanding, question: Question): Answers[Question['kind']] {
  switch (question.kind) {
    case 'summary': return summaryOf(understanding)
    case 'rows': return rowsOf(understanding, question)
    case 'found': return foundIn(understanding)
  }
}
