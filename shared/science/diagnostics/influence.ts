import { ScienceError } from '../errors'
import { fit } from '../fitting'
import type { NamedRequest } from '../fitting/types'

/** Estimate of one parameter, null where the readings leave it open or are too few. */
export function estimateOf(request: NamedRequest, parameter: string): number | null {
  try {
    // The estimate alone is wanted; profile intervals would cost ten times as much.
    return fit({ ...request, intervals: 't' }).parameters.find(({ name }) => name === parameter)?.estimate ?? null
  }
  catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

export interface Influence {
  /** place in the points of the request, from 0 */
  place: number
  x: number
  /** (estimate with all − estimate without this reading) / standard error; null where the rest leaves the parameter open */
  shift: number | null
}

/**
 * How far each reading pulls one parameter: the fit is made again without it.
 *
 * @param estimate of the parameter with all readings, in its own unit
 * @param standardError of that estimate, same unit
 */
export function influenceOn(parameter: string, request: NamedRequest, estimate: number, standardError: number): Influence[] {
  return request.points.map((point, place) => {
    const without = estimateOf({ ...request, points: request.points.filter((_, other) => other !== place) }, parameter)
    return { place, x: point.x, shift: without === null ? null : (estimate - without) / standardError }
  })
}
