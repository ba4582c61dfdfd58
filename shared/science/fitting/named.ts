import { ScienceError } from '../errors'
import { models, type Model } from '../models'
import { checkNamed, checkReadings, collect } from './check'
import { analyse, toResult, type Analysis } from './result'
import { scaleData, toScaled, type ScaledData } from './scale'
import { solve, type Problem } from './solve'
import type { FitRequest, FitResult, ModelName, ParameterOptions } from './types'
import { weightsOf } from './weights'

/** Where cooperativity is looked for when nobody says otherwise; beyond it the curve is a step or a power. */
export const usualCooperativity = { min: 0.25, max: 8 }

/** The answer alone, for those who only compare numbers. */
export function fitWithoutNotes(request: FitRequest): FitResult {
  return toResult(analyseNamed(request))
}

export function analyseNamed(request: FitRequest): Analysis {
  const problems = collect((report) => {
    checkReadings(request, report)
    if (Array.isArray(request.points)) checkNamed(request, report)
  })
  if (problems.length > 0) throw new ScienceError('unusable-input', problems)
  const weights = weightsOf(request)
  const data = scaleData(request.points.map(point => point.x), request.points.map(point => point.y), weights.values)
  return analyse(request, weights, solve(problemOf(models[request.model as ModelName], data, request.parameters ?? {})))
}

/** Options in units of the readings → a problem on scaled axes. */
export function problemOf(model: Model, data: ScaledData, options: Readonly<Record<string, ParameterOptions>>): Problem {
  const count = model.parameters.length
  const held = new Float64Array(count).fill(NaN)
  const lower = new Float64Array(count).fill(-Infinity)
  const upper = new Float64Array(count).fill(Infinity)
  model.parameters.forEach(({ name, isShape }, j) => {
    const { fixed, min, max } = { ...(name === 'h' ? usualCooperativity : {}), ...options[name] }
    if (fixed !== undefined) held[j] = toScaled(model, data, j, fixed)
    if (isShape) lower[j] = 0
    if (min !== undefined && !(isShape && min <= 0)) lower[j] = toScaled(model, data, j, min)
    if (max !== undefined) upper[j] = toScaled(model, data, j, max)
  })
  return { model, data, held, lower, upper }
}
