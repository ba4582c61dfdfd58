import { normalQuantile, studentQuantile } from '../numeric/distributions'
import { models } from '../models'
import { deltaStandardError } from './covariance'
import type { FitResult, FittedParameter, ModelName } from './types'

/** What drawing a curve needs of a fit. */
export type DrawableFit = Pick<FitResult, 'model' | 'parameters' | 'covariance'> & { degreesOfFreedom?: number, sdMeaning?: FitResult['sdMeaning'] }

export interface Band {
  lower: number[]
  upper: number[]
}

/** Fitted cloud points [°C] at concentrations xs [mol/L]; null where the fit leaves a constant open. */
export function curveAt(fit: DrawableFit, xs: readonly number[]): number[] | null {
  const values = estimates(fit)
  if (!values) return null
  const model = models[fit.model as ModelName]
  return xs.map(x => model.value(values, x))
}

function estimates({ model, parameters }: DrawableFit): number[] | null {
  if (model === 'expression') return null
  const values = parameters.map(parameter => parameter.estimate)
  return values.every(value => value !== null) ? values : null
}

/** A covariance row belongs to each parameter that has a standard error. */
export function hasCovarianceRow(parameter: FittedParameter): boolean {
  return !parameter.fixed && parameter.standardError !== null
}

/**
 * Confidence band of the fitted curve by the delta method with the full covariance [°C].
 *
 * @param level such as 0.95
 * @returns null where there is no covariance or no curve
 */
export function bandAt(fit: DrawableFit, xs: readonly number[], level = 0.95): Band | null {
  const values = estimates(fit)
  if (!values || !fit.covariance) return null
  const model = models[fit.model as ModelName]
  const rows = fit.parameters.flatMap((parameter, j) => hasCovarianceRow(parameter) ? [j] : [])
  const gradient = new Float64Array(values.length)
  const isNormal = fit.degreesOfFreedom === undefined || fit.sdMeaning === 'absolute'
  const quantile = isNormal ? normalQuantile((1 + level) / 2) : studentQuantile((1 + level) / 2, fit.degreesOfFreedom!)
  const band: Band = { lower: [], upper: [] }
  for (const x of xs) {
    model.gradient(values, x, gradient, 0, 1)
    const reach = quantile * deltaStandardError(rows.map(j => gradient[j]!), fit.covariance)
    const middle = model.value(values, x)
    band.lower.push(middle - reach)
    band.upper.push(middle + reach)
  }
  return band
}
