import { undecided } from '../readers/finding'
import { keptFinding } from './kept-rows'
import type { DraftRow } from './row'
import type { FoundReading } from '../types'

const keyOf = ({ x, y, scale, batch, date, direction, limit }: FoundReading) => [x, y, scale, batch, date, direction, limit].join('|')

function rowKey({ readings, repeat }: DraftRow, withSalt: boolean): string {
  return [repeat, ...readings.map(reading => `${withSalt ? reading.salt ?? '' : ''}|${keyOf(reading)}`)].join('\n')
}

const isBlankRow = ({ readings }: DraftRow) => readings.every(({ x }) => x === 0)

/**
 * Marks rows that say what an earlier row says. A person chooses between one reading and two that agree;
 * a blank repeated under another salt is the same measurement and is stored once.
 * @param saltTextOf what stands in the salt's own cell
 */
export function markSameRows(drafts: readonly DraftRow[], saltTextOf: (draft: DraftRow) => string): DraftRow[] {
  const first = new Map<string, DraftRow>()
  return drafts.map((draft) => {
    if (draft.readings.length === 0) return draft
    const key = rowKey(draft, true)
    const before = first.get(key)
    if (!before) {
      first.set(key, draft)
      return draft
    }
    const { isAgreed, isKeptTwice } = draft.words.row
    if (isKeptTwice) return draft
    const isRepeatedBlank = isBlankRow(draft) && saltTextOf(draft) !== saltTextOf(before)
    const group = `same-row:${before.row.number}`
    if (isRepeatedBlank) return withoutReadings(draft, keptFinding('same-row', `The blank of row ${before.row.number}`, 'A blank belongs to its batch and is stored once, however often a table repeats it.'), group)
    if (isAgreed) return withoutReadings(draft, keptFinding('same-row', `Same as row ${before.row.number}`, 'One reading. This row is kept with the file.'), group)
    const finding = undecided(null, 'same-row', `Same as row ${before.row.number}`, 'Kept apart until you choose: one reading, or two that agree.')
    return { ...draft, problems: [...draft.problems, { row: draft.row.number, ...finding, group }] }
  })
}

function withoutReadings(draft: DraftRow, finding: ReturnType<typeof keptFinding>, group: string): DraftRow {
  return { ...draft, readings: [], problems: [{ row: draft.row.number, ...finding, group }] }
}
