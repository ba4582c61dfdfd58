/** The parts of a shared fit on common axes, and the fit of each for given shared constants. */
import { problemOf } from '../fitting/named'
import { scaleData, type ScaledData } from '../fitting/scale'
import { indexOf, solve, type Problem, type Solution } from '../fitting/solve'
import type { FitRequest } from '../fitting/types'
import { weightsOf, type Weights } from '../fitting/weights'
import { models } from '../models'
import { triangularize } from '../numeric/qr'
import type { SharedRequest } from './types'

/** One series: its problem, and which tied constant stands for which of its parameters. */
export interface Block {
  problem: Problem
  /** [place in the model, place among the ties] */
  tied: [parameter: number, tie: number][]
}

/** Blanks: the level of one tie, nothing else. */
export interface BlankBlock {
  data: ScaledData
  tie: number
}

export interface Assembly {
  blocks: Block[]
  blanks: BlankBlock[]
  weights: Weights
  /** the common axes */
  data: ScaledData
  ties: number
}

export function assemble({ series, ties, blanks = [], weighting, sdMeaning }: SharedRequest): Assembly {
  const points = [...series.flatMap(one => one.points), ...blanks.flatMap(one => one.points)]
  const request: FitRequest = { model: 'linear', points, ...(weighting && { weighting }), ...(sdMeaning && { sdMeaning }) }
  const weights = weightsOf(request)
  const data = scaleData(points.map(({ x }) => x), points.map(({ y }) => y), weights.values)
  let from = 0
  const next = (count: number): ScaledData => {
    const [start, end] = [from, from += count]
    return { ...data, n: count, x: data.x.slice(start, end), y: data.y.slice(start, end), root: data.root.slice(start, end) }
  }
  const blocks = series.map(({ id, model, points: own, parameters = {} }): Block => {
    const problem = problemOf(models[model], next(own.length), parameters)
    const tied = ties.flatMap((tie, t): [number, number][] => tie.series.includes(id) ? [[indexOf(problem.model, tie.parameter), t]] : [])
    return { problem, tied }
  })
  return {
    blocks, weights, data, ties: ties.length,
    blanks: blanks.map(({ points: own, series: ids }) => ({ data: next(own.length), tie: ties.findIndex(tie => tie.parameter === 'T0' && ids.every(id => tie.series.includes(id))) })),
  }
}

/** The best fit of a block's own constants where the tied ones are given (scaled). */
export function solveBlock({ problem, tied }: Block, shared: Float64Array): Solution {
  const held = problem.held.slice()
  for (const [parameter, tie] of tied) held[parameter] = shared[tie]!
  return solve({ ...problem, held })
}

/** What a solved block says about the tied constants: rows of a triangle and of the residuals turned with it. */
export interface Elimination {
  ties: number[]
  own: number
  /** upper triangle of the QR of [own | tied] columns, column-major with `rows` rows */
  triangle: Float64Array
  rows: number
  turned: Float64Array
}

/** Takes a block's own constants out: what is left of its residuals depends on the tied ones alone. */
export function eliminate({ problem: { data, model }, tied }: Block, { estimated, values, stationary, columns }: Solution): Elimination {
  // In a limit another model is estimated, in which a constant may stand elsewhere, or not at all.
  const places = tied.map(([parameter]) => indexOf(estimated, model.parameters[parameter]!.name))
  const own = stationary ? columns.length : 0
  const width = own + tied.length
  const rows = Math.max(data.n, width)
  const triangle = new Float64Array(rows * width)
  const turned = new Float64Array(rows)
  const gradient = new Float64Array(values.length)
  for (let i = 0; i < data.n; i++) {
    for (let j = 0; j < own; j++) triangle[j * rows + i] = stationary!.jacobian[j * data.n + i]!
    estimated.gradient(values, data.x[i]!, gradient, 0, 1)
    places.forEach((place, q) => (triangle[(own + q) * rows + i] = place >= 0 ? gradient[place]! * data.root[i]! : 0))
    turned[i] = (estimated.value(values, data.x[i]!) - data.y[i]!) * data.root[i]!
  }
  triangularize(triangle, rows, width, turned)
  return { ties: tied.map(([, tie]) => tie), own, triangle, rows, turned }
}
