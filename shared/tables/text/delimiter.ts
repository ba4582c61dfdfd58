import { recordsOf, spacedRecordsOf, widthOf, type Delimiter, type TextRecord } from './records'

const sampleRecords = 200
const sampleLength = 200_000
const candidates: readonly Delimiter[] = ['\t', ';', '|', ',', 'space']

/** Cuts a text into records at a delimiter. */
export function cutText(text: string, delimiter: Delimiter, most: number): TextRecord[] {
  return delimiter === 'space' ? spacedRecordsOf(text, most) : recordsOf(text, delimiter, most)
}

/** A cell that still holds what looks like two cells: 05;31 or 05 31, or a comma that is no decimal comma. */
function isTorn(cell: string, delimiter: Delimiter): boolean {
  if (cell.includes('\n')) return false
  if (/\d\s*[;\t|]\s*[\d-]/.test(cell)) return true
  if (delimiter === ',' && /^\s*\d+\s+\d+\s*$/.test(cell)) return true
  return delimiter === 'space' && (/[;|]/.test(cell) || /,(?!\d)|\d[.]\d*,|[A-Za-z],/.test(cell))
}

/** How well a delimiter cuts the text: rows of several cells, of one width, without cells that hold two. */
function scoreOf(text: string, delimiter: Delimiter): number {
  const records = cutText(text, delimiter, sampleRecords).map(({ cells }) => cells).filter(cells => cells.some(cell => cell.trim() !== ''))
  const several = records.filter(cells => cells.length > 1)
  if (several.length === 0) return 0
  const width = widthOf(several.map(cells => cells.length))
  const share = several.length / records.length
  const evenness = several.filter(cells => cells.length === width).length / records.length
  const cells = several.flat().filter(cell => cell.trim() !== '')
  const clean = 1 - cells.filter(cell => isTorn(cell, delimiter)).length / Math.max(1, cells.length)
  // Words of a remark fall apart at spaces too: spaces have to be clearly better.
  return (share + evenness) * clean ** 4 * (delimiter === 'space' ? 0.8 : 1)
}

/** A first line such as sep=; by which spreadsheets name their delimiter. */
const named = /^\uFEFF?"?sep=(.)"?\s*(?:\r|\n|$)/i

/** Recognises what stands between the cells; null where every row is one cell. */
export function delimiterOf(text: string): Delimiter | null {
  const stated = candidates.find(candidate => candidate === named.exec(text)?.[1])
  if (stated) return stated
  const sample = text.slice(0, sampleLength)
  const scores = candidates.map(candidate => ({ candidate, score: scoreOf(sample, candidate) }))
  const best = scores.reduce((first, next) => next.score > first.score + 1e-9 ? next : first)
  return best.score > 0 ? best.candidate : null
}
