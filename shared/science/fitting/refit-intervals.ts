/** Profile intervals by holding one parameter at trial values and fitting the others again. */
import { backSubstitute, isDeficient, triangularize } from '../numeric/qr'
import { findRoot } from '../numeric/roots'
import type { Ends } from './conditional-intervals'
import { descendFrom, restrict, type Bounds } from './descend'
import { sumOfSquares, type Objective } from './objective'

const doublings = 30
const iterationsEach = 40
const relativeTolerance = 1e-8
const slideRounds = 15
/** A trial fit is done when another step promises less than this share of the threshold. */
const promisedShare = 1e-10

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
      const near = slide(held, latest, partBounds, threshold)
      const found = near ?? descendFrom(held, latest, partBounds, 1e-3, iterationsEach)
      if (!Number.isFinite(found.sum)) return Infinity
      latest = found.point
      return found.sum - threshold
    }
  }
}

/** Gauss–Newton from a close start, with halved steps; null where it does not settle inside the bounds. */
function slide(objective: Objective, start: Float64Array, bounds: Bounds, threshold: number): { point: Float64Array, sum: number } | null {
  const { readings: n, size: p } = objective
  const residuals = new Float64Array(n)
  const triangle = new Float64Array(n * p)
  const step = new Float64Array(p)
  let point = start
  objective.residuals(point, residuals)
  let sum = sumOfSquares(residuals)
  for (let round = 0; round < slideRounds; round++) {
    objective.jacobian(point, triangle)
    triangularize(triangle, n, p, residuals)
    if (isDeficient(triangle, n, p, 1e-12)) return null
    let promised = 0
    for (let i = 0; i < p; i++) promised += residuals[i]! * residuals[i]!
    if (promised < promisedShare * threshold) return { point, sum }
    backSubstitute(triangle, n, p, residuals, step)
    const next = shorten(objective, point, step, sum, residuals)
    if (!next || next.point.some((value, j) => value < bounds.lower[j]! || value > bounds.upper[j]!)) return null
    point = next.point
    sum = next.sum
  }
  return null
}

function shorten(objective: Objective, from: Float64Array, step: Float64Array, before: number, residuals: Float64Array) {
  for (let share = 1; share > 0.05; share /= 2) {
    const point = from.map((value, j) => value - share * step[j]!)
    objective.residuals(point, residuals)
    const sum = sumOfSquares(residuals)
    if (sum < before) return { point, sum }
  }
  return null
}

function sumAt(objective: Objective, point: Float64Array): number {
  const residuals = new Float64Array(objective.readings)
  objective.residuals(point, residuals)
  return sumOfSquares(residuals)
}
