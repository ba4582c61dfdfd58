import { descendFrom, unbounded } from './descend'
import type { Objective } from './objective'

const damping = 1
/** Longest change of a logarithm: a factor e^40 either way is further than any start is wrong. */
const furthest = 40

/**
 * Where a descent ends in the logarithms of the parameters, signs kept: long curved valleys across many powers of ten,
 * which plain steps creep along, are nearly straight there. Null from a start with a zero in it.
 */
export function descendInLogarithms(objective: Objective, start: Float64Array, iterationLimit: number): Float64Array | null {
  if (start.some(value => value === 0)) return null
  const { readings, size } = objective
  const point = start.slice()
  const moveTo = (logarithms: ArrayLike<number>) => {
    for (let j = 0; j < size; j++) point[j] = start[j]! * Math.exp(logarithms[j]!)
    return point
  }
  const transformed: Objective = {
    readings,
    size,
    residuals: (logarithms, out) => objective.residuals(moveTo(logarithms), out),
    jacobian(logarithms, out) {
      objective.jacobian(moveTo(logarithms), out)
      for (let j = 0; j < size; j++) for (let i = 0; i < readings; i++) out[j * readings + i]! *= point[j]!
    },
  }
  const bounds = unbounded(size)
  bounds.lower.fill(-furthest)
  bounds.upper.fill(furthest)
  return moveTo(descendFrom(transformed, new Float64Array(size), bounds, damping, iterationLimit).point).slice()
}
