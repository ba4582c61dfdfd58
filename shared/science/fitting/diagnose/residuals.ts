import { upperTailOfChiSquare, upperTailOfF } from '../../numeric/distributions'
import { fewRuns } from '../../numeric/runs'
import { shapiroWilk } from '../../numeric/shapiro-wilk'
import type { FitNote } from '../types'
import { isExact, note, type Diagnosis, type Subject } from './note'
import { thresholds } from './thresholds'

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
