import { curveAt, hasCovarianceRow, type DrawableFit, type ModelName } from '../fitting'
import { deltaStandardError } from '../fitting/covariance'
import { models } from '../models'

/** A value with its standard error; null where the fit has no covariance. */
export interface Estimate {
  value: number
  standardError: number | null
}

/**
 * Shift of the cloud point by the salt, d(x) = f(x) − f(0), with the full covariance [K].
 *
 * @param x concentration [mol/L]
 * @returns null where the fit leaves a constant open
 */
export function shiftAt(fit: DrawableFit, x: number): Estimate | null {
  const curve = curveAt(fit, [0, x])
  if (!curve) return null
  const value = curve[1]! - curve[0]!
  if (!fit.covariance) return { value, standardError: null }
  const model = models[fit.model as ModelName]
  const estimates = fit.parameters.map(parameter => parameter.estimate!)
  const gradient = new Float64Array(estimates.length)
  const origin = new Float64Array(estimates.length)
  model.gradient(estimates, x, gradient, 0, 1)
  model.gradient(estimates, 0, origin, 0, 1)
  const free = fit.parameters.flatMap((parameter, index) => hasCovarianceRow(parameter) ? [gradient[index]! - origin[index]!] : [])
  return { value, standardError: deltaStandardError(free, fit.covariance) }
}
