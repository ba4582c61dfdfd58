/**
 * Intervals from resampled values: by percentiles, and bias-corrected and accelerated (BCa).
 *
 * @source Efron, Journal of the American Statistical Association 82 (1987) 171
 */
import { normalDistribution, normalQuantile } from '../numeric/distributions'

export interface Ends {
  /** null: open on that side */
  lower: number | null
  upper: number | null
}

/** The value below which a share p of sorted values lies; between two by interpolation. Infinite values give null. */
export function quantileOf(sorted: ArrayLike<number>, p: number): number | null {
  if (sorted.length === 0) return null
  const place = Math.min(Math.max(p * (sorted.length + 1) - 1, 0), sorted.length - 1)
  const below = Math.floor(place)
  const [low, high] = [sorted[below]!, sorted[Math.min(below + 1, sorted.length - 1)]!]
  const value = place === below || low === high ? low : low + (place - below) * (high - low)
  return Number.isFinite(value) ? value : null
}

/** The central share `level` of the sorted resamples. */
export function percentileEnds(sorted: ArrayLike<number>, level: number): Ends {
  const tail = (1 - level) / 2
  return { lower: quantileOf(sorted, tail), upper: quantileOf(sorted, 1 - tail) }
}

/** How fast the standard error changes with the value, from leaving out one unit at a time; 0 where nothing changes. */
export function acceleration(leftOut: readonly number[]): number {
  const mean = leftOut.reduce((sum, value) => sum + value, 0) / leftOut.length
  let [squares, cubes] = [0, 0]
  for (const value of leftOut) {
    const d = mean - value
    squares += d * d
    cubes += d * d * d
  }
  return squares > 0 ? cubes / (6 * squares ** 1.5) : 0
}

/**
 * Bias-corrected and accelerated ends.
 *
 * @param sorted resampled values, ascending
 * @param leftOut the value with each unit left out; one that is not finite makes the correction impossible
 * @returns null where resamples lie all on one side of the estimate, or a left-out value is open
 */
export function bcaEnds(sorted: ArrayLike<number>, estimate: number, leftOut: readonly number[], level: number): Ends | null {
  if (!leftOut.every(Number.isFinite)) return null
  let below = 0
  for (let i = 0; i < sorted.length; i++) below += sorted[i]! < estimate ? 1 : sorted[i] === estimate ? 0.5 : 0
  if (below === 0 || below === sorted.length) return null
  const bias = normalQuantile(below / sorted.length)
  const a = acceleration(leftOut)
  const share = (z: number) => normalDistribution(bias + (bias + z) / (1 - a * (bias + z)))
  const z = normalQuantile((1 + level) / 2)
  return { lower: quantileOf(sorted, share(-z)), upper: quantileOf(sorted, share(z)) }
}
