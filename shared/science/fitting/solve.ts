/** From scaled readings to the best point of a named model: profile, trial steps, polish. */
import type { Model } from '../models'
import { strongBinding, strongBindingPlateau, weakBinding, weakBindingLine } from '../models/limits'
import { descendFrom, stopReasonOf, type Bounds } from './descend'
import { columnLengths, marquardt } from './marquardt'
import { modelObjective, type Objective } from './objective'
import { polish, type Stationary } from './polish'
import { BindingProfile, profileRange } from './profile'
import type { ScaledData } from './scale'
import { searchShapes } from './search'
import type { StopReason } from './types'

/** A named model with what is asked of its parameters, all on scaled axes; NaN in `held` marks a free parameter. */
export interface Problem {
  model: Model
  data: ScaledData
  held: Float64Array
  lower: Float64Array
  upper: Float64Array
}

export type End = 'zero' | 'infinity'

export interface Solution {
  problem: Problem
  /** The model whose coefficients were estimated: the limit's where no finite optimum exists. */
  estimated: Model
  /** Values of every parameter of `estimated`, scaled; NaN where not determined. */
  values: Float64Array
  /** Index in `estimated` of each column of `stationary`. */
  columns: number[]
  stationary: Stationary | null
  objective: Objective
  sum: number
  end: End | null
  stopReason: StopReason
}

/** Trial steps from the profiled start, which is already the optimum to many digits. */
const profiledIterations = 1
const profiledDamping = 1e-7
const boundedIterations = 300

export function indexOf(model: Model, name: string): number {
  return model.parameters.findIndex(parameter => parameter.name === name)
}

export function solve(problem: Problem): Solution {
  const { model } = problem
  const shapes = model.parameters.flatMap((parameter, j) => parameter.isShape && Number.isNaN(problem.held[j]) ? [j] : [])
  const hasLinearBounds = model.parameters.some((parameter, j) =>
    !parameter.isShape && Number.isNaN(problem.held[j]) && (problem.lower[j]! > -Infinity || problem.upper[j]! < Infinity))
  const isProfiled = canProfile(problem)
  if (shapes.length === 0 && !hasLinearBounds) return refine(problem, new Float64Array(freeCount(problem)))
  if (isProfiled && !hasLinearBounds) return solveByProfile(problem)
  return solveBySearch(problem, shapes)
}

/** K is the only free shape, Bmax is free, and the model has the plain binding term. */
export function canProfile({ model, held }: Problem): boolean {
  if (model.name === 'expression') return false
  const k = indexOf(model, 'K')
  const bmax = indexOf(model, 'Bmax')
  return k >= 0 && Number.isNaN(held[k]) && Number.isNaN(held[bmax]) && indexOf(model, 'h') < 0
}

function freeCount({ held }: Pick<Problem, 'held'>): number {
  let count = 0
  for (const value of held) if (Number.isNaN(value)) count++
  return count
}

export function profileOf({ model, data, held }: Problem): BindingProfile {
  const c = indexOf(model, 'c')
  return new BindingProfile(data, {
    level: Number.isNaN(held[0]) ? null : held[0]!,
    slope: c < 0 ? 0 : Number.isNaN(held[c]) ? null : held[c]!,
  })
}

function solveByProfile(problem: Problem): Solution {
  const k = indexOf(problem.model, 'K')
  const profile = profileOf(problem)
  const minimum = profile.minimum(profileRange(problem.data, problem.lower[k]!, problem.upper[k]!))
  if (typeof minimum.at === 'string') return solveLimit(problem, minimum.at)
  if (minimum.isAtBound) return solveAtBound(problem, k, Math.exp(minimum.at))
  return refine(problem, startFrom(problem, profile, minimum.at))
}

/** The free parameters at the lowest point of the profile, in the model's order. */
function startFrom({ model, held }: Problem, profile: BindingProfile, logK: number): Float64Array {
  const { level, slope, saturation } = profile.linearAt(logK)
  const values: Readonly<Record<string, number>> = { T0: level, c: slope, Bmax: saturation, K: Math.exp(logK) }
  const start = new Float64Array(freeCount({ held }))
  let at = 0
  for (let j = 0; j < held.length; j++) if (Number.isNaN(held[j])) start[at++] = values[model.parameters[j]!.name]!
  return start
}

