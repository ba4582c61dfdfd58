import { maximumPoints } from '#shared/contracts/fit'
import { ScienceError, type InputProblem } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
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

/** What the engine finds wrong with a body that already failed its contract, so that all faults are told at once. */
export async function furtherFaults(given: unknown): Promise<readonly InputProblem[]> {
  if (!isRequestLike(given) || given.points.length > maximumPoints) return []
  try {
    await fitInPool(given)
    return []
  }
  catch (error) {
    // A body of the wrong shape may break more than it says; the contract's faults stand in any case.
    return error instanceof ScienceError ? error.problems : []
  }
}

function isRequestLike(given: unknown): given is FitRequest {
  return isRecord(given) && Array.isArray(given.points) && given.points.every(isRecord)
    && (typeof given.model === 'string' || isRecord(given.model))
    && (!('parameters' in given) || (isRecord(given.parameters) && Object.values(given.parameters).every(isRecord)))
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}
