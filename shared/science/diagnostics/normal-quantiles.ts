import { normalQuantile } from '../numeric/distributions'

export interface QuantilePoint {
  /** quantile of the standard normal distribution [1] */
  expected: number
  /** residual over the residual standard deviation [1] */
  observed: number
}

/**
 * Residuals in order against the normal quantiles of their ranks, at the plotting positions (i − 3/8)/(n + 1/4).
 *
 * @param residuals measured − fitted, of equal variance [K]
 * @param scale their standard deviation [K]
 * @source G. Blom, Statistical Estimates and Transformed Beta-Variables (1958), from memory
 */
export function normalQuantiles(residuals: readonly number[], scale: number): QuantilePoint[] {
  const ordered = [...residuals].sort((a, b) => a - b)
  return ordered.map((residual, index) => ({
    expected: normalQuantile((index + 1 - 0.375) / (ordered.length + 0.25)),
    observed: residual / scale,
  }))
}
