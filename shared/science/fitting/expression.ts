/** Fitting of a typed expression; an entry of its own because it needs the parser, which the browser does not load. */
import { compile, mostParameters, nameProblem, type Compiled } from '../expression/compile'
import { expressionObjective, type Budget, type ExpressionData } from '../expression/objective'
import { ScienceError, type InputProblem } from '../errors'
import type { Model } from '../models'
import { seededRandom } from '../random'
import { checkCounts, checkOptions, checkReadings, collect } from './check'
import { descend, type Bounds, type Descent } from './descend'
import { descendInLogarithms } from './logarithmic'
import { sumOfSquares, type Objective } from './objective'
import { withNotes } from './fit'
import { analyse, type Analysis } from './result'
import type { Solution } from './solve'
import type { ExpressionModel, FitRequest, FitResult, ParameterOptions, Point } from './types'
import { weightsOf } from './weights'

/** Elementary operations for the search, and again for the intervals: well under a second each on a quiet machine. */
const operationBudget = 5e7
const iterationLimit = 3_000
/** Starts that nobody chose get less patience. */
const trialIterationLimit = 300
const startsWithinBounds = 20
const startSeed = 20_260_101

export interface ExpressionInput {
  expression: string
  variables: readonly string[]
  /** One column for each variable. */
  predictors: readonly (readonly number[])[]
  y: readonly number[]
  parameters: Readonly<Record<string, ParameterOptions & { start: number }>>
}

/**
 * Fits y = expression in one variable.
 *
 * @throws ScienceError 'unusable-input' with every problem of the request
 */
export function fitExpression(request: FitRequest): FitResult {
  const model = request.model as ExpressionModel
  const parameters = mergedOptions(model, request.parameters)
  const problems = collect((report) => {
    checkReadings(request, report)
    checkExpression(model, request.parameters, report)
  })
  const names = Object.keys(parameters)
  const free = names.filter(name => parameters[name]!.fixed === undefined).length
  if (Array.isArray(request.points)) problems.push(...collect(report => checkCounts(request.points, free, report)))
  const compiled = names.some(name => nameProblem(name)) ? [] : compile(String(model.expression), [model.variable], names)
  if (Array.isArray(compiled)) problems.push(...compiled)
  if (problems.length > 0 || Array.isArray(compiled)) throw new ScienceError('unusable-input', problems)
  return fitCompiled(compiled, request, parameters, [request.points.map(({ x }) => x)])
}

/** The same for any number of predictors, with equal weights; points are numbered in place of x. */
export function fitExpressionOf({ expression, variables, predictors, y, parameters }: ExpressionInput): FitResult {
  const compiled = compile(expression, variables, Object.keys(parameters))
  if (Array.isArray(compiled)) throw new ScienceError('unusable-input', compiled)
  const points: Point[] = y.map((value, x) => ({ x, y: value }))
  return fitCompiled(compiled, { model: { expression, variable: variables[0]!, parameters }, points, weighting: 'none' }, parameters, predictors)
}

type Options = Record<string, ParameterOptions & { start: number }>

function mergedOptions(model: ExpressionModel, more: FitRequest['parameters'] = {}): Options {
  return Object.fromEntries(Object.entries(model.parameters ?? {}).map(([name, options]) => [name, { ...options, ...more[name] }]))
}

function checkExpression(model: ExpressionModel, more: FitRequest['parameters'] = {}, report: (path: string, message: string) => void): void {
  const variableProblem = nameProblem(String(model.variable))
  if (variableProblem) report('model.variable', variableProblem)
  const names = Object.keys(model.parameters ?? {})
  if (names.length === 0) report('model.parameters', 'declare at least one parameter with a start')
  if (names.length > mostParameters) report('model.parameters', `${names.length} parameters are too many; at most ${mostParameters}`)
  for (const name of Object.keys(more)) {
    if (!names.includes(name)) report(`parameters.${name}`, `the expression has no parameter ${name}; it has ${names.join(', ')}`)
  }
  for (const [name, options] of Object.entries(mergedOptions(model, more))) {
    const path = `model.parameters.${name}`
    const problem = name === model.variable ? 'is the variable; choose another name' : nameProblem(name)
    if (problem) report(path, problem)
    if (options.start === undefined) report(`${path}.start`, 'give a number to start from')
    checkOptions(options, path, false, report)
  }
}

function fitCompiled(compiled: Compiled, request: FitRequest, parameters: Options, predictors: readonly (readonly number[])[]): FitResult {
  const weights = weightsOf(request)
  const heaviest = weights.values ? Math.max(...weights.values) : 1
  const data: ExpressionData = {
    predictors: predictors.map(column => Float64Array.from(column)),
    y: Float64Array.from(request.points, ({ y }) => y),
    root: Float64Array.from(request.points, (_, i) => weights.values ? Math.sqrt(weights.values[i]! / heaviest) : 1),
  }
  const budget: Budget = { left: operationBudget }
  const solution = solveExpression(compiled, data, parameters, budget, heaviest)
  const isExhausted = budget.left < 0
  budget.left = operationBudget
  const analysis: Analysis = analyse(request, weights, isExhausted ? { ...solution, stopReason: 'limit' } : solution)
  const result = withNotes(analysis)
  return budget.left < 0 ? withoutIntervals(result) : result
}

