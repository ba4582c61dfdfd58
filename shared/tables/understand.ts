// A table's way: text/ cuts a file into cells, columns/ finds what the columns hold, readers/ reads a cell as its column says (with cells/, which knows no columns), rows/ makes readings of them.
import { batchQuestions, withBatchesApart, type KnownBatch } from './rows/batch-questions'
import { branchesOf } from './columns/branches'
import { wordsByRow } from './rows/decisions'
import { fillUncertainties } from './rows/fill-uncertainties'
import { groupProblems } from './rows/group-problems'
import { headOf, type Head } from './columns/head'
import { keptFinding } from './rows/kept-rows'
import { columnFor, type Plan } from './columns/plan'
import { widthOf } from './columns/width'
import { planTable } from './columns/planning'
import { refuseContent } from './refuse-content'
import { remarksOf } from './remarks'
import { readRow, sectionSaltOf, type DraftRow } from './rows/row'
import type { RowContext } from './rows/row-context'
import { markSameRows } from './rows/same-rows'
import type { Grid, RowCounts, RowState, TableChoices, TableColumn, UnderstoodRow, Understanding } from './types'

export interface TableContext {
  /** how the campaign clouds */
  clouds: 'on-heating' | 'on-cooling'
  fileName: string
  /** batches the campaign already has */
  batches: readonly KnownBatch[]
}

function stateOf({ problems, readings }: DraftRow): RowState {
  if (problems.some(({ tone }) => tone === 'fault')) return 'unreadable'
  if (problems.some(({ tone }) => tone === 'decide')) return 'to-decide'
  return readings.length > 0 ? 'ready' : 'kept'
}

function understoodRow(draft: DraftRow): UnderstoodRow {
  const state = stateOf(draft)
  return { row: draft.row.number, cells: draft.cells, state, problems: draft.problems, readings: state === 'ready' ? draft.readings : [] }
}

function preambleRows({ preamble }: Head): UnderstoodRow[] {
  return preamble.map(({ number, cells }) => ({
    row: number, cells: cells.map(({ text }) => text), state: 'kept', readings: [],
    problems: [{ row: number, ...keptFinding('preamble', 'Above the header', 'Kept with the file, not a reading.') }],
  }))
}

function countsOf(rows: readonly UnderstoodRow[]): RowCounts {
  const count = (state: RowState) => rows.filter(row => row.state === state).length
  return { total: rows.length, ready: count('ready'), toDecide: count('to-decide'), unreadable: count('unreadable'), kept: count('kept') }
}

/** Reads the rows in order: salts named once hold for the rows below them. */
function draftsOf(head: Head, plan: Plan, width: number, choices: TableChoices): DraftRow[] {
  const words = wordsByRow(choices.decisions ?? [])
  const context: RowContext = { head, plan, branches: branchesOf(plan), width, sectionSalt: null, saltAbove: null }
  const salt = columnFor(plan, 'salt')
  return head.below.map((row) => {
    const draft = readRow(row, context, words.get(row.number))
    if (!salt) context.sectionSalt = sectionSaltOf(draft) ?? context.sectionSalt
    context.saltAbove = draft.readings.find(reading => reading.salt !== null)?.salt ?? context.saltAbove
    return draft
  })
}

/** Rows beside each other: the same one twice, gaps among the uncertainties. */
function compared(drafts: readonly DraftRow[], plan: Plan): DraftRow[] {
  const column = columnFor(plan, 'salt')?.index
  const saltTextOf = ({ cells }: DraftRow) => column === undefined ? '' : cells[column]?.trim() ?? ''
  return fillUncertainties(markSameRows(drafts, saltTextOf), branchesOf(plan))
}

function publicColumn({ index, header, meaning, unit, direction, salt, uncertaintyMeaning, of }: TableColumn): TableColumn {
  return { index, header, meaning, unit, direction, salt, uncertaintyMeaning, of }
}

/**
 * What a table says: the meaning of its columns, the readings of its rows, what needs a look and what has to be asked.
 * Every row below the header and every line above it ends in exactly one state. Decisions, answers and choices are applied.
 * Cells come back as a person's corrections leave them; the grid is not changed.
 * @throws TableError empty, one-column, header-only, no-numbers
 */
export function understand(grid: Grid, choices: TableChoices, context: TableContext): Understanding {
  const head = headOf(grid, choices)
  refuseContent(grid, head)
  const width = widthOf(grid, head)
  const { plan, questions } = planTable(grid, head, width, context.fileName, choices)
  const drafts = draftsOf(head, plan, width, choices)
  const batches = batchQuestions(drafts.flatMap(({ readings }) => readings), context.batches, plan.isOwnExport, choices)
  const apart = drafts.map(draft => ({ ...draft, readings: withBatchesApart(draft.readings, batches) }))
  const below = groupProblems(plan.isOwnExport ? apart : compared(apart, plan)).map(understoodRow)
  const rows = [...preambleRows(head), ...below]
  const branches = branchesOf(plan)
  return {
    format: grid.format, encoding: grid.encoding, sheets: grid.sheets, sheet: grid.sheet, delimiter: grid.delimiter ?? null,
    decimal: plan.isMixed ? 'both' : plan.decimal === ',' ? ',' : '.',
    form: branches.length > 1 || branches.some(({ columns, salt }) => columns.length > 1 || salt !== null) ? 'wide' : 'long',
    headerRow: head.header?.number ?? null, unitsRow: head.units?.number ?? null,
    columns: plan.columns.map(publicColumn), rows, counts: countsOf(rows),
    questions: [...questions, ...batches],
    remarks: remarksOf(head, plan, rows.flatMap(({ readings }) => readings), context.clouds),
  }
}
