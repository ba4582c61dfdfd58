/**
 * A lab's table, from cells to readings. A grid is what a file holds; an understanding is what it means.
 * Every counted row ends in exactly one state, so that the four counts add up to the rows, always.
 */

/** One cell as the file holds it. `value` where the file itself says it is a number (a date is its serial day number). */
export interface GridCell {
  text: string
  value?: number
  /** true: the file formats the number as a date; `text` is then the day as YYYY-MM-DD */
  isDate?: boolean
  /** the formula behind a cached value; never run */
  formula?: string
  /** true: the cell is part of a merged range and repeats what its first cell holds */
  isMerged?: boolean
}

export interface GridRow {
  /** as the file shows it, from 1: the row of the sheet, or the record of the text (a quoted newline does not count) */
  number: number
  cells: GridCell[]
  isHidden: boolean
}

export const tableFormats = ['csv', 'tsv', 'semicolon', 'whitespace', 'xlsx', 'paste'] as const
export const encodings = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const
export const delimiters = [',', ';', '\t', '|', 'space'] as const

/** A file cut into cells; nothing is dropped but rows without any text. */
export interface Grid {
  format: typeof tableFormats[number]
  encoding: typeof encodings[number] | null
  /** what stands between the cells of a text; absent for a sheet */
  delimiter?: typeof delimiters[number]
  sheets: string[]
  sheet: string | null
  rows: GridRow[]
}

export const columnMeanings = [
  'concentration', 'salt', 'cloud-point', 'uncertainty', 'samples', 'replicate', 'batch', 'date', 'direction', 'rate', 'pH',
  'limit', 'set-aside', 'note', 'kept',
] as const
/** `samples` counts independent samples behind a value (n); `replicate` numbers repeats in rows of their own; `kept` stays with the file. */
export type ColumnMeaning = typeof columnMeanings[number]

export const concentrationUnits = ['mol/L', 'mmol/L', 'mol/kg', 'mmol/kg'] as const
export const temperatureUnits = ['°C', 'K', '°F'] as const
export const uncertaintyMeanings = ['sd-of-replicates', 'standard-uncertainty'] as const
export const directions = ['heating', 'cooling'] as const
export const dateOrders = ['day-month-year', 'month-day-year', 'year-month-day'] as const

/** What one column says. `unit` is the unit as read: a concentration or temperature unit, a date order, or null. */
export interface TableColumn {
  /** from 0 */
  index: number
  header: string
  meaning: ColumnMeaning
  unit: string | null
  /** cloud points of one branch; null: the campaign's own */
  direction: typeof directions[number] | null
  /** wide form: formula of the salt whose cloud points the column holds */
  salt: string | null
  uncertaintyMeaning: typeof uncertaintyMeanings[number] | null
  /** uncertainty: index of the cloud-point column it belongs to; null: of all */
  of: number | null
}

/** What a person says otherwise about a column; what is left out stays as understood. */
export type ColumnChoice = Pick<TableColumn, 'index'> & Partial<Omit<TableColumn, 'index' | 'header'>>

export const rowStates = ['ready', 'to-decide', 'unreadable', 'kept'] as const
export type RowState = typeof rowStates[number]
export type RowCounts = { total: number, ready: number, toDecide: number, unreadable: number, kept: number }

/** taken: read as the message says, to be looked at · decide: waits for a person · fault: cannot be read · kept: why the row is no reading */
export const problemTones = ['taken', 'decide', 'fault', 'kept'] as const

export const problemCodes = [
  'unit-in-cell', 'decimal-comma', 'thousands', 'stated-uncertainty', 'approximate', 'date-number', 'formula', 'formula-like', 'text-number',
  'fahrenheit', 'kelvin', 'outside-range', 'negative-concentration', 'not-a-number', 'below-limit', 'above-limit', 'not-determined',
  'unknown-salt', 'misspelt-salt', 'unbalanced-salt', 'no-salt', 'no-concentration', 'no-cloud-point', 'no-uncertainty',
  'same-row', 'remark', 'summary-row', 'repeated-header', 'preamble', 'left-out', 'ragged', 'hidden-row', 'merged', 'mixed-decimals', 'bad-date',
] as const
export type ProblemCode = typeof problemCodes[number]