/** Intervals that ran out of budget say nothing; the rest of the answer stands. */
function withoutIntervals(result: FitResult): FitResult {
  return { ...result, parameters: result.parameters.map(parameter => ({ ...parameter, interval: null })) }
}

function solveExpression(compiled: Compiled, data: ExpressionData, options: Options, budget: Budget, heaviest: number): Solution {
  const held = Float64Array.from(compiled.parameters, name => options[name]!.fixed ?? NaN)
  const free = Array.from(held.keys()).filter(j => Number.isNaN(held[j]))
  const objective = expressionObjective(compiled, data, held, budget)
  const lower = Float64Array.from(compiled.parameters, name => options[name]!.min ?? -Infinity)
  const upper = Float64Array.from(compiled.parameters, name => options[name]!.max ?? Infinity)
  const bounds: Bounds = { lower: Float64Array.from(free, j => lower[j]!), upper: Float64Array.from(free, j => upper[j]!) }
  const given = Float64Array.from(free, j => options[compiled.parameters[j]!]!.start)
  let best = startingPoint(objective, given, data)
  for (const start of [given, ...startsInside(given, bounds)]) {
    const found = start === given ? descendPatiently(objective, start, bounds) : descend(objective, start, bounds, trialIterationLimit)
    if (Number.isFinite(found.sum) && (best.isStart || found.sum < best.sum * (1 - 1e-12))) best = { ...found, isStart: false }
    if (budget.left < 0) break
  }
  const values = held.slice()
  free.forEach((j, at) => (values[j] = best.point[at]!))
  const model = expressionAsModel(compiled, data)
  return {
    problem: { model, held, lower, upper, data: { n: data.y.length, x: data.y.map((_, i) => i), y: data.y, root: data.root, xScale: 1, yScale: 1, yOffset: 0, sumScale: heaviest } },
    estimated: model, values, objective, sum: best.sum, end: null, stopReason: best.stopReason,
    columns: best.inside.map(at => free[at]!), stationary: best.stationary,
  }
}

/** A descent that only reached its limit tries once more by way of the logarithms. */
function descendPatiently(objective: Objective, start: Float64Array, bounds: Bounds): Descent {
  const found = descend(objective, start, bounds, iterationLimit)
  if (found.stopReason !== 'limit') return found
  const further = descendInLogarithms(objective, start, iterationLimit)
  if (!further) return found
  const again = descend(objective, further, bounds, iterationLimit)
  return again.sum < found.sum ? again : found
}

/** The given start as a place to fall back on. @throws ScienceError where the expression is not a finite number there */
function startingPoint(objective: Objective, start: Float64Array, data: ExpressionData): Descent & { isStart: boolean } {
  const out = new Float64Array(data.y.length)
  objective.residuals(start, out)
  const bad = out.findIndex(value => !Number.isFinite(value))
  if (bad < 0) return { point: start, sum: sumOfSquares(out), stationary: null, inside: Array.from(start.keys()), stopReason: 'limit', isStart: true }
  const at = data.predictors.map(column => column[bad]).join(', ')
  const problem: InputProblem = { path: 'model.parameters', message: `at the starts the expression is not a finite number for point ${bad + 1} (${at}); choose other starts` }
  throw new ScienceError('unusable-input', [problem])
}

/** Seeded places between the bounds; a parameter without both bounds is tried at up to ten times its start either way. */
function startsInside(given: Float64Array, { lower, upper }: Bounds): Float64Array[] {
  const isBounded = given.some((_, j) => lower[j]! > -Infinity || upper[j]! < Infinity)
  if (!isBounded) return []
  const random = seededRandom(startSeed)
  return Array.from({ length: startsWithinBounds }, () => given.map((start, j) => {
    const share = random.uniform()
    if (lower[j]! > -Infinity && upper[j]! < Infinity) return lower[j]! + share * (upper[j]! - lower[j]!)
    return Math.min(Math.max(start * 10 ** (2 * share - 1), lower[j]!), upper[j]!)
  }))
}

/** Readings are addressed by their number, so that any number of predictors fits the interface. */
function expressionAsModel({ tape, value, parameters }: Compiled, { predictors }: ExpressionData): Model {
  const room = tape.workspace()
  const stride = room.length / tape.length
  return {
    name: 'expression',
    parameters: parameters.map(name => ({ name, unit: '', yPower: 0, xPower: 0, isShape: true })),
    value(values, index) {
      predictors.forEach((column, at) => (room[at * stride] = column[index]!))
      for (let j = 0; j < values.length; j++) room[(predictors.length + j) * stride] = values[j]!
      tape.run(room, 1, value)
      return room[value * stride]!
    },
    gradient: () => {
      throw new Error('the gradient of an expression comes from its objective')
    },
    derived: () => [],
  }
}
