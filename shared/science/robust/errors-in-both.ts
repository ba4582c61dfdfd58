/**
 * Fits with uncertain concentrations: each reading is free to move along x as far as its uncertainty allows. In each
 * round the curve is taken as straight about every moved place, where the effective variance is σ_y² + f′(ξ)²·σ_x²; at
 * the end the sum of squares in both directions is the smallest. For a straight line this is York's solution.
 *
 * @source York, American Journal of Physics 72 (2004) 367 (the line); Britt, Technometrics 15 (1973) 233 (curves)
 */
import { ScienceError } from '../errors'
import { fitWithoutNotes } from '../fitting/named'
import type { FitResult, NamedRequest, Point } from '../fitting/types'
import { models } from '../models'
import { fitReweighted, type Reweighted } from './reweighted'

/** A reading whose concentration has a standard uncertainty sdX [mol/L], 0 where it is exact, as of a blank; y needs one as well [K]. */
export interface UncertainPoint extends Point {
  sd: number
  sdX: number
}

export interface ErrorsInBothFit extends Reweighted {
  /** the concentrations the readings moved to [mol/L] */
  moved: number[]
  /** Σ of squared distances in units of both uncertainties */
  distance: number
}

const newtonSteps = 50
const settledStep = 1e-14

/**
 * @param request its points carry sd of y and sdX of x
 * @throws ScienceError 'unusable-input' where an uncertainty is missing or out of range
 */
export function fitErrorsInBoth(request: Omit<NamedRequest, 'points' | 'weighting'> & { points: readonly UncertainPoint[] }): ErrorsInBothFit {
  check(request.points)
  const model = models[request.model]
  const places = request.points.map(({ x }) => x)
  const derive = ({ parameters }: FitResult): Point[] => {
    const values = parameters.map(({ estimate }) => estimate ?? NaN)
    if (values.some(Number.isNaN)) throw new ScienceError('no-finite-optimum', [{ path: 'points', message: 'the best K lies at 0 or without bound while concentrations move' }])
    return request.points.map((point, i) => {
      const curve = (x: number) => model.value(values, x)
      const place = places[i] = nearestPlace(curve, point, places[i]!)
      // What stands at 0 cannot move below it: there the reading's height alone counts.
      const slope = place > 0 ? slopeAt(curve, place) : 0
      return { x: place, y: point.y - slope * (point.x - place), sd: Math.hypot(point.sd, slope * point.sdX) }
    })
  }
  const weighted = { ...request, weighting: 'sd' as const }
  const { points: _, ...found } = fitReweighted(weighted, fitWithoutNotes(weighted), derive)
  const values = found.fit.parameters.map(({ estimate }) => estimate!)
  const distance = request.points.reduce((sum, { x, y, sd, sdX }, i) => sum + ((y - model.value(values, places[i]!)) / sd) ** 2 + (sdX > 0 ? ((x - places[i]!) / sdX) ** 2 : 0), 0)
  return { ...found, moved: places, distance }
}

/** Step for a slope by central differences: the cube root of the machine's precision beside the place. */
const relativeStep = 6e-6

function slopeAt(curve: (x: number) => number, x: number): number {
  const h = relativeStep * Math.max(Math.abs(x), 1e-3)
  return (curve(x + h) - curve(x - h)) / (2 * h)
}

/** The place on the curve nearest to a reading in units of both uncertainties; never below 0. */
function nearestPlace(curve: (x: number) => number, { x, y, sd, sdX }: UncertainPoint, from: number): number {
  if (sdX === 0) return x
  let place = from
  for (let step = 0; step < newtonSteps; step++) {
    const slope = slopeAt(curve, place)
    // Gauss–Newton on (y − f(ξ))/σ_y and (x − ξ)/σ_x.
    const move = (slope * (y - curve(place)) / sd ** 2 + (x - place) / sdX ** 2) / (slope ** 2 / sd ** 2 + 1 / sdX ** 2)
    const next = Math.max(place + move, 0)
    if (Math.abs(next - place) <= settledStep * Math.max(Math.abs(place), 1e-6)) return next
    place = next
  }
  return place
}

function check(points: readonly UncertainPoint[]): void {
  const problems = points.flatMap(({ sd, sdX }, i) => [
    ...(sd > 0 ? [] : [{ path: `points.${i}.sd`, message: 'the uncertainty of the cloud point must be above 0 K' }]),
    ...(sdX >= 0 ? [] : [{ path: `points.${i}.sdX`, message: 'the uncertainty of the concentration must be 0 mol/L or more' }]),
  ])
  if (problems.length > 0) throw new ScienceError('unusable-input', problems)
}
