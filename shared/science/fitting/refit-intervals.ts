/** Profile intervals by holding one parameter at trial values and fitting the others again. */
import { findRoot } from '../numeric/roots'
import type { Ends } from './conditional-intervals'
import { descendFrom, restrict, type Bounds } from './descend'
import { sumOfSquares, type Objective } from './objective'

const doublings = 30
const iterationsEach = 40
const relativeTolerance = 1e-9

/**
 * @param point the optimum, one value for each coordinate of the objective
 * @param firstStep about one standard error of the coordinate
 * @returns an end at a bound is the bound itself; null where S never reaches the threshold
 */
export function refitInterval(objective: Objective, point: Float64Array, bounds: Bounds, index: number, firstStep: number, threshold: number): Ends {
  const excess = profileExcess(objective, point, bounds, index, threshold)
  const end = (direction: 1 | -1): number | null => {
    const bound = direction > 0 ? bounds.upper[index]! : bounds.lower[index]!
    const probe = excess()
    let inner = point[index]!
    let innerExcess = probe(inner)
    if (innerExcess >= 0) return inner
    let step = firstStep
    for (let doubling = 0; doubling < doublings; doubling++) {
      const reach = point[index]! + direction * step
      const outer = direction > 0 ? Math.min(reach, bound) : Math.max(reach, bound)
      const outerExcess = probe(outer)
      if (outerExcess > 0) return findRoot(probe, inner, outer, innerExcess, outerExcess, relativeTolerance * Math.abs(outer - point[index]!))
      if (outer === bound) return bound
      inner = outer
      innerExcess = outerExcess
      step *= 2
    }
    return null
  }
  return { lower: end(-1), upper: end(1) }
}

/** S over the threshold as a function of the held coordinate; each trial starts from the latest one. */
function profileExcess(objective: Objective, point: Float64Array, bounds: Bounds, index: number, threshold: number) {
  const others = Array.from(point.keys()).filter(j => j !== index)
  const part = (values: Float64Array) => Float64Array.from(others, j => values[j]!)
  const partBounds = { lower: part(bounds.lower), upper: part(bounds.upper) }
  return () => {
    let latest: Float64Array = part(point)
    const whole = point.slice()
    return (value: number): number => {
      whole[index] = value
      const held = restrict(objective, whole, others)
      if (others.length === 0) return sumAt(objective, whole) - threshold
      const found = descendFrom(held, latest, partBounds, 1e-3, iterationsEach)
      if (!Number.isFinite(found.sum)) return Infinity
      latest = found.point
      return found.sum - threshold
    }
  }
}

function sumAt(objective: Objective, point: Float64Array): number {
  const residuals = new Float64Array(objective.readings)
  objective.residuals(point, residuals)
  return sumOfSquares(residuals)
}
