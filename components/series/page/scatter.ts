import type { FitResult } from '#shared/science/fitting/types'

/**
 * The unit of a fit's scatter. With weights by uncertainty it is a multiple of the uncertainties that were stated, not a
 * temperature.
 */
export function scatterUnit(weighting: FitResult['weighting'] | undefined): { symbol: string, words: string } {
  return weighting === 'sd' ? { symbol: 'stated sd', words: 'times the stated uncertainties' } : { symbol: 'K', words: 'K' }
}

/** How far a reading lies off, in scatters; null where its own uncertainty is not stated and weights are by uncertainty. */
export function inScatters(distance: number, sd: number | null, fit: Pick<FitResult, 'weighting' | 'residualStandardDeviation'>): number | null {
  const { weighting, residualStandardDeviation: scatter } = fit
  if (!scatter) return null
  if (weighting !== 'sd') return Math.abs(distance) / scatter
  return sd ? Math.abs(distance) / (scatter * sd) : null
}
