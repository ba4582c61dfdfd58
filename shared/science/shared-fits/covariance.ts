/** The joint covariance of shared and own constants, block by block; nothing of the size of all readings is formed. */
import { invertTriangle } from '../numeric/qr'
import type { Elimination } from './blocks'
import type { SharedOptimum } from './descend'

/** (JᵀWJ)⁻¹ over the tied constants, then each block's own in turn; null where the tied ones are not determined. */
export function jointCovariance({ triangle, eliminations, shared }: SharedOptimum): number[][] | null {
  const ties = shared.length
  if (ties > 0 && !triangle) return null
  const tied = triangle ? productOf(invertTriangle(triangle.values, triangle.rows, ties), ties) : []
  const owns = eliminations.map(one => ownPart(one))
  const size = ties + eliminations.reduce((sum, { own }) => sum + own, 0)
  const joint = Array.from({ length: size }, () => new Array<number>(size).fill(0))
  tied.forEach((row, t) => row.forEach((value, u) => (joint[t]![u] = value)))
  let at = ties
  const offsets = eliminations.map(({ own }) => (at += own) - own)
  eliminations.forEach((one, b) => {
    owns[b]!.unscaled.forEach((row, j) => row.forEach((value, k) => (joint[offsets[b]! + j]![offsets[b]! + k] = value)))
    // A block's own constants move by −G with its tied ones.
    const moved = carried(owns[b]!.follows, one.ties, tied, ties)
    moved.forEach((row, j) => row.forEach((value, t) => (joint[offsets[b]! + j]![t] = joint[t]![offsets[b]! + j] = -value)))
    eliminations.forEach((other, c) => {
      owns[c]!.follows.forEach((follows, k) => moved.forEach((row, j) => {
        joint[offsets[b]! + j]![offsets[c]! + k]! += other.ties.reduce((sum, tie, q) => sum + row[tie]! * follows[q]!, 0)
      }))
    })
  })
  return joint
}

/** A block alone: (AᵀA)⁻¹, and G = R⁻¹·R₁₂, how its own constants follow its tied ones. */
function ownPart({ own, triangle, rows, ties }: Elimination): { unscaled: number[][], follows: number[][] } {
  const inverse = invertTriangle(triangle, rows, own)
  const follows = Array.from({ length: own }, (_, i) => ties.map((_tie, q) => {
    let sum = 0
    for (let k = i; k < own; k++) sum += inverse[k * own + i]! * triangle[(own + q) * rows + k]!
    return sum
  }))
  return { unscaled: productOf(inverse, own), follows }
}

/** R⁻¹·R⁻ᵀ by rows. */
function productOf(inverse: Float64Array, size: number): number[][] {
  return Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => {
    let sum = 0
    for (let k = Math.max(i, j); k < size; k++) sum += inverse[k * size + i]! * inverse[k * size + j]!
    return sum
  }))
}

/** G·C: rows of own constants over all ties. */
function carried(follows: readonly number[][], known: readonly number[], tied: readonly number[][], ties: number): number[][] {
  return follows.map(row => Array.from({ length: ties }, (_, t) => known.reduce((sum, tie, q) => sum + row[q]! * tied[tie]![t]!, 0)))
}
