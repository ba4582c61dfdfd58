import { maximumPoints } from '#shared/contracts/fit'
import type { InputProblem } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
import { checkNamed, checkReadings, collect } from '#shared/science/fitting/check'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'
import { fitInPool } from './fit-pool'

/** Up to this many points a named model takes a few milliseconds and is fitted at once; the rest goes to a thread. */
const quickPoints = 200
/** Searched over two shape parameters: a tenth of a second even for a dozen points. */
const slowModel = 'linear-hill'

/**
 * Fits what anybody sends, without keeping it.
 *
 * @throws ScienceError with every problem of the input; ServiceError where the fit takes too long
 */
export async function fitFreely(request: FitRequest): Promise<FitResult> {
  const isQuick = typeof request.model === 'string' && request.model !== slowModel && request.points.length <= quickPoints
  return isQuick ? fit(request) : fitInPool(request)
}

/** What the engine finds wrong with a body that already failed its contract. */
export function furtherFaults(given: unknown): InputProblem[] {
  if (!isRequestLike(given) || given.points.length > maximumPoints) return []
  return collect((report) => {
    checkReadings(given, report)
    if (typeof given.model === 'string') checkNamed(given, report)
  })
}

function isRequestLike(given: unknown): given is FitRequest {
  return typeof given === 'object' && given !== null && 'points' in given && Array.isArray(given.points)
    && given.points.every(point => typeof point === 'object' && point !== null)
    && (!('parameters' in given) || (isRecord(given.parameters) && Object.values(given.parameters).every(isRecord)))
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}
