import { joinDecimalCommas } from './text/decimal-commas'
import { decodeText } from './text/decode'
import { cutText, delimiterOf } from './text/delimiter'
import type { Delimiter, TextRecord } from './text/records'
import { refuseByMagic, refusePacked, refuseTooLarge } from './refusals'
import { TableError, type Grid, type TableChoices } from './types'

const formats: Record<Delimiter, Grid['format']> = { ',': 'csv', '|': 'csv', ';': 'semicolon', '\t': 'tsv', 'space': 'whitespace' }

const empty = () => new TableError('empty', 'The file is empty. Choose the file that holds the table, or paste the table.')

const code = (character: string) => character.charCodeAt(0)
const withoutMeaning = new Set([' ', ',', ';', '\t', '|', '\r'].map(code))

/** Counts the lines that hold anything, so that a table far too long is refused before it is cut into cells. */
function refuseManyLines(text: string): void {
  if (text.includes('"')) return
  let lines = 0
  let hasText = false
  for (let index = 0; index < text.length; index++) {
    const character = text.charCodeAt(index)
    if (character === code('\n') || character === code('\r')) {
      if (hasText) lines++
      hasText = false
    }
    else if (!hasText && !withoutMeaning.has(character)) hasText = true
  }
  refuseTooLarge(lines, 0)
}

/** Old programs end a text with control-Z or zeros. */
function withoutEndMark(text: string): string {
  let end = text.length
  while (end > 0 && (text.charCodeAt(end - 1) === 0x1A || text.charCodeAt(end - 1) === 0)) end--
  return text.slice(0, end)
}

/**
 * Cuts a text file or a paste into cells; rows without any text are left out, their numbers are not given to others.
 * @throws TableError empty, pdf, ods, old-xls, not-a-table, wrong-encoding, too-many-rows, too-many-columns
 */
export function gridOfText(source: Uint8Array | string, hint: { name?: string, isPaste?: boolean }, choices: TableChoices): Grid {
  if (typeof source !== 'string') {
    if (source.length === 0) throw empty()
    refuseByMagic(source)
    refusePacked(source)
  }
  const { text: decoded, encoding } = typeof source === 'string' ? { text: source, encoding: null } : decodeText(source, choices.encoding)
  const text = withoutEndMark(decoded.replace(/^\uFEFF/, ''))
  if (text.trim() === '') throw empty()
  refuseManyLines(text)
  const delimiter = choices.delimiter ?? delimiterOf(text) ?? ','
  const records = cutText(text, delimiter, Number.MAX_SAFE_INTEGER)
  const cut = delimiter === ',' ? joinDecimalCommas(records) : records
  const rows = cut.map(({ number, cells }) => ({ number, cells: cells.map(cell => ({ text: cell })), isHidden: false }))
    .filter(row => row.cells.some(cell => cell.text.trim() !== ''))
  refuseTooLarge(rows.length, widthWithText(cut))
  return { format: hint.isPaste ? 'paste' : formats[delimiter], encoding, delimiter, sheets: [], sheet: null, rows }
}

/** Columns up to the last that holds any text; spreadsheets write hundreds of empty ones behind it. */
function widthWithText(records: readonly TextRecord[]): number {
  return records.reduce((widest, { cells }) => {
    let width = cells.length
    while (width > widest && cells[width - 1]?.trim() === '') width--
    return Math.max(widest, width)
  }, 0)
}