function refine(problem: Problem, start: Float64Array): Solution {
  const objective = modelObjective(problem.model, problem.data, problem.held)
  const scales = new Float64Array(objective.size)
  const jacobian = new Float64Array(objective.readings * objective.size)
  objective.jacobian(start, jacobian)
  columnLengths(jacobian, objective.readings, objective.size, scales)
  const moved = objective.size > 0 && objective.readings > 1
    ? marquardt(objective).step(start, scales, profiledDamping, profiledIterations)
    : null
  const stationary = polish(objective, moved ?? start)
  return finish(problem, problem.model, objective, stationary, null, stopReasonOf(stationary, false))
}

function finish(problem: Problem, estimated: Model, objective: ReturnType<typeof modelObjective>, stationary: Stationary, end: End | null, stopReason: StopReason): Solution {
  const values = objective.complete(stationary.point).slice()
  const held = end ? limitHeld(problem, estimated) : problem.held
  const columns: number[] = []
  for (let j = 0; j < held.length; j++) if (Number.isNaN(held[j])) columns.push(j)
  return { problem, estimated, values, columns, stationary, objective, sum: stationary.sum, end, stopReason }
}

function solveAtBound(problem: Problem, index: number, value: number): Solution {
  const held = problem.held.slice()
  held[index] = value
  const inner = refine({ ...problem, held }, new Float64Array(freeCount({ ...problem, held })))
  return { ...inner, problem, stopReason: 'bound' }
}

function limitHeld(problem: Problem, limit: Model): Float64Array {
  return Float64Array.from(limit.parameters, ({ name }) => {
    const j = indexOf(problem.model, name)
    if (j >= 0) return problem.held[j]!
    // A limit model has a slope even where the model has none.
    return name === 'c' ? 0 : NaN
  })
}

function limitModel(problem: Problem, end: End): Model {
  const c = indexOf(problem.model, 'c')
  const hasFreeSlope = c >= 0 && Number.isNaN(problem.held[c])
  if (end === 'zero') return hasFreeSlope ? weakBinding : weakBindingLine
  const hasBlanks = problem.data.x.includes(0)
  return hasBlanks || !Number.isNaN(problem.held[0]) ? strongBinding : strongBindingPlateau
}

function solveLimit(problem: Problem, end: End): Solution {
  const estimated = limitModel(problem, end)
  const objective = modelObjective(estimated, problem.data, limitHeld(problem, estimated))
  const stationary = polish(objective, new Float64Array(objective.size))
  return finish(problem, estimated, objective, stationary, end, 'no-finite-optimum')
}

/** Everything the profile does not cover: bounds on linear parameters, a held Bmax, cooperativity. */
function solveBySearch(problem: Problem, shapes: number[]): Solution {
  const objective = modelObjective(problem.model, problem.data, problem.held)
  const free = Array.from(problem.held.keys()).filter(j => Number.isNaN(problem.held[j]))
  const { starts, end } = searchShapes(problem, shapes)
  const bounds: Bounds = {
    lower: Float64Array.from(free, j => problem.lower[j]!),
    upper: Float64Array.from(free, j => problem.upper[j]!),
  }
  let best: Solution | null = null
  for (const start of starts) {
    const found = descendFrom(objective, Float64Array.from(free, j => start[j]!), bounds, 1e-3, boundedIterations)
    if (best && !(found.sum < best.sum)) continue
    const values = problem.held.slice()
    free.forEach((j, at) => (values[j] = found.point[at]!))
    best = {
      problem, estimated: problem.model, values, objective, sum: found.sum, end: null, stopReason: found.stopReason,
      columns: found.inside.map(at => free[at]!), stationary: found.stationary,
    }
  }
  return end && (!best || !(best.sum < end.sum)) ? withoutOptimum(problem, objective, end.values, end.sum, end.end) : best!
}

/** Only T0 outlives a limit here: the rest depends on how far the search went. */
function withoutOptimum(problem: Problem, objective: Objective, values: Float64Array, sum: number, end: End): Solution {
  return { problem, estimated: problem.model, values, columns: [], stationary: null, objective, sum, end, stopReason: 'no-finite-optimum' }
}
