/** Quantities computed from the constants of a fit, each with the full covariance. */
import { deltaStandardError } from '../fitting/covariance'
import { hasCovarianceRow } from '../fitting/curve'
import type { FitResult, ModelName } from '../fitting/types'
import { models, type Model } from '../models'

/** What a derived quantity needs of a fit. */
export type SolvedFit = Pick<FitResult, 'model' | 'parameters' | 'covariance'>

export interface Quantity {
  estimate: number
  /** null where the covariance is not known */
  standardError: number | null
}

export interface Solved {
  model: Model
  values: number[]
  /** a quantity with its gradient by every constant, in the model's order */
  quantity: (estimate: number, gradient: ArrayLike<number>) => Quantity
}

/** The constants of a fit; null where one is open, or the model is a typed expression. */
export function solved({ model, parameters, covariance }: SolvedFit): Solved | null {
  const values = parameters.flatMap(({ estimate }) => estimate === null ? [] : [estimate])
  if (model === 'expression' || values.length < parameters.length) return null
  const rows = parameters.flatMap((parameter, j) => hasCovarianceRow(parameter) ? [j] : [])
  return {
    model: models[model as ModelName], values,
    quantity: (estimate, gradient) => ({ estimate, standardError: covariance && deltaStandardError(rows.map(j => gradient[j]!), covariance) }),
  }
}

/** ∂f/∂p at x, by every constant. */
export function gradientAt({ model, values }: Solved, x: number): Float64Array {
  const gradient = new Float64Array(values.length)
  model.gradient(values, x, gradient, 0, 1)
  return gradient
}
