/** Looks at a whole request before any arithmetic and collects every problem in it. */
import type { InputProblem } from '../errors'
import { models } from '../models'
import { modelNames, weightings, type FitRequest, type ParameterOptions, type Point } from './types'

/** Beyond these a number is a slip of the unit or of the keyboard. */
const largestValue = 1e12
const smallestSd = 1e-9
const largestSampleCount = 1e6

export type Report = (path: string, message: string) => void

/** What a list of points and the options around it must satisfy whatever the model. */
export function checkReadings(request: FitRequest, report: Report): void {
  if (!Array.isArray(request.points)) return report('points', 'must be a list of points { x, y }')
  request.points.forEach((point, i) => checkPoint(point, `points.${i}`, report))
  checkWeighting(request, report)
  const { confidence } = request
  if (confidence !== undefined && !(confidence >= 0.5 && confidence <= 0.9999)) {
    report('confidence', 'must lie between 0.5 and 0.9999; the usual level is 0.95')
  }
  if (request.intervals !== undefined && request.intervals !== 'profile' && request.intervals !== 't') {
    report('intervals', 'must be profile or t')
  }
}

function checkPoint(point: Point, path: string, report: Report): void {
  if (typeof point !== 'object' || point === null) return report(path, 'must be a point { x, y }')
  checkNumber(point.x, `${path}.x`, 'concentration', report)
  checkNumber(point.y, `${path}.y`, 'cloud point', report)
  const { sd, n } = point
  if (sd !== undefined) {
    if (!isUsable(sd) || sd < 0) report(`${path}.sd`, 'the standard uncertainty must be a number of kelvin, 0 or more; leave it out if it is not known')
    else if (sd > 0 && sd < smallestSd) report(`${path}.sd`, `the standard uncertainty must be 0 or at least ${smallestSd} K; check the unit`)
  }
  if (n !== undefined && !(Number.isInteger(n) && n >= 1 && n <= largestSampleCount)) {
    report(`${path}.n`, `the number of independent samples must be a whole number from 1 to ${largestSampleCount}; leave it out if it is not known`)
  }
}

function checkNumber(value: unknown, path: string, what: string, report: Report): void {
  if (typeof value !== 'number' || !Number.isFinite(value)) report(path, `the ${what} must be a finite number`)
  else if (Math.abs(value) > largestValue) report(path, `the ${what} ${value} is too large to be meant; check the unit`)
}

export function isUsable(value: unknown): value is number {
  return typeof value === 'number' && Number.isFinite(value) && Math.abs(value) <= largestValue
}

function checkWeighting({ points, weighting, sdMeaning }: FitRequest, report: Report): void {
  if (weighting !== undefined && !weightings.includes(weighting)) report('weighting', `must be one of ${weightings.join(', ')}`)
  if (sdMeaning !== undefined && sdMeaning !== 'relative' && sdMeaning !== 'absolute') report('sdMeaning', 'must be relative or absolute')
  const without = (key: 'sd' | 'n') => points.flatMap((point, i) => point?.[key] === undefined ? [i + 1] : [])
  if (weighting === 'sd' || sdMeaning === 'absolute') {
    const missing = without('sd')
    if (missing.length > 0) report(sdMeaning === 'absolute' ? 'sdMeaning' : 'weighting', `every point needs an sd; ${listed(missing)} without one. Give them, or choose another weighting`)
  }
  if (weighting === 'replicates') {
    const missing = without('n')
    if (missing.length > 0) report('weighting', `every point needs n, its number of samples; ${listed(missing)} without one. Give them, or choose another weighting`)
  }
  if (sdMeaning === 'absolute' && (weighting === 'none' || weighting === 'replicates')) {
    report('sdMeaning', 'absolute sds can only be used as weights: choose the weighting sd, or sdMeaning relative')
  }
}

function listed(numbers: readonly number[]): string {
  const shown = numbers.slice(0, 5).join(', ')
  if (numbers.length === 1) return `point ${shown} is`
  return numbers.length > 5 ? `points ${shown} and ${numbers.length - 5} more are` : `points ${shown} are`
}

/** What the named models ask of concentrations, parameters and their number. */
export function checkNamed(request: FitRequest, report: Report): void {
  if (typeof request.model !== 'string' || !modelNames.includes(request.model)) {
    return report('model', `must be one of ${modelNames.join(', ')}, or an expression`)
  }
  request.points.forEach((point: Point | null, i) => {
    if (isUsable(point?.x) && point.x < 0) report(`points.${i}.x`, `the concentration ${point.x} is negative; a concentration is 0 or more`)
  })
  const known = models[request.model].parameters
  for (const [name, options] of Object.entries(request.parameters ?? {})) {
    const definition = known.find(parameter => parameter.name === name)
    if (!definition) report(`parameters.${name}`, `the model ${request.model} has no parameter ${name}; it has ${known.map(parameter => parameter.name).join(', ')}`)
    else checkOptions(options, `parameters.${name}`, definition.isShape ?? false, report)
  }
  const fixed = known.filter(({ name }) => request.parameters?.[name]?.fixed !== undefined).length
  checkCounts(request.points, known.length - fixed, report)
}

/** One parameter's options: finite, in order, and in agreement with each other. */
export function checkOptions(options: ParameterOptions, path: string, isPositive: boolean, report: Report): void {
  const { fixed, min, max, start } = options
  const unusable = Object.entries({ fixed, min, max, start }).filter(([, value]) => value !== undefined && !isUsable(value))
  for (const [key] of unusable) report(`${path}.${key}`, 'must be a finite number')
  if (unusable.length > 0) return
  if (min !== undefined && max !== undefined && !(min < max)) {
    report(path, `min ${min} is not below max ${max}; swap them, or fix the parameter`)
    return
  }
  for (const [key, value] of Object.entries({ fixed, start })) {
    if (value === undefined) continue
    if (min !== undefined && value < min) report(`${path}.${key}`, `${value} lies below min ${min}; move one of them`)
    if (max !== undefined && value > max) report(`${path}.${key}`, `${value} lies above max ${max}; move one of them`)
  }
  if (!isPositive) return
  if (fixed !== undefined && fixed <= 0) report(`${path}.fixed`, 'must be above 0; for no binding choose the model linear')
  if (max !== undefined && max <= 0) report(`${path}.max`, 'must be above 0')
}

/** Enough readings, at enough different places, for the free parameters. */
export function checkCounts(points: readonly Point[], free: number, report: Report): void {
  if (points.length === 0) return report('points', `there are no points; ${free} free parameters need at least ${free}`)
  if (free === 0) return report('parameters', 'every parameter is fixed; leave at least one free')
  const distinct = new Set(points.map(point => point?.x)).size
  if (points.length < free) report('points', `${points.length} ${points.length === 1 ? 'point is' : 'points are'} too few for ${free} free parameters; add readings, fix a parameter or choose a smaller model`)
  else if (distinct < free) report('points', `${distinct === 1 ? 'all points have the same concentration' : `the points have only ${distinct} different concentrations`}; ${free} free parameters need at least ${free}`)
}

/** Runs checks and gives back everything they found. */
export function collect(run: (report: Report) => void): InputProblem[] {
  const problems: InputProblem[] = []
  run((path, message) => problems.push({ path, message }))
  return problems
}
