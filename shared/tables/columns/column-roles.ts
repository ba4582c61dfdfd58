import { repeatStem, type HeadedColumn } from './columns'
import type { ColumnMeaning } from '../types'

/** Meanings that one column alone can have; a second one stays with the file. */
const single: readonly ColumnMeaning[] = ['concentration', 'salt', 'samples', 'replicate', 'batch', 'date', 'direction', 'rate', 'pH', 'limit', 'set-aside']

const keep = (column: HeadedColumn): HeadedColumn => ({ ...column, meaning: 'kept', unit: null, direction: null, salt: null, uncertaintyMeaning: null })

/** Rep 1, Rep 2, Rep 3 or Run 1, Run 2 side by side are cloud points measured again, not a column that numbers repeats. */
function repeatsAsCloudPoints(columns: readonly HeadedColumn[]): HeadedColumn[] {
  const stemOf = ({ meaning, name }: HeadedColumn) => meaning === 'replicate' || meaning === 'batch' ? repeatStem(name) : null
  const stems = columns.map(stemOf)
  return columns.map((column, index) => {
    const stem = stems[index]
    const isRepeated = typeof stem === 'string' && stems.filter(other => other === stem).length > 1
    return isRepeated ? { ...column, meaning: 'cloud-point' } : column
  })
}

const branchOf = ({ salt, direction }: HeadedColumn) => `${salt ?? ''}|${direction ?? ''}`

/** Of several columns for one salt and branch: repeats stay together, of other kinds only the first counts. */
function oneOfEachBranch(columns: readonly HeadedColumn[]): HeadedColumn[] {
  const points = columns.filter(column => column.meaning === 'cloud-point')
  const chosen = new Set<HeadedColumn>()
  for (const branch of new Set(points.map(branchOf))) {
    const members = points.filter(column => branchOf(column) === branch)
    const stems = members.map(column => repeatStem(column.name))
    const repeats = members.filter((_, index) => stems[index] !== null && stems.filter(stem => stem === stems[index]).length > 1)
    const same = members.filter(column => column.name === members[0]?.name)
    for (const column of repeats.length > 1 ? repeats : same) chosen.add(column)
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
