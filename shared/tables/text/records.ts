import type { TableChoices } from '../types'

export type Delimiter = NonNullable<TableChoices['delimiter']>

/** A quoted cell that runs over more lines than this was never closed: its quote is then a letter like any other. */
const mostQuotedLines = 20

/** One record of a text: a line, or several where a quoted cell runs on. Its number counts from 1. */
export interface TextRecord { number: number, cells: string[] }

/** A cell and the place of what ends it: a delimiter, a line end, the end of the text. */
interface TextCell { text: string, end: number }

const isLineEnd = (character: string | undefined) => character === '\n' || character === '\r' || character === undefined

/** The quoted cell that opens at `start`, or null where its quote is not closed before a delimiter or a line end. */
function quotedCell(text: string, start: number, delimiter: string): TextCell | null {
  let lines = 0
  for (let index = start + 1; index < text.length; index++) {
    const character = text[index]
    if (character === '\n' || (character === '\r' && text[index + 1] !== '\n')) {
      if (++lines > mostQuotedLines) return null
    }
    if (character !== '"') continue
    if (text[index + 1] === '"') {
      index++
      continue
    }
    let end = index + 1
    while (text[end] === ' ') end++
    const isClosed = text[end] === delimiter || isLineEnd(text[end])
    return isClosed ? { text: text.slice(start + 1, index).replaceAll('""', '"'), end } : null
  }
  return null
}

function cellAt(text: string, from: number, delimiter: string): TextCell {
  let start = from
  while (text[start] === ' ') start++
  const quoted = text[start] === '"' ? quotedCell(text, start, delimiter) : null
  if (quoted) return quoted
  let end = start
  while (text[end] !== delimiter && !isLineEnd(text[end])) end++
  return { text: text.slice(from, end), end }
}

function recordAt(text: string, from: number, delimiter: string): { cells: string[], next: number } {
  const cells: string[] = []
  for (let at = from; ;) {
    const { text: cell, end } = cellAt(text, at, delimiter)
    cells.push(cell)
    if (text[end] !== delimiter) return { cells, next: end + (text[end] === '\r' && text[end + 1] === '\n' ? 2 : 1) }
    at = end + 1
  }
}

/**
 * Cuts text into records of cells, without those that are empty lines.
 * Line ends may be CR, LF, both or mixed; quoted cells may hold delimiters, line ends and doubled quotes.
 * @param most stops after this many records
 */
export function recordsOf(text: string, delimiter: string, most: number): TextRecord[] {
  const records: TextRecord[] = []
  let number = 0
  for (let at = 0; at < text.length && records.length < most;) {
    const { cells, next } = recordAt(text, at, delimiter)
    number++
    if (cells.length > 1 || cells[0]?.trim() !== '') records.push({ number, cells })
    at = next
  }
  return records
}

const joined = '\u00A0'
const unitAfterNumber = /(\d) (mM|M|mol\/[Ll]|mmol\/[Ll]|mol\/kg|°C|℃|K|°F)(?=\s|$)/g
const besidePlusMinus = / {0,2}(±|\+\/-|\+-) {0,2}/g

/** Cells set apart by spaces: two or more where one space stands inside cells, else any. */
export function spacedRecordsOf(text: string, most: number): TextRecord[] {
  const lines = text.split(/\r\n|\n|\r/).map((line, index) => ({ number: index + 1, text: line.trim() })).filter(line => line.text !== '').slice(0, most)
  const trimmed = lines.map(line => line.text.replace(unitAfterNumber, `$1${joined}$2`).replace(besidePlusMinus, `${joined}$1${joined}`))
  const isWide = hasOneWidth(trimmed.slice(0, 100).map(line => line.split(/\t+| {2,}/).length))
  return trimmed.map((line, index) => ({ number: lines[index]?.number ?? 0, cells: line.split(isWide ? /\t+| {2,}/ : /[\t ]+/).map(cell => cell.replaceAll(joined, ' ')) }))
}

/** Most rows that have several cells have the same number of them. */
function hasOneWidth(widths: readonly number[]): boolean {
  const several = widths.filter(width => width > 1)
  if (several.length < widths.length / 2) return false
  return several.filter(width => width === widthOf(several)).length >= several.length * 0.6
}

/** The width that most rows have. */
export function widthOf(widths: readonly number[]): number {
  const counts = new Map<number, number>()
  for (const width of widths) counts.set(width, (counts.get(width) ?? 0) + 1)
  return [...counts].reduce((best, entry) => entry[1] > best[1] ? entry : best, [0, 0] as [number, number])[0]
}
