/** Fits whose weights depend on the fit: repeated until they agree. */
import { fit } from '../fitting/fit'
import { fitWithoutNotes } from '../fitting/named'
import type { FitResult, NamedRequest, Point } from '../fitting/types'

export interface Reweighted {
  fit: FitResult
  /** rounds of fitting that were needed */
  rounds: number
  converged: boolean
}

const mostRounds = 200
const settled = 1e-10

/** Whether two rounds agree in every estimate, each beside its own size. */
function agree(one: FitResult, other: FitResult): boolean {
  return one.parameters.every(({ estimate }, j) => {
    const next = other.parameters[j]!.estimate
    if (estimate === null || next === null) return estimate === next
    return Math.abs(estimate - next) <= settled * Math.max(Math.abs(estimate), Math.abs(next), 1e-6)
  })
}

/**
 * Fits, derives points with new uncertainties from the fit, and fits those, until nothing changes.
 *
 * @param derive the points of the next round; their sd are relative standard uncertainties [K]
 * @throws ScienceError as `fit` does
 */
export function fitReweighted(request: NamedRequest, first: FitResult, derive: (fit: FitResult) => Point[]): Reweighted & { points: Point[] } {
  let current = first
  let points = derive(current)
  for (let rounds = 1; rounds <= mostRounds; rounds++) {
    const next = fitWithoutNotes(requestWith(request, points))
    const isSettled = agree(current, next)
    current = next
    if (isSettled || rounds === mostRounds) return { fit: fit(requestWith(request, points)), rounds, converged: isSettled, points }
    points = derive(current)
  }
  throw new Error('unreachable')
}

function requestWith(request: NamedRequest, points: Point[]): NamedRequest {
  return { ...request, points, weighting: 'sd', sdMeaning: request.sdMeaning ?? 'relative' }
}
