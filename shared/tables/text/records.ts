import type { TableChoices } from '../types'

export type Delimiter = NonNullable<TableChoices['delimiter']>

/** A quoted cell that runs over more lines than this was never closed: its quote is then a letter like any other. */
const mostQuotedLines = 20

interface Quoted { text: string, end: number }

/** The quoted cell that opens at `start`, or null where its quote is not closed before a delimiter or a line end. */
function quotedCell(text: string, start: number, delimiter: string): Quoted | null {
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
    const isClosed = end >= text.length || text[end] === delimiter || text[end] === '\n' || text[end] === '\r'
    return isClosed ? { text: text.slice(start + 1, index).replaceAll('""', '"'), end } : null
  }
  return null
}

/**
 * Cuts text into records of cells. Line ends may be CR, LF, both or mixed; quoted cells may hold delimiters, line ends and doubled quotes.
 * @param most stops after this many records
 */
export function recordsOf(text: string, delimiter: string, most: number): string[][] {
  const records: string[][] = []
  let cells: string[] = []
  let start = 0
  const endRecord = () => {
    records.push(cells)
    cells = []
  }
  for (let index = 0; index <= text.length && records.length < most; index++) {
    const character = index < text.length ? text[index] : '\n'
    if (character === '"' && text.slice(start, index).trim() === '') {
      const quoted = quotedCell(text, index, delimiter)
      if (quoted) {
        cells.push(quoted.text)
        if (text[quoted.end] !== delimiter) endRecord()
        index = quoted.end + (text[quoted.end] === '\r' && text[quoted.end + 1] === '\n' ? 1 : 0)
        start = index + 1
        // A delimiter at the very end opens one more, empty cell; the turn at the end of the text makes it.
        if (text[quoted.end] !== delimiter && start >= text.length) break
        continue
      }
    }
    if (character === delimiter || character === '\n' || character === '\r') {
      if (index === text.length && start === index && cells.length === 0) break
      cells.push(text.slice(start, index))
      if (character !== delimiter) endRecord()
      if (character === '\r' && text[index + 1] === '\n') index++
      start = index + 1
    }
  }
  return records
}

const joined = '\u00A0'
const unitAfterNumber = /(\d) (mM|M|mol\/[Ll]|mmol\/[Ll]|mol\/kg|°C|℃|K|°F)(?=\s|$)/g
const besidePlusMinus = / *(±|\+\/-|\+-) */g

/** Cells set apart by spaces: two or more where one space stands inside cells, else any. */
export function spacedRecordsOf(text: string, most: number): string[][] {
  const lines = text.split(/\r\n|\n|\r/, most)
  if (lines.at(-1) === '') lines.pop()
  const trimmed = lines.map(line => line.trim().replace(unitAfterNumber, `$1${joined}$2`).replace(besidePlusMinus, `${joined}$1${joined}`))
  const isWide = hasOneWidth(trimmed.slice(0, 100).map(line => line.split(/\t+| {2,}/).length))
  return trimmed.map(line => line === '' ? [''] : line.split(isWide ? /\t+| {2,}/ : /[\t ]+/).map(cell => cell.replaceAll(joined, ' ')))
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
