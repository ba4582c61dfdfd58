import { pointOf, type Point } from './branch-reading'
import type { Branch } from './branches'
import { noWords, type RowWords, type Words } from './decisions'
import { fault, hasOtherMark, quantityOf, quoted, taken, undecided, type Finding, type Found, type ReadCell } from './finding'
import { fold } from './fold'
import type { Head } from './head'
import { isDoubt } from './header-words'
import { keptFinding, keptRow } from './kept-rows'
import { columnFor, columnsFor, type Plan } from './plan'
import { readConcentration, type Concentration } from './read-concentration'
import { readDateCell, readDirection, readLimit, readPlainNumber, readSamples, readWords } from './read-others'
import { readSaltCell, type NamedSalt } from './read-salt-cell'
import { saltAmong, saltOf } from './salt-cache'
import type { FoundReading, GridRow, RowProblem } from './types'

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

/** What the rows above say about the rows below. */
export interface RowContext {
  head: Head
  plan: Plan
  branches: readonly Branch[]
  width: number
  /** salt named by a row of its own above; null: none */
  sectionSalt: string | null
  /** salt of the row above, for cells left empty beneath it */
  saltAbove: string | null
}

const noText: ReadCell = { text: '' }

/** The cells as a person's words leave them. */
function cellsOf(row: GridRow, words: RowWords, width: number): ReadCell[] {
  const cells = Array.from({ length: Math.max(width, row.cells.length) }, (_, index): ReadCell => row.cells[index] ?? noText)
  for (const [column, { correction, isLeftOut }] of words.cells) {
    if (correction !== undefined || isLeftOut) cells[column] = { text: isLeftOut ? '' : correction ?? '', isCorrected: true }
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

interface Reading { findings: Finding[], readings: FoundReading[] }

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

function aboutRow(row: GridRow, cells: readonly ReadCell[], { plan, width }: RowContext): Finding[] {
  const findings: Finding[] = []
  if (row.isHidden) findings.push(taken(null, 'hidden-row', 'A hidden row', 'The sheet hides this row. It is read like the others.'))
  const merged = row.cells.findIndex((cell, index) => cell.isMerged && index < width && plan.columns[index]?.meaning !== 'kept')
  if (merged >= 0) findings.push(taken(merged, 'merged', 'Merged cells', `${quoted(cells[merged]?.text ?? '')} stands in the first of them and is taken for all.`))
  return findings
}

/** Words beyond the last column follow the note; numbers there mean that the columns have slipped. */
function raggedFinding(cells: readonly ReadCell[], { plan, width, head }: RowContext): Finding[] {
  const extra = cells.slice(width).filter(cell => cell.text.trim() !== '')
  if (extra.length === 0 || !head.header) return []
  const isNote = plan.columns[width - 1]?.meaning === 'note' && extra.every(cell => /\p{L}/u.test(cell.text))
  const message = `${width + extra.length} cells under ${width} headings`
  if (isNote) return [taken(null, 'ragged', message, 'The words behind the last column are joined to the note.')]
  return [undecided(null, 'ragged', message, `Check that every cell stands under its heading. Agree to take the first ${width} as they stand, or leave the row out.`)]
}

function readCells(cells: ReadCell[], context: RowContext, words: RowWords): Reading {
  const { plan, head } = context
  if (words.row.isLeftOut) return { findings: [keptFinding('left-out', 'Left out', 'Kept with the file, not a reading.')], readings: [] }
  const kept = keptRow(cells, head, plan) ?? wordsOnly(cells, context)
  if (kept) return { findings: [kept], readings: [] }
  const read = readMeasured(cells, context)
  return setAsideBy(words, { findings: [...otherMarks(cells, plan), ...read.findings, ...raggedFinding(cells, context)], readings: read.readings })
}

const isMeasured = new Set(['concentration', 'cloud-point', 'uncertainty'])

/** A row without any number where numbers are measured is a remark, or names the salt of the rows below it. */
function wordsOnly(cells: readonly ReadCell[], { plan }: RowContext): Finding | null {
  const measured = plan.columns.filter(({ meaning }) => isMeasured.has(meaning))
  if (measured.length === 0 || measured.some(({ index }) => /\d/.test(cells[index]?.text ?? '') && saltOf(cells[index]?.text ?? '').kind !== 'salt')) return null
  const texts = cells.filter(cell => cell.text.trim() !== '').map(cell => cell.text)
  if (texts.length === 1 && saltAmong(texts[0] ?? '') !== null) return keptFinding('remark', 'Names the salt of the rows below', 'Kept with the file, not a reading.')
  const hasPoint = columnsFor(plan, 'cloud-point').some(({ index }) => cells[index]?.text.trim() !== '')
  const hasSalt = columnFor(plan, 'salt') !== undefined && cells[columnFor(plan, 'salt')?.index ?? -1]?.text.trim() !== ''
  // A salt without its numbers is an unfinished row, told further on; so is a word where a cloud point belongs.
  return hasPoint && hasSalt ? null : keptFinding('remark', 'No numbers', 'Kept with the file, not a reading.')
}

/** The salt that a kept row names for the rows below it. */
export function sectionSaltOf(draft: DraftRow): string | null {
  const isSection = draft.problems.some(({ code, message }) => code === 'remark' && message.startsWith('Names the salt'))
  return isSection ? saltAmong(draft.cells.find(text => text.trim() !== '') ?? '') : null
}

function otherMarks(cells: readonly ReadCell[], plan: Plan): Finding[] {
  if (!plan.isMixed) return []
  const columns = plan.columns.filter(column => isMeasured.has(column.meaning)).filter((column) => {
    const cell = cells[column.index]
    return cell !== undefined && hasOtherMark(cell, quantityOf(cell, column, plan), plan)
  }).map(({ index }) => index)
  if (columns.length === 0) return []
  const texts = columns.map(index => cells[index]?.text.trim().replace(',', '.')).slice(0, 2).join(', ')
  const finding = plan.decimal === '.'
    ? taken(null, 'decimal-comma', 'Decimal commas', `Read as ${texts} and so on.`)
    : taken(null, 'mixed-decimals', 'Decimal points among commas', `Read as ${texts} and so on.`)
  return [{ ...finding, columns }]
}

function readMeasured(cells: readonly ReadCell[], context: RowContext): Reading {
  const { plan, branches } = context
  const cellAt = (column: number) => cells[column] ?? noText
  const optional = <T>(meaning: Parameters<typeof columnFor>[1], read: (cell: ReadCell, column: NonNullable<ReturnType<typeof columnFor>>) => Found<T>): Found<T> => {
    const column = columnFor(plan, meaning)
    return column ? read(cellAt(column.index), column) : { value: null, findings: [] }
  }
  const samples = optional('samples', (cell, column) => readSamples(cell, column, plan))
  const points = branches.map(branch => ({ branch, ...pointOf(cellAt, branch, plan, samples.value) }))
  const concentration = optional('concentration', (cell, column) => readConcentration(cell, column, plan))
  const named = optional('salt', (cell, column) => readSaltCell(cell, column.index))
  const others = {
    date: optional('date', (cell, column) => readDateCell(cell, column, plan)),
    direction: optional('direction', readDirection),
    limit: optional('limit', readLimit),
    rate: optional('rate', (cell, column) => readPlainNumber(cell, column, plan, 'rate')),
    ph: optional('pH', (cell, column) => readPlainNumber(cell, column, plan, 'pH')),
  }
  const words = wordsOfRow(cells, context)
  const found = points.flatMap(({ point, branch }) => point ? [{ point, branch }] : [])
  const pointFindings = points.flatMap(({ findings }) => findings)
  const findings = [...samples.findings, ...concentration.findings, ...named.findings, ...Object.values(others).flatMap(other => other.findings), ...words.findings]
  if (found.length === 0) return withoutPoint([...findings, ...pointFindings], pointFindings, context)
  const place = placeOf(concentration, named, found, context)
  const readings = place.value === null
    ? []
    : found.flatMap(({ point, branch }) => readingOf(point, branch, place.value, {
        direction: branch.direction ?? others.direction.value, limit: others.limit.value ?? point.limit,
        rate: others.rate.value, ph: others.ph.value, date: others.date.value, ...words.value,
      }))
  return { findings: [...findings, ...pointFindings, ...place.findings], readings: onceEach(readings) }
}

/** A row that gives no cloud point is kept, unless something in it could not be read. */
function withoutPoint(findings: Finding[], pointFindings: readonly Finding[], { plan, branches }: RowContext): Reading {
  if (branches.length === 0) {
    return { findings: [...findings, fault(null, 'no-cloud-point', 'No column of cloud points', 'Say which column holds the cloud points.')], readings: [] }
  }
  if (pointFindings.some(({ tone }) => tone !== 'taken')) return { findings, readings: [] }
  const undetermined = pointFindings.find(({ code }) => code === 'not-determined')
  const kept = undetermined
    ? keptFinding('not-determined', undetermined.message, 'No cloud point to take. Kept with the file, not a reading.', undetermined.column)
    : keptFinding('no-cloud-point', 'No cloud point', `Nothing stands under ${quoted(plan.columns.find(({ meaning }) => meaning === 'cloud-point')?.header ?? 'cloud point')}. Kept with the file, not a reading.`)
  return { findings: [kept], readings: [] }
}

interface Place { x: number, scale: Concentration['scale'], salt: string | null }

type Measured = readonly { point: Point, branch: Branch }[]

/** The salt and concentration of a row; a blank has neither. */
function placeOf(concentration: Found<Concentration>, named: Found<NamedSalt>, found: Measured, context: RowContext): Found<Place> {
  const { plan } = context
  const scale = concentration.value?.scale ?? (columnFor(plan, 'concentration')?.unit?.endsWith('kg') ? 'mol/kg' : 'mol/L')
  const isNamedBlank = named.value !== null && named.value.salt === null
  const x = concentration.value?.x.value ?? null
  if (x === 0 || (isNamedBlank && x === null && concentration.findings.length === 0)) return { value: { x: 0, scale, salt: null }, findings: [] }
  if (isNamedBlank && x !== null) {
    const column = columnFor(plan, 'concentration')?.index ?? null
    return { value: null, findings: [undecided(column, 'no-salt', `A blank with ${concentration.value?.x.text} ${scale}`, 'A blank has no salt. Agree to take its concentration as 0, or type the salt.', '0')] }
  }
  const salt = saltFor(named, found, context)
  const missing = x === null && concentration.findings.length === 0 ? [noConcentration(plan)] : []
  return { value: x === null || salt.value === null ? null : { x, scale, salt: salt.value.salt }, findings: [...missing, ...salt.findings] }
}

function noConcentration(plan: Plan): Finding {
  const column = columnFor(plan, 'concentration')
  if (!column) return fault(null, 'no-concentration', 'No column of concentrations', 'Say which column holds the concentrations.')
  return fault(column.index, 'no-concentration', 'No concentration', 'Type the concentration, or leave the row out; it is kept with the file either way.')
}

/** The salt of a row: its own, its columns', that of the rows or the table above. */
function saltFor(named: Found<NamedSalt>, found: Measured, { plan, sectionSalt, saltAbove }: RowContext): Found<NamedSalt> {
  if (named.value) return named
  if (named.findings.length > 0) return { value: null, findings: [] }
  const isNeeded = found.some(({ branch }) => branch.salt === null)
  const known = sectionSalt ?? plan.salt
  if (!isNeeded || known !== null) return { value: { salt: known }, findings: [] }
  const column = columnFor(plan, 'salt')
  // Without any column of salts the table's salt is asked for once, not row by row.
  if (!column) return { value: { salt: null }, findings: [] }
  if (saltAbove === null) return { value: null, findings: [fault(column.index, 'no-salt', 'No salt', 'Type the salt, or leave the row out; it is kept with the file either way.')] }
  return { value: null, findings: [{ ...undecided(column.index, 'no-salt', `No salt; ${saltAbove} stands above`, `Agree if the row belongs to ${saltAbove}, or type the salt.`, saltAbove) }] }
}

type About = Pick<FoundReading, 'direction' | 'limit' | 'rate' | 'ph' | 'date' | 'batch' | 'note' | 'setAside'>

function readingOf(point: Point, branch: Branch, place: Place | null, about: About): FoundReading[] {
  if (!place) return []
  const salt = place.x === 0 ? null : branch.salt ?? place.salt
  return [{ row: 0, ...point, salt, x: place.x, scale: place.scale, ...about }]
}

/** A blank that stands under every salt of a wide row is one measurement. */
function onceEach(readings: readonly FoundReading[]): FoundReading[] {
  const keyOf = ({ x, y, direction, limit }: FoundReading) => x === 0 ? `${y}|${direction}|${limit}` : null
  return readings.filter((reading, index) => keyOf(reading) === null || readings.findIndex(other => keyOf(other) === keyOf(reading)) === index)
}

function wordsOfRow(cells: readonly ReadCell[], { plan, width }: RowContext): { value: Pick<FoundReading, 'batch' | 'note' | 'setAside'>, findings: Finding[] } {
  const textOf = (meaning: 'batch' | 'set-aside') => {
    const column = columnFor(plan, meaning)
    return column ? readWords(cells[column.index]) : null
  }
  const notes = columnsFor(plan, 'note')
  const beyond = notes.some(({ index }) => index === width - 1) ? cells.slice(width) : []
  const note = [...notes.map(({ index }) => cells[index]), ...beyond].map(readWords).filter(text => text !== null).join('; ')
  const setAside = textOf('set-aside')
  const doubted = setAside === null && !plan.isOwnExport ? notes.find(({ index }) => isDoubt(fold(cells[index]?.text ?? ''))) : undefined
  const findings = doubted
    ? [taken(doubted.index, 'remark', 'Remark may be a reason', `${quoted(cells[doubted.index]?.text ?? '')} suggests setting this reading aside. Imported as it is; decide in the series.`)]
    : []
  return { value: { batch: textOf('batch'), note: note === '' ? null : note, setAside }, findings }
}

const forgiven = new Set<Finding['code']>(['outside-range', 'kelvin', 'remark'])

/** Readings that a person keeps set aside come in with their reason, an impossible temperature, too; what holds no number is kept with the file. */
function setAsideBy(words: RowWords, { findings, readings }: Reading): Reading {
  const reasonFor = (column: number) => words.cells.get(column)?.setAside ?? words.row.setAside
  const isForgiven = ({ code, column }: Finding) => forgiven.has(code) && (column === null ? words.row.setAside : reasonFor(column)) !== undefined
  const left = findings.filter(finding => !isForgiven(finding))
  const reason = words.row.setAside
  if (reason !== undefined && (readings.length === 0 || left.some(({ tone }) => tone === 'fault'))) {
    return { findings: [keptFinding('left-out', 'Set aside', `${reason}. It holds no reading that can be taken, and is kept with the file.`)], readings: [] }
  }
  return { findings: left, readings: readings.map(reading => ({ ...reading, setAside: reasonFor(reading.column) ?? reading.setAside })) }
}
