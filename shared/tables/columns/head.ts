import { fold } from '../cells/fold'
import { hasForeignUnit, headerText } from './header-text'
import { directionOf, meaningOf } from './header-words'
import { readQuantity } from '../cells/quantity'
import { saltAmong, saltFormula, suggestedSalt } from '../cells/salt-cache'
import type { Grid, GridRow, TableChoices } from '../types'
import { unitOf } from '../cells/units'

/** A table cut into what stands above its readings and the rows below. */
export interface Head {
  header: GridRow | null
  units: GridRow | null
  /** a row above the header that names the salt or branch of several columns at once */
  group: GridRow | null
  preamble: GridRow[]
  below: GridRow[]
}

/** A head that begins later than this is none. */
const deepestHead = 80

const filled = (row: GridRow) => row.cells.filter(cell => cell.text.trim() !== '')
const isNumber = (text: string) => readQuantity(text, 'both', false).kind === 'number'
const numbersIn = (row: GridRow | undefined) => row ? filled(row).filter(cell => cell.value !== undefined || isNumber(cell.text)).length : 0

/** How much a cell looks like a heading. Salts head columns, too, but more of them stand in rows. */
export function headingWeight(text: string): number {
  const { name, unit } = headerText(text)
  const meaning = meaningOf(name)
  if ((meaning !== null && meaning !== 'kept') || (name === '' && unit !== null) || directionOf(name) !== null) return 1
  return saltFormula(text) !== null || suggestedSalt(text) !== null ? 0.5 : 0
}

/** A row of nothing but units, such as M | °C | K. */
function isUnitsRow(row: GridRow | undefined): boolean {
  if (!row) return false
  const texts = filled(row).map(cell => cell.text.replace(/^\s*[([]|[)\]]\s*$/g, '').trim())
  const isUnit = (text: string) => unitOf(text) !== null || hasForeignUnit(text) || /^(?:-|–|1|text|n\/a)$/i.test(text)
  return texts.some(text => unitOf(text) !== null) && texts.every(isUnit)
}

interface Candidate { index: number, score: number, isClear: boolean }

/** How much a row looks like a header; clear is one of several headings right above numbers. */
function candidateAt(rows: readonly GridRow[], index: number): Candidate | null {
  const row = rows[index]
  const cells = row ? filled(row) : []
  if (!row || cells.length < 2 || (cells.length === 2 && cells[0]?.text.trim().endsWith(':'))) return null
  const numbers = numbersIn(row)
  const headings = cells.reduce((sum, cell) => sum + headingWeight(cell.text), 0)
  const below = rows[isUnitsRow(rows[index + 1]) ? index + 2 : index + 1]
  const isAboveNumbers = numbersIn(below) >= 2
  const isRemark = cells[0]?.text.trim().startsWith('#') ?? false
  if (headings === 0 && !(isAboveNumbers && numbers === 0)) return null
  const score = headings - 2 * numbers + (isAboveNumbers ? 1.5 : 0) - (isRemark ? 3 : 0) - (isUnitsRow(row) ? 1 : 0)
  return { index, score, isClear: headings >= 1.5 && numbers === 0 && isAboveNumbers && !isRemark && !isUnitsRow(row) }
}

/** The first clear header, so that no reading above a later one is taken for a remark; else the row that looks most like one. */
function findHeader(rows: readonly GridRow[]): number {
  let best: Candidate = { index: -1, score: 1, isClear: false }
  for (let index = 0; index < Math.min(rows.length, deepestHead); index++) {
    const candidate = candidateAt(rows, index)
    if (candidate?.isClear) return index
    if (candidate && candidate.score > best.score) best = candidate
  }
  return best.index
}

/** A salt or branch that may stand over several columns. */
export function isGroupHeading(text: string): boolean {
  return text.length < 40 && !isNumber(text) && (saltAmong(text) !== null || directionOf(fold(text)) !== null)
}

/** The row right above a header is head, too, when each of its words is a salt or branch, or the heading of a column that has none. */
function isGroupRow(row: GridRow | undefined, header: GridRow | undefined): boolean {
  if (!row || !header || row.number !== header.number - 1) return false
  const texts = row.cells.map(cell => cell.text.trim())
  const isGroup = texts.map(text => text !== '' && isGroupHeading(text))
  const isFitting = texts.every((text, index) => text === '' || isGroup[index] || (header.cells[index]?.text.trim() === '' && headingWeight(text) > 0))
  return isFitting && isGroup.slice(1).some(Boolean)
}

function chosenIndex(rows: readonly GridRow[], number: number): number {
  return rows.findIndex(row => row.number === number)
}

/** Finds the header, the units below it and what stands above, or takes them from a person's choice. */
export function headOf({ rows }: Grid, { headerRow, unitsRow }: TableChoices): Head {
  const header = headerRow === undefined ? findHeader(rows) : chosenIndex(rows, headerRow)
  if (header < 0) {
    const first = Math.max(0, rows.findIndex(row => numbersIn(row) > 0))
    return { header: null, units: null, group: null, preamble: rows.slice(0, first), below: rows.slice(first) }
  }
  const next = rows[header + 1]
  const units = unitsRow === undefined ? (isUnitsRow(next) ? next : undefined) : rows[chosenIndex(rows, unitsRow)]
  const above = rows[header - 1]
  const group = isGroupRow(above, rows[header]) ? above : undefined
  const preamble = rows.slice(0, group ? header - 1 : header).filter(row => row !== units)
  return { header: rows[header] ?? null, units: units ?? null, group: group ?? null, preamble, below: rows.slice(header + 1).filter(row => row !== units) }
}
