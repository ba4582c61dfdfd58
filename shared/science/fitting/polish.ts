import { backSubstitute, isDeficient, triangularize } from '../numeric/qr'
import { sumOfSquares, type Objective } from './objective'

/** A point with everything the covariance needs. */
export interface Stationary {
  point: Float64Array
  sum: number
  residuals: Float64Array
  jacobian: Float64Array
  /** Upper triangle of the QR of the Jacobian, stored with `readings` rows. */
  triangle: Float64Array
  isSingular: boolean
  /** Length of the residual's tangential part beside its normal part, each per degree of freedom. */
  relativeOffset: number
  /** Longest Gauss–Newton step left, relative to the parameter. */
  relativeStep: number
}

/** Offset below which a fit counts as converged. @source Bates & Watts, Technometrics 23 (1981) 179 */
export const convergedOffset = 1e-8
/** Offset below which another step could not change the printed digits. */
const settledOffset = 1e-12
const settledStep = 1e-13
const dependentColumns = 1e-14

function examine(objective: Objective, point: Float64Array, step: Float64Array): Stationary {
  const { readings: n, size: p } = objective
  const residuals = new Float64Array(n)
  const jacobian = new Float64Array(n * p)
  objective.residuals(point, residuals)
  objective.jacobian(point, jacobian)
  const triangle = jacobian.slice()
  const rotated = residuals.slice()
  triangularize(triangle, n, p, rotated)
  let tangential = 0
  let normal = 0
  for (let i = 0; i < p; i++) tangential += rotated[i]! * rotated[i]!
  for (let i = p; i < n; i++) normal += rotated[i]! * rotated[i]!
  const isSingular = isDeficient(triangle, n, p, dependentColumns)
  let relativeStep = Infinity
  if (!isSingular) {
    backSubstitute(triangle, n, p, rotated, step)
    relativeStep = 0
    for (let j = 0; j < p; j++) relativeStep = Math.max(relativeStep, Math.abs(step[j]!) / (Math.abs(point[j]!) || 1))
  }
  // Without a residual left over there is nothing to be orthogonal to: the size of the step decides.
  const relativeOffset = n > p && normal > 0 ? Math.sqrt(tangential / p / (normal / (n - p))) : Infinity
  return { point, sum: sumOfSquares(residuals), residuals, jacobian, triangle, isSingular, relativeOffset, relativeStep }
}

/** Up to `limit` Gauss–Newton steps by QR, each kept only if the relative offset falls. */
export function polish(objective: Objective, start: Float64Array, limit = 3): Stationary {
  const { size } = objective
  const step = new Float64Array(size)
  const nextStep = new Float64Array(size)
  let best = examine(objective, start, step)
  for (let round = 0; round < limit; round++) {
    if (best.isSingular || best.relativeOffset < settledOffset || best.relativeStep < settledStep) break
    const trial = new Float64Array(size)
    for (let j = 0; j < size; j++) trial[j] = best.point[j]! - step[j]!
    const next = examine(objective, trial, nextStep)
    const isBetter = next.relativeOffset < best.relativeOffset || (next.relativeOffset === Infinity && next.relativeStep < best.relativeStep)
    if (!(isBetter && next.sum <= best.sum * (1 + 1e-9) + Number.MIN_VALUE)) break
    best = next
    step.set(nextStep)
  }
  return best
}
