import type { Model } from '../models'
import type { ScaledData } from './scale'

/** A sum of squares to be made small: whitened residuals (fitted − measured) and their derivatives by the free parameters. */
export interface Objective {
  readings: number
  size: number
  residuals(point: ArrayLike<number>, out: Float64Array): void
  /** Column-major: ∂residual i/∂parameter j at out[j * readings + i]. */
  jacobian(point: ArrayLike<number>, out: Float64Array): void
}

export function sumOfSquares(values: Float64Array): number {
  let sum = 0
  for (let i = 0; i < values.length; i++) sum += values[i]! * values[i]!
  return sum
}

/**
 * The objective of a named model on scaled readings.
 *
 * @param held scaled value of each parameter that is not free, NaN for a free one
 */
export function modelObjective(model: Model, data: ScaledData, held: Float64Array): Objective & { complete(point: ArrayLike<number>): Float64Array } {
  const { n, x, y, root } = data
  const all = Float64Array.from(held)
  const free: number[] = []
  for (let j = 0; j < held.length; j++) if (Number.isNaN(held[j])) free.push(j)
  const row = new Float64Array(held.length)
  const complete = (point: ArrayLike<number>) => {
    for (let j = 0; j < free.length; j++) all[free[j]!] = point[j]!
    return all
  }
  return {
    readings: n,
    size: free.length,
    complete,
    residuals(point, out) {
      complete(point)
      for (let i = 0; i < n; i++) out[i] = (model.value(all, x[i]!) - y[i]!) * root[i]!
    },
    jacobian(point, out) {
      complete(point)
      for (let i = 0; i < n; i++) {
        model.gradient(all, x[i]!, row, 0, 1)
        for (let j = 0; j < free.length; j++) out[j * n + i] = row[free[j]!]! * root[i]!
      }
    },
  }
}
