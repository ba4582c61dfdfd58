/**
 * Source: NIST Statistical Reference Datasets, nonlinear regression (National Institute of Standards and Technology),
 * certified to 11 digits; see data/nist-strd/README.md.
 */
import { describe, expect, it } from 'vitest'
import { fitExpressionOf } from '#shared/science/fitting/expression'
import { fewestDigits, readFolder } from './data'

interface Certificate {
  name: string
  expression: string
  response: 'y' | 'ln(y)'
  predictors: string[]
  parameters: string[]
  starts: number[][]
  dof: number
  x: (number | number[])[]
  y: number[]
  recomputed: { values: string[], standardDeviations: string[], residualSumOfSquares: string, residualStandardDeviation: string }
}

const estimateDigits = 8
const standardErrorDigits = 6
/** Exact data: the residuals of Lanczos1 are rounding, so its S and standard errors cannot be reached in doubles. */
const withoutReachableErrors = ['Lanczos1']

const problems = readFolder<Certificate>('nist-strd')
const runs = problems.flatMap(problem => problem.starts.map((start, at) => ({ ...problem, start, from: at + 1 })))

function fitFrom(problem: Certificate, start: number[]) {
  return fitExpressionOf({
    expression: problem.expression,
    variables: problem.predictors,
    predictors: problem.predictors.map((_, k) => problem.x.map(row => Array.isArray(row) ? row[k]! : row)),
    y: problem.response === 'ln(y)' ? problem.y.map(Math.log) : problem.y,
    parameters: Object.fromEntries(problem.parameters.map((name, j) => [name, { start: start[j]! }])),
  })
}

describe('fitExpressionOf, against the NIST StRD certificates', () => {
  it('is checked on all twenty-one problems', () => {
    expect(problems).toHaveLength(21)
  })

  it.each(runs)('agrees with the certificate of $name from start $from', (problem) => {
    const result = fitFrom(problem, problem.start)
    const { recomputed } = problem
    expect(result.converged).toBe(true)
    expect(result.degreesOfFreedom).toBe(problem.dof)
    expect(fewestDigits(result.parameters.map(parameter => parameter.estimate), recomputed.values)).toBeGreaterThanOrEqual(estimateDigits)
    if (withoutReachableErrors.includes(problem.name)) return
    expect(fewestDigits(result.parameters.map(parameter => parameter.standardError), recomputed.standardDeviations)).toBeGreaterThanOrEqual(standardErrorDigits)
    expect(fewestDigits([result.residualSumOfSquares], [recomputed.residualSumOfSquares])).toBeGreaterThanOrEqual(estimateDigits)
    expect(fewestDigits([result.residualStandardDeviation], [recomputed.residualStandardDeviation])).toBeGreaterThanOrEqual(estimateDigits)
  })
})
