/** A stretch along an axis that a drawn thing takes up, ends in any order [px]. */
export interface Stretch {
  from: number
  to: number
}

/**
 * Gives each stretch the first lane where it meets nothing; the order of the list decides who comes first.
 * When every lane is taken it goes where it overlaps least.
 *
 * @param clearance distance to keep within a lane [px]
 * @returns lane of each stretch, from 0
 */
export function assignLanes(stretches: readonly Stretch[], most: number, clearance = 0): number[] {
  const lanes: Stretch[][] = Array.from({ length: most }, () => [])
  return stretches.map((stretch) => {
    const overlaps = lanes.map(lane => lane.reduce((sum, other) => sum + overlap(stretch, other, clearance), 0))
    const chosen = overlaps.indexOf(Math.min(...overlaps))
    lanes[chosen]!.push(stretch)
    return chosen
  })
}

function overlap(a: Stretch, b: Stretch, clearance: number): number {
  const start = Math.max(Math.min(a.from, a.to), Math.min(b.from, b.to))
  const end = Math.min(Math.max(a.from, a.to), Math.max(b.from, b.to))
  return Math.max(0, end - start + clearance)
}
