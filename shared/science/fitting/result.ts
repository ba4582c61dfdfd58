/** From a solution on scaled axes to the answer of the fit route. */
import { units } from '../chemistry/units'
import { normalQuantile, studentQuantile } from '../numeric/distributions'
import { engine } from '../version'
import { conditionalIntervals, type Ends } from './conditional-intervals'
import { correlationOf, covarianceOf, deltaStandardError, type Covariance } from './covariance'
import { criteria } from './criteria'
import { refitInterval } from './refit-intervals'
import { parameterUnits, toOriginal } from './scale'
import { canProfile, indexOf, type Problem, type Solution } from './solve'
import type { DerivedQuantity, FitRequest, FitResult, FittedParameter, IntervalMethod, Residual } from './types'
import type { Weights } from './weights'

/** A solution with its covariance, before notes. */
export interface Analysis {
  request: FitRequest
  weights: Weights
  solution: Solution
  covariance: Covariance | null
  /** Free parameters of the model, those at a bound and undetermined ones included. */
  free: number[]
  degreesOfFreedom: number
  /** Variance of a whitened residual on scaled axes; null where no degree of freedom is left to estimate it. */
  variance: number | null
  level: number
}

export function analyse(request: FitRequest, weights: Weights, solution: Solution): Analysis {
  const { problem, stationary, columns } = solution
  const free = freeIndices(problem)
  const degreesOfFreedom = problem.data.n - free.length
  const isAbsolute = weights.sdMeaning === 'absolute'
  return {
    request, weights, solution, free, degreesOfFreedom,
    covariance: stationary && columns.length > 0 ? covarianceOf(stationary, problem.data.n, columns.length) : null,
    variance: degreesOfFreedom <= 0 ? null : isAbsolute ? 1 / problem.data.sumScale : solution.sum / degreesOfFreedom,
    level: request.confidence ?? 0.95,
  }
}

export function freeIndices({ held }: Problem): number[] {
  return Array.from(held.keys()).filter(j => Number.isNaN(held[j]))
}

export function toResult(analysis: Analysis): FitResult {
  const { request, weights, solution, free, degreesOfFreedom } = analysis
  const { data } = solution.problem
  const sum = solution.sum * data.sumScale
  const isAbsolute = weights.sdMeaning === 'absolute'
  const parameters = fittedParameters(analysis)
  const nameOf = (index: number) => solution.estimated.parameters[index]!.name
  const covariance = originalCovariance(analysis, nameOf)
  // From the covariance of unit variance: a perfect fit has none of its own, and the same correlation.
  const unitCovariance = covariance && originalCovariance({ ...analysis, variance: 1 }, nameOf)
  return {
    model: solution.problem.model.name,
    n: data.n,
    degreesOfFreedom,
    converged: solution.stopReason !== 'limit',
    stopReason: solution.stopReason,
    weighting: weights.weighting,
    sdMeaning: weights.sdMeaning,
    parameters,
    covariance,
    correlation: unitCovariance && correlationOf(unitCovariance),
    residualSumOfSquares: sum,
    residualStandardDeviation: degreesOfFreedom > 0 ? Math.sqrt(sum / degreesOfFreedom) : null,
    ...criteria(sum, data.n, free.length, isAbsolute),
    residuals: residualsOf(request, analysis),
    derived: derivedOf(analysis),
    notes: [],
    engine,
  }
}

/** Standard error of each coefficient of the estimated model on the original axes, by name. */
export function standardErrors({ solution, covariance, variance }: Analysis): Map<string, number> {
  const errors = new Map<string, number>()
  if (!covariance?.unscaled || variance === null) return errors
  const units = parameterUnits(solution.estimated, solution.problem.data)
  solution.columns.forEach((j, at) => {
    errors.set(solution.estimated.parameters[j]!.name, Math.sqrt(variance * covariance.unscaled![at]![at]!) * units[j]!)
  })
  return errors
}

/** Rows for those free parameters of the model that have a standard error, in its order. */
function originalCovariance({ solution, covariance, variance }: Analysis, nameOf: (index: number) => string): number[][] | null {
  if (!covariance?.unscaled || variance === null) return null
  const units = parameterUnits(solution.estimated, solution.problem.data)
  const kept = solution.columns.flatMap((j, at) => indexOf(solution.problem.model, nameOf(j)) >= 0 ? [at] : [])
  if (kept.length === 0) return null
  return kept.map(a => kept.map(b =>
    variance * covariance.unscaled![a]![b]! * units[solution.columns[a]!]! * units[solution.columns[b]!]!))
}

function fittedParameters(analysis: Analysis): FittedParameter[] {
  const { solution } = analysis
  const { problem, estimated } = solution
  const errors = standardErrors(analysis)
  const intervals = intervalsOf(analysis, errors)
  return problem.model.parameters.map(({ name, unit }, j) => {
    if (!Number.isNaN(problem.held[j])) {
      return { name, unit, estimate: toOriginal(problem.model, problem.data, j, problem.held[j]!), standardError: null, interval: null, fixed: true }
    }
    const at = indexOf(estimated, name)
    const isDetermined = at >= 0 && !(solution.end && estimated === problem.model && name !== 'T0')
    return {
      name, unit, fixed: false,
      estimate: isDetermined ? toOriginal(estimated, problem.data, at, solution.values[at]!) : null,
      standardError: errors.get(name) ?? null,
      interval: intervals.get(j) ?? null,
    }
  })
}

