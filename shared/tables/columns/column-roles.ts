import { areConsecutive, repeatOf, type HeadedColumn } from './columns'
import type { ColumnMeaning } from '../types'

/** Meanings that one column alone can have; a second one stays with the file. */
export const single: readonly ColumnMeaning[] = ['concentration', 'salt', 'samples', 'replicate', 'batch', 'date', 'direction', 'rate', 'pH', 'limit', 'set-aside']

export const keep = (column: HeadedColumn): HeadedColumn => ({ ...column, meaning: 'kept', unit: null, direction: null, salt: null, uncertaintyMeaning: null })

/** Rep 1, Rep 2, Rep 3 or Run 1, Run 2 side by side are cloud points measured again, not a column that numbers repeats. */
function repeatsAsCloudPoints(columns: readonly HeadedColumn[]): HeadedColumn[] {
  const those = columns.filter(({ meaning }) => meaning === 'replicate' || meaning === 'batch')
  return columns.map(column => those.includes(column) && repeatsLike(column, those).length > 1 ? { ...column, meaning: 'cloud-point' } : column)
}

/** The columns that repeat the same measurement as this one, itself among them. */
function repeatsLike({ name }: HeadedColumn, columns: readonly HeadedColumn[]): HeadedColumn[] {
  const own = repeatOf(name)
  if (!own) return []
  const alike = columns.flatMap((column) => {
    const repeat = repeatOf(column.name)
    return repeat?.stem === own.stem ? [{ column, repeat }] : []
  })
  return areConsecutive(alike.map(({ repeat }) => repeat)) ? alike.map(({ column }) => column) : []
}

export const branchOf = ({ salt, direction }: HeadedColumn) => `${salt ?? ''}|${direction ?? ''}`

/** Of several columns for one salt and branch: repeats stay together, of other kinds only the first counts. */
function oneOfEachBranch(columns: readonly HeadedColumn[]): HeadedColumn[] {
  const points = columns.filter(column => column.meaning === 'cloud-point')
  const chosen = new Set<HeadedColumn>()
  const isOneTable = columns.filter(({ meaning }) => meaning === 'concentration').length < 2
  for (const branch of new Set(points.map(branchOf))) {
    const members = points.filter(column => branchOf(column) === branch)
    const repeats = members.map(column => repeatsLike(column, members)).find(alike => alike.length > 1)
    // Beside a second column of concentrations stands a table of its own, not a repeat.
    const same = members.filter(({ name, unit }, place) => place === 0 || (isOneTable && name === members[0]?.name && unit === members[0]?.unit))
    for (const column of repeats ?? same) chosen.add(column)
  }
  return columns.map(column => column.meaning === 'cloud-point' && !chosen.has(column) ? keep(column) : column)
}

/** The concentration whose unit is stated comes before one without. */
function firstOf(meaning: ColumnMeaning, columns: readonly HeadedColumn[]): HeadedColumn | undefined {
  const those = columns.filter(column => column.meaning === meaning)
  return those.find(column => meaning === 'concentration' && column.unit !== null) ?? those[0]
}

/** Which cloud point an uncertainty belongs to: the one of its salt and branch, else its neighbour to the left; null: all. */
function ownerOf(column: HeadedColumn, columns: readonly HeadedColumn[]): number | null {
  const points = columns.filter(({ meaning }) => meaning === 'cloud-point')
  if (points.length < 2) return null
  const named = column.salt !== null || column.direction !== null ? points.find(point => branchOf(point) === branchOf(column)) : undefined
  const isOneForAll = columns.filter(({ meaning }) => meaning === 'uncertainty').length === 1
  if (named) return named.index
  return isOneForAll ? null : points.findLast(point => point.index < column.index)?.index ?? null
}

/** Gives every column one part to play: no two for what there is only one of, every uncertainty its cloud point. */
export function assignRoles(headed: readonly HeadedColumn[]): HeadedColumn[] {
  const points = oneOfEachBranch(repeatsAsCloudPoints(headed))
  const first = new Map(single.map(meaning => [meaning, firstOf(meaning, points)]))
  const hasRepeats = points.some((column, index) => column.meaning === 'cloud-point' && points.some((other, place) => place !== index && other.meaning === 'cloud-point' && branchOf(other) === branchOf(column)))
  const alone = points.map((column) => {
    if (single.includes(column.meaning) && first.get(column.meaning) !== column) return keep(column)
    // Beside repeats a spread is worked out from them; a column of it only says so again.
    return column.meaning === 'uncertainty' && hasRepeats ? keep(column) : column
  })
  return alone.map(column => column.meaning === 'uncertainty' ? { ...column, of: ownerOf(column, alone) } : column)
}
