import { upperTailOfChiSquare, upperTailOfF } from '../../numeric/distributions'
import { fewRuns } from '../../numeric/runs'
import { shapiroWilk } from '../../numeric/shapiro-wilk'
import { parameterUnits } from '../scale'
import type { FitNote } from '../types'
import { note, type Diagnosis, type Subject } from './note'
import { largestUsualShift, thresholds } from './thresholds'

/** Whether the residuals look like noise. */
export const residualChecks: Diagnosis = subject => [...pattern(subject), ...normality(subject), ...replicates(subject), ...absoluteMisfit(subject)]

function pattern({ analysis, result }: Subject): FitNote[] {
  if (analysis.degreesOfFreedom < thresholds.degreesOfFreedom || isExact(analysis)) return []
  const byPlace = [...result.residuals].sort((a, b) => a.x - b.x)
  const found = fewRuns(byPlace.map(({ residual }) => residual))
  return found && found.probability < thresholds.residualProbability ? [note('pattern-in-residuals', 'caution', { ...found })] : []
}

function normality({ analysis, result }: Subject): FitNote[] {
  if (analysis.degreesOfFreedom < thresholds.degreesOfFreedom || isExact(analysis)) return []
  const values = result.residuals.flatMap(({ standardized }) => standardized === null ? [] : [standardized])
  const found = values.length >= thresholds.normalityValues ? shapiroWilk(values) : null
  return found && found.probability < thresholds.residualProbability ? [note('not-normal', 'caution', { ...found })] : []
}

/** Residuals at the level of rounding carry no message. */
function isExact({ solution }: Subject['analysis']): boolean {
  return solution.sum < 1e-24 * solution.problem.data.n
}

/** Scatter between replicates beside that about the curve. */
function replicates({ analysis, result }: Subject): FitNote[] {
  const { weights, free } = analysis
  const groups = new Map<number, { residual: number, weight: number }[]>()
  result.residuals.forEach(({ x, residual }, i) => {
    const reading = { residual, weight: weights.values?.[i] ?? 1 }
    groups.set(x, [...groups.get(x) ?? [], reading])
  })
  let pure = 0
  for (const group of groups.values()) {
    const total = group.reduce((sum, { weight }) => sum + weight, 0)
    const mean = group.reduce((sum, { weight, residual }) => sum + weight * residual, 0) / total
    pure += group.reduce((sum, { weight, residual }) => sum + weight * (residual - mean) ** 2, 0)
  }
  const pureFreedom = result.n - groups.size
  const misfitFreedom = groups.size - free.length
  if (pureFreedom < thresholds.replicateFreedom || misfitFreedom < 1 || !(pure > 0)) return []
  const f = (result.residualSumOfSquares - pure) / misfitFreedom / (pure / pureFreedom)
  const probability = upperTailOfF(f, misfitFreedom, pureFreedom)
  return probability < thresholds.residualProbability ? [note('lack-of-fit', 'caution', { f, probability, levels: groups.size })] : []
}

/** Residuals larger than absolute sds allow. */
function absoluteMisfit({ analysis, result }: Subject): FitNote[] {
  if (analysis.weights.sdMeaning !== 'absolute' || analysis.degreesOfFreedom < 1) return []
  const probability = upperTailOfChiSquare(result.residualSumOfSquares, analysis.degreesOfFreedom)
  return probability < thresholds.residualProbability ? [note('lack-of-fit', 'caution', { chiSquare: result.residualSumOfSquares, probability })] : []
}

/**
 * The reading whose removal moves a constant furthest, by one Gauss–Newton step from the optimum:
 * Δθ = −C·Jᵢ·rᵢ/(1 − hᵢ), exact for linear models.
 *
 * @source Cook & Weisberg, Residuals and Influence in Regression (1982), 3.3 and 5.2
 */
export const influence: Diagnosis = ({ analysis, result }) => {
  const { solution, covariance, variance, degreesOfFreedom } = analysis
  const { stationary, columns, estimated, problem: { data } } = solution
  if (!stationary || !covariance?.unscaled || variance === null || !(variance > 0) || degreesOfFreedom < thresholds.degreesOfFreedom || isExact(analysis)) return []
  let furthest = { reading: 0, column: 0, shift: 0, change: 0 }
  for (let i = 0; i < data.n; i++) {
    const free = 1 - covariance.leverages![i]!
    if (free < 1e-6) continue
    for (let a = 0; a < columns.length; a++) {
      let change = 0
      for (let b = 0; b < columns.length; b++) change += covariance.unscaled[a]![b]! * stationary.jacobian[b * data.n + i]!
      change *= stationary.residuals[i]! / free
      const shift = Math.abs(change) / Math.sqrt(variance * covariance.unscaled[a]![a]!)
      if (shift > furthest.shift) furthest = { reading: i, column: a, shift, change }
    }
  }
  if (furthest.shift <= largestUsualShift(data.n, columns.length)) return []
  const { x, y } = result.residuals[furthest.reading]!
  const index = columns[furthest.column]!
  return [note('one-point-decides', 'caution', {
    reading: furthest.reading + 1, x, y, parameter: estimated.parameters[index]!.name, shift: furthest.shift,
    change: furthest.change * parameterUnits(estimated, data)[index]!,
  })]
}