type Intervals = Map<number, NonNullable<FittedParameter['interval']>>

function intervalsOf(analysis: Analysis, errors: Map<string, number>): Intervals {
  const { solution, request, variance, level, weights, degreesOfFreedom, free } = analysis
  const { model, data } = solution.problem
  const intervals: Intervals = new Map()
  if (variance === null) return intervals
  const quantile = weights.sdMeaning === 'absolute' ? normalQuantile((1 + level) / 2) : studentQuantile((1 + level) / 2, degreesOfFreedom)
  const method: IntervalMethod = request.intervals ?? 'profile'
  const ends = method === 't' ? new Map<number, Ends>() : profileEnds(analysis, errors, variance * quantile * quantile)
  for (const j of free) {
    const { name } = model.parameters[j]!
    const found = ends.get(j)
    if (found) {
      intervals.set(j, { level, method, lower: endOn(analysis, j, found.lower), upper: endOn(analysis, j, found.upper) })
      continue
    }
    const at = indexOf(solution.estimated, name)
    const error = errors.get(name)
    if (error === undefined || at < 0) continue
    const estimate = toOriginal(solution.estimated, data, at, solution.values[at]!)
    // A straight-line model's profile is a parabola: both methods give the same ends.
    intervals.set(j, { level, method, lower: estimate - quantile * error, upper: estimate + quantile * error })
  }
  return intervals
}

function endOn({ solution: { problem } }: Analysis, index: number, value: number | null): number | null {
  return value === null || !Number.isFinite(value) ? null : toOriginal(problem.model, problem.data, index, value)
}

function profileEnds(analysis: Analysis, errors: Map<string, number>, delta: number): Map<number, Ends> {
  const { solution, free } = analysis
  const { problem } = solution
  const isCurved = problem.model.parameters.some((parameter, j) => parameter.isShape && Number.isNaN(problem.held[j]))
  const hasBounds = free.some(j => !problem.model.parameters[j]!.isShape && (problem.lower[j]! > -Infinity || problem.upper[j]! < Infinity))
  if (!isCurved && !hasBounds) return new Map()
  if (canProfile(problem) && !hasBounds) return conditionalIntervals(solution, delta)
  if (solution.end) return new Map()
  return refitEnds(analysis, errors, delta)
}

function refitEnds({ solution, free, covariance, variance }: Analysis, errors: Map<string, number>, delta: number): Map<number, Ends> {
  const { problem, values, objective } = solution
  const units = parameterUnits(problem.model, problem.data)
  const point = Float64Array.from(free, j => values[j]!)
  const bounds = { lower: Float64Array.from(free, j => problem.lower[j]!), upper: Float64Array.from(free, j => problem.upper[j]!) }
  if (!covariance || variance === null || objective.size !== free.length) return new Map()
  return new Map(free.map((j, at) => {
    const error = errors.get(problem.model.parameters[j]!.name)
    const step = error ? Math.sqrt(delta / variance) * error / units[j]! : 0.1 * (Math.abs(values[j]!) || 1)
    return [j, refitInterval(objective, point, bounds, at, step, solution.sum + delta)]
  }))
}

function residualsOf({ points }: FitRequest, { solution, covariance, variance }: Analysis): Residual[] {
  const { data } = solution.problem
  const model = solution.estimated
  return points.map(({ x, y }, i) => {
    const scaledFit = model.value(solution.values, data.x[i]!)
    const fitted = scaledFit * data.yScale + data.yOffset
    const leverage = covariance?.leverages?.[i] ?? null
    const whitened = (data.y[i]! - scaledFit) * data.root[i]!
    const free = leverage === null ? 0 : 1 - leverage
    const standardized = variance !== null && variance > 0 && free > 1e-9 ? whitened / Math.sqrt(variance * free) : null
    return { x, y, fitted, residual: y - fitted, standardized, leverage }
  })
}

function derivedOf(analysis: Analysis): DerivedQuantity[] {
  const { solution } = analysis
  const { problem: { model, data } } = solution
  if (solution.end) return limitSlope(analysis)
  const original = model.parameters.map((_, j) => toOriginal(model, data, j, solution.values[j]!))
  const covariance = originalCovariance(analysis, j => model.parameters[j]!.name)
  return model.derived(original).filter(({ value }) => Number.isFinite(value)).map(({ name, unit, value, gradient }) => ({
    name, unit, estimate: value,
    standardError: covariance && deltaStandardError(solution.columns.map(j => gradient[j]!), covariance),
  }))
}

/** The one derived quantity that outlives K → 0. */
function limitSlope(analysis: Analysis): DerivedQuantity[] {
  const { estimated, problem, values } = analysis.solution
  const j = indexOf(estimated, 'initialSlope')
  if (j < 0) return []
  return [{
    name: 'initialSlope', unit: units.initialSlope,
    estimate: toOriginal(estimated, problem.data, j, values[j]!),
    standardError: standardErrors(analysis).get('initialSlope') ?? null,
  }]
}
