import { quoted, taken, undecided, type Finding, type ReadCell } from '../readers/finding'
import { fold } from '../cells/fold'
import { isDoubt } from '../columns/header-words'
import { keptFinding } from './kept-rows'
import { columnFor, columnsFor, isMeasured } from '../columns/plan'
import { readWords } from '../readers/others'
import type { RowContext } from './row-context'
import { saltAmong, saltOf } from '../cells/salt-cache'
import type { FoundReading } from '../types'

/** A row without any number where numbers are measured is a remark, or names the salt of the rows below it. */
export function wordsOnly(cells: readonly ReadCell[], { plan }: RowContext): Finding | null {
  const measured = plan.columns.filter(isMeasured)
  if (measured.length === 0 || measured.some(({ index }) => /\d/.test(cells[index]?.text ?? '') && saltOf(cells[index]?.text ?? '').kind !== 'salt')) return null
  const texts = cells.filter(cell => cell.text.trim() !== '').map(cell => cell.text)
  if (texts.length === 1 && !columnFor(plan, 'salt') && saltAmong(texts[0] ?? '') !== null) return keptFinding('remark', 'Names the salt of the rows below', 'Kept with the file, not a reading.')
  const hasPoint = columnsFor(plan, 'cloud-point').some(({ index }) => cells[index]?.text.trim() !== '')
  const hasSalt = columnFor(plan, 'salt') !== undefined && cells[columnFor(plan, 'salt')?.index ?? -1]?.text.trim() !== ''
  // A salt without its numbers is an unfinished row, told further on; so is a word where a cloud point belongs.
  return hasPoint && hasSalt ? null : keptFinding('remark', 'No numbers', 'Kept with the file, not a reading.')
}

/** Words beyond the last column follow the note; numbers there mean that the columns have slipped. */
export function raggedFinding(cells: readonly ReadCell[], { plan, width, head }: RowContext): Finding[] {
  const extra = cells.slice(width).filter(cell => cell.text.trim() !== '')
  if (extra.length === 0 || !head.header) return []
  const isNote = plan.columns[width - 1]?.meaning === 'note' && extra.every(cell => /\p{L}/u.test(cell.text))
  const message = `${width + extra.length} cells under ${width} headings`
  if (isNote) return [taken(width, 'ragged', message, 'The words behind the last column are joined to the note.')]
  return [undecided(width, 'ragged', message, `Check that every cell stands under its heading. Agree to take the first ${width} as they stand, or leave the row out.`)]
}

/** Batch, note and reason of a row, and whether its note sounds like a reason. */
export function wordsOfRow(cells: readonly ReadCell[], { plan, width }: RowContext): { value: Pick<FoundReading, 'batch' | 'note' | 'setAside'>, findings: Finding[] } {
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
