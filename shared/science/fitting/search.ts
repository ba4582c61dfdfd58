/** A grid over the shape parameters, with the linear ones solved for exactly at each place. */
import { solveBounded } from './bounded-linear'
import { profileRange } from './profile'
import type { End, Problem } from './solve'

const placesPerDecade = 8
/** Cooperativity is looked for between a quarter and eight unless bounds say otherwise. */
const cooperativityPlaces = 21
/** Best local minima of the grid that are worth a descent. */
const startLimit = 6
/** How far beyond the grid the sum of squares counts as that of the limit. */
const limitFactor = 1e4

interface Place {
  sum: number
  values: Float64Array
}

export interface Starts {
  starts: Float64Array[]
  /** A limit of K that no place of the grid beats. */
  end: { end: End, sum: number, values: Float64Array } | null
}

export function searchShapes(problem: Problem, shapes: readonly number[]): Starts {
  if (shapes.length === 0) return { starts: [linearAt(problem, problem.held).values], end: null }
  const axes = shapes.map(j => axisOf(problem, j))
  const rows = axes.length === 1 ? [NaN] : axes[1]!
  const grid = rows.map(second => axes[0]!.map(first => placeAt(problem, shapes, [first, second])))
  const starts = localMinima(grid).sort((a, b) => a.sum - b.sum).slice(0, startLimit)
  return { starts: starts.map(place => place.values), end: bestLimit(problem, shapes, axes, rows) }
}

function axisOf(problem: Problem, index: number): number[] {
  const { name } = problem.model.parameters[index]!
  if (name === 'h') return spaced(Math.log(problem.lower[index]!), Math.log(problem.upper[index]!), cooperativityPlaces)
  const range = profileRange(problem.data, problem.lower[index]!, problem.upper[index]!)
  return spaced(range.low, range.high, Math.max(2, Math.ceil((range.high - range.low) / Math.LN10 * placesPerDecade)))
}

function spaced(from: number, to: number, count: number): number[] {
  return Array.from({ length: count + 1 }, (_, i) => Math.exp(from + (to - from) * i / count))
}

function placeAt(problem: Problem, shapes: readonly number[], shapeValues: readonly number[]): Place {
  const held = problem.held.slice()
  shapes.forEach((j, at) => (held[j] = shapeValues[at]!))
  return linearAt(problem, held)
}

/** Best linear parameters where every shape is held. */
function linearAt({ model, data, lower, upper }: Problem, held: Float64Array): Place {
  const { n, x, y, root } = data
  const free = Array.from(held.keys()).filter(j => Number.isNaN(held[j]))
  const values = held.map(value => Number.isNaN(value) ? 0 : value)
  const columns = new Float64Array(n * free.length)
  const target = new Float64Array(n)
  const row = new Float64Array(held.length)
  for (let i = 0; i < n; i++) {
    model.gradient(values, x[i]!, row, 0, 1)
    free.forEach((j, at) => (columns[at * n + i] = row[j]! * root[i]!))
    target[i] = (y[i]! - model.value(values, x[i]!)) * root[i]!
  }
  const solution = solveBounded(columns, target, free.map(j => lower[j]!), free.map(j => upper[j]!))
  free.forEach((j, at) => (values[j] = solution.coefficients[at]!))
  return { sum: solution.sum, values }
}

function localMinima(grid: Place[][]): Place[] {
  const sumAt = (i: number, j: number) => grid[i]?.[j]?.sum ?? Infinity
  return grid.flatMap((row, i) => row.filter(({ sum }, j) =>
    sum <= sumAt(i, j - 1) && sum <= sumAt(i, j + 1) && sum <= sumAt(i - 1, j) && sum <= sumAt(i + 1, j)))
}

function bestLimit(problem: Problem, shapes: readonly number[], axes: number[][], rows: readonly number[]): Starts['end'] {
  const k = shapes.find(j => problem.model.parameters[j]!.name === 'K')
  if (k === undefined) return null
  let best: Starts['end'] = null
  const consider = (end: End, value: number) => {
    for (const second of rows) {
      const place = placeAt(problem, shapes, [value, second])
      if (!best || place.sum < best.sum) best = { end, ...place }
    }
  }
  if (!(problem.lower[k]! > 0)) consider('zero', axes[0]![0]! / limitFactor)
  if (!(problem.upper[k]! < Infinity)) consider('infinity', axes[0]!.at(-1)! * limitFactor)
  return best
}
