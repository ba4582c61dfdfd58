import type { Branch } from '../columns/branches'
import { taken } from '../readers/finding'
import type { DraftRow } from './row'
import type { FoundReading } from '../types'

const seriesOf = ({ salt, direction }: FoundReading) => `${salt ?? ''}|${direction ?? ''}`

/** Filling in is for gaps: a series in which fewer readings have an uncertainty than lack one is left as it is. */
const leastShare = 0.5

function median(values: readonly number[]): number | null {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = Math.floor(sorted.length / 2)
  const [low, high] = [sorted[middle - 1], sorted[middle]]
  if (high === undefined) return null
  return sorted.length % 2 === 1 || low === undefined ? high : Number(((low + high) / 2).toPrecision(12))
}

/** The median standard uncertainty of each series that may be filled from it. */
function fillings(readings: readonly FoundReading[]): Map<string, number> {
  const groups = new Map<string, FoundReading[]>()
  for (const reading of readings) {
    const key = seriesOf(reading)
    const group = groups.get(key)
    if (group) group.push(reading)
    else groups.set(key, [reading])
  }
  return new Map([...groups].flatMap(([series, members]) => {
    const sds = members.flatMap(({ sd }) => sd ?? [])
    const middle = sds.length >= members.length * leastShare ? median(sds) : null
    return middle === null ? [] : [[series, middle] as const]
  }))
}

/**
 * Gives readings without an uncertainty the median of their series and says so; `sdGiven` stays empty, which marks them as filled.
 * Only where a column of uncertainties has a gap.
 */
export function fillUncertainties(drafts: readonly DraftRow[], branches: readonly Branch[]): DraftRow[] {
  const columns = branches.flatMap(({ uncertainty }) => uncertainty ? [uncertainty.index] : [])
  const [column] = columns
  if (column === undefined) return [...drafts]
  const medians = fillings(drafts.flatMap(({ readings }) => readings))
  return drafts.map((draft) => {
    const lacking = draft.readings.filter(({ sd, sdGiven, limit }) => sd === null && sdGiven === null && limit === 'exact')
    if (lacking.length === 0) return draft
    const readings = draft.readings.map(reading => lacking.includes(reading) ? { ...reading, sd: medians.get(seriesOf(reading)) ?? null } : reading)
    const filled = lacking.map(reading => medians.get(seriesOf(reading))).find(value => value !== undefined)
    const own = branches.find(branch => branch.columns.some(({ index }) => index === lacking[0]?.column))?.uncertainty?.index ?? column
    if (draft.words.cells.get(own)?.isAgreed) return { ...draft, readings }
    const finding = filled === undefined
      ? taken(own, 'no-uncertainty', 'No uncertainty', 'Imported without one.')
      : taken(own, 'no-uncertainty', 'No uncertainty', `The series median, ${filled} K, is filled in and marked as filled.`, String(filled))
    return { ...draft, readings, problems: [...draft.problems, { row: draft.row.number, ...finding }] }
  })
}
