import { noWords, type RowWords, type Words } from './decisions'
import type { Finding, ReadCell } from '../readers/finding'
import { keptFinding, keptRow } from './kept-rows'
import { columnFor } from '../columns/plan'
import type { RowContext, RowReading } from './row-context'
import { readMeasured } from './row-measured'
import { aboutRow, otherMarks } from './row-remarks'
import { raggedFinding, wordsOnly } from './row-words'
import { saltAmong } from '../cells/salt-cache'
import type { FoundReading, GridRow, RowProblem } from '../types'

/** A row read, before it is compared with the others. */
export interface DraftRow {
  row: GridRow
  cells: string[]
  problems: RowProblem[]
  readings: FoundReading[]
  words: RowWords
  /** number of the repeat, where rows are numbered */
  repeat: string
}

const noText: ReadCell = { text: '' }

/** The cells as a person's words leave them. */
function cellsOf(row: GridRow, words: RowWords, width: number): ReadCell[] {
  const cells = Array.from({ length: Math.max(width, row.cells.length) }, (_, index): ReadCell => row.cells[index] ?? noText)
  for (const [column, { correction, isLeftOut }] of words.cells) {
    if (column < cells.length && (correction !== undefined || isLeftOut)) cells[column] = { text: isLeftOut ? '' : correction ?? '', isCorrected: true }
  }
  return cells
}

/** Agreeing to a suggestion puts it into its cell; agreeing to what was taken ends the matter. */
function agreed(cells: ReadCell[], findings: readonly Finding[], words: RowWords): { cells: ReadCell[], isChanged: boolean } {
  const wanted = findings.filter(({ column, tone, suggestion }) => column !== null && suggestion !== undefined && tone !== 'taken' && tone !== 'kept' && words.cells.get(column)?.isAgreed)
  if (wanted.length === 0) return { cells, isChanged: false }
  const next = [...cells]
  for (const { column, suggestion } of wanted) {
    if (column !== null && suggestion !== undefined) next[column] = { text: suggestion, isCorrected: true }
  }
  return { cells: next, isChanged: true }
}

const wordsOn = ({ row, cells }: RowWords, column: number | null): Words | undefined => column === null ? row : cells.get(column)

/** A finding that a person's agreement settles without changing a cell. */
function isSettled({ tone, column, suggestion }: Finding, words: RowWords): boolean {
  const isAgreed = wordsOn(words, column)?.isAgreed ?? false
  return isAgreed && (tone === 'taken' || (tone === 'decide' && suggestion === undefined))
}

const mostTurns = 4

/** Reads one row of the table. */
export function readRow(row: GridRow, context: RowContext, words: RowWords = noWords): DraftRow {
  let cells = cellsOf(row, words, context.width)
  let read = readCells(cells, context, words)
  for (let turn = 0; turn < mostTurns; turn++) {
    const next = agreed(cells, read.findings, words)
    if (!next.isChanged) break
    cells = next.cells
    read = readCells(cells, context, words)
  }
  const findings = [...read.findings, ...aboutRow(row, cells, context)].filter(finding => !isSettled(finding, words))
  const repeat = columnFor(context.plan, 'replicate')
  return {
    row, words, readings: read.readings.map(reading => ({ ...reading, row: row.number })),
    cells: cells.map(cell => cell.text),
    problems: findings.map(finding => ({ row: row.number, ...finding })),
    repeat: repeat ? cells[repeat.index]?.text.trim() ?? '' : '',
  }
}

function readCells(cells: ReadCell[], context: RowContext, words: RowWords): RowReading {
  const { plan, head } = context
  if (words.row.isLeftOut) return { findings: [keptFinding('left-out', 'Left out', 'Kept with the file, not a reading.')], readings: [] }
  const kept = keptRow(cells, head, plan, words.row.isAgreed) ?? wordsOnly(cells, context)
  if (kept) return { findings: [kept], readings: [] }
  const read = readMeasured(cells, context)
  return setAsideBy(words, { findings: [...otherMarks(cells, plan, read.findings), ...read.findings, ...raggedFinding(cells, context)], readings: read.readings })
}

/** The salt that a kept row names for the rows below it. */
export function sectionSaltOf(draft: DraftRow): string | null {
  const isSection = draft.problems.some(({ code, message }) => code === 'remark' && message.startsWith('Names the salt'))
  return isSection ? saltAmong(draft.cells.find(text => text.trim() !== '') ?? '') : null
}

const forgiven = new Set<Finding['code']>(['outside-range', 'kelvin', 'remark'])

/** Readings that a person keeps set aside come in with their reason, an impossible temperature, too; what holds no number is kept with the file. */
function setAsideBy(words: RowWords, { findings, readings }: RowReading): RowReading {
  const inFile = readings[0]?.setAside ?? undefined
  const reasonFor = (column: number) => words.cells.get(column)?.setAside ?? words.row.setAside ?? inFile
  const isForgiven = ({ code, column }: Finding) => forgiven.has(code) && (column === null ? words.row.setAside ?? inFile : reasonFor(column)) !== undefined
  const left = findings.filter(finding => !isForgiven(finding))
  const reason = words.row.setAside
  if (reason !== undefined && (readings.length === 0 || left.some(({ tone }) => tone === 'fault'))) {
    return { findings: [keptFinding('left-out', 'Set aside', `${reason}. It holds no reading that can be taken, and is kept with the file.`)], readings: [] }
  }
  return { findings: left, readings: readings.map(reading => ({ ...reading, setAside: reasonFor(reading.column) ?? reading.setAside })) }
}