/** One thing about a row that a person should see. */
export interface RowProblem {
  row: number
  /** index of the column; null: about the whole row */
  column: number | null
  /** every cell it speaks of, where there are several */
  columns?: number[]
  code: ProblemCode
  tone: typeof problemTones[number]
  /** a short finding, such as "Salt not known: NaSNC" */
  message: string
  /** one more sentence: what was assumed, what to do */
  detail: string
  /** what agreeing would make of the cell, as it would be typed */
  suggestion?: string
  /** rows that say the same and are agreed to together; the first carries the message */
  group?: string
}

/** A person's word on a row: agree to the suggestion, correct a cell, keep the row with the file, keep it set aside, or take one's word back. */
export const decisionActions = ['agree', 'correct', 'leave-out', 'set-aside', 'keep-both', 'reopen'] as const
export interface Decision {
  row: number
  /** null: about the whole row */
  column: number | null
  action: typeof decisionActions[number]
  /** correct: the cell as it should read · set-aside: the reason */
  value?: string
}

/** Something to ask once for the whole table. */
export const questionCodes = ['uncertainty-meaning', 'concentration-unit', 'temperature-unit', 'decimal-mark', 'date-order', 'salt-of-table', 'batch-exists', 'seen-before'] as const
export interface Question {
  code: typeof questionCodes[number]
  /** tells two questions of one code apart: a column's index, a batch's label, or '' */
  subject: string
  message: string
  options: { value: string, label: string }[]
  /** the answer in force: a person's, or our reading where `isAssumed` */
  answer: string | null
  isAssumed: boolean
  /** true: nothing is imported before it is answered */
  isBlocking: boolean
}
export interface Answer { code: Question['code'], subject: string, value: string }

/** How a table is to be read; what is left out is recognised. Kept by a lab under a name, this is a recipe. */
export interface TableChoices {
  sheet?: string
  encoding?: typeof encodings[number]
  delimiter?: typeof delimiters[number]
  decimal?: '.' | ','
  /** row number of the header as the file shows it; 0: there is none */
  headerRow?: number
  /** row number of the units; 0: there is none */
  unitsRow?: number
  columns?: ColumnChoice[]
  answers?: Answer[]
  decisions?: Decision[]
}

/** A cloud point found in a row, ready to become a reading. */
export interface FoundReading {
  row: number
  /** column the cloud point stands in */
  column: number
  /** formula of the anhydrous salt, such as Na2SO4; null: a blank */
  salt: string | null
  /** concentration [mol/L or mol/kg, as `scale` says]; 0 for a blank */
  x: number
  scale: 'mol/L' | 'mol/kg'
  /** cloud point [°C] */
  y: number
  /** standard uncertainty of y [K] */
  sd: number | null
  sdGiven: number | null
  sdMeaning: typeof uncertaintyMeanings[number] | null
  n: number | null
  /** null: as the campaign clouds */
  direction: typeof directions[number] | null
  /** K/min */
  rate: number | null
  ph: number | null
  limit: 'exact' | 'below' | 'above' | 'salt-precipitated'
  /** label of its batch; null: the batch of the whole table */
  batch: string | null
  /** YYYY-MM-DD */
  date: string | null
  note: string | null
  /** reason, where the reading comes in set aside */
  setAside: string | null
}

export interface UnderstoodRow {
  row: number
  cells: string[]
  state: RowState
  problems: RowProblem[]
  readings: FoundReading[]
}

/** A table understood: the answer to "what does this file say, and what needs a look". */
export interface Understanding {
  format: Grid['format']
  encoding: Grid['encoding']
  sheets: string[]
  sheet: string | null
  delimiter: NonNullable<TableChoices['delimiter']> | null
  decimal: '.' | ',' | 'both'
  /** long: one column of cloud points · wide: one column a salt, a replicate or a branch */
  form: 'long' | 'wide'
  headerRow: number | null
  unitsRow: number | null
  columns: TableColumn[]
  rows: UnderstoodRow[]
  counts: RowCounts
  questions: Question[]
  /** sentences about the whole file: hidden rows, merged cells, formulas */
  remarks: string[]
}

/** Why a file cannot be taken at all. */
export const tableRefusals = [
  'empty', 'header-only', 'one-column', 'no-numbers', 'not-a-table', 'pdf', 'ods', 'old-xls', 'broken-xlsx', 'too-large-inside', 'too-many-rows', 'too-many-columns', 'wrong-encoding', 'too-slow',
] as const
export class TableError extends Error {
  override name = 'TableError'
  constructor(readonly code: typeof tableRefusals[number], message: string) {
    super(message)
  }
}

/** The most rows and columns one table may hold. */
export const mostRows = 50_000
export const mostColumns = 100
