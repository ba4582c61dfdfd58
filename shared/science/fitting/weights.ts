import type { FitRequest, Point, SdMeaning, Weighting } from './types'

/** Per-reading sds from fewer samples than this wreck intervals (docs/numerics.md), so they are not a default. */
export const fewestSamplesForSd = 6

export interface Weights {
  weighting: Weighting
  sdMeaning: SdMeaning
  /** w of each reading; null for equal weights. */
  values: Float64Array | null
  /** Standard uncertainty put in place of an sd of 0 [K], and the readings (from 0) it was used for. */
  floor: number | null
  floored: number[]
}

/** Weights of readings that have passed the checks. */
export function weightsOf({ points, weighting: asked, sdMeaning = 'relative' }: FitRequest): Weights {
  const weighting = asked ?? (sdMeaning === 'absolute' ? 'sd' : defaultWeighting(points))
  const equal = { weighting, sdMeaning, values: null, floor: null, floored: [] }
  if (weighting === 'none') return equal
  if (weighting === 'replicates') return { ...equal, values: Float64Array.from(points, point => point.n!) }
  const floored = points.flatMap((point, i) => point.sd === 0 ? [i] : [])
  const floor = floored.length > 0 ? resolutionOf(points) / Math.sqrt(12) : null
  return { ...equal, values: Float64Array.from(points, ({ sd }) => 1 / (sd! > 0 ? sd! : floor!) ** 2), floor, floored }
}

function defaultWeighting(points: readonly Point[]): Weighting {
  const haveSd = points.every(({ sd, n }) => sd !== undefined && (n === undefined || n >= fewestSamplesForSd))
  if (haveSd) return 'sd'
  return points.every(({ n }) => n !== undefined) ? 'replicates' : 'none'
}

/** Last decimal place that any reading uses, from 1 down to 10⁻⁶ K. */
function resolutionOf(points: readonly Point[]): number {
  for (let decimals = 0; decimals < 6; decimals++) {
    if (points.every(({ y }) => Number(y.toFixed(decimals)) === y)) return 10 ** -decimals
  }
  return 1e-6
}
