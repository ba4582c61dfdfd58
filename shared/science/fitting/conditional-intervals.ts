/**
 * Profile intervals of a binding model through its profile in K. At fixed K the model is linear, so the values of a
 * linear parameter that keep S ≤ S_min + Δ are β(K) ± √((Δ − S(K) + S_min)·v(K)); the union over K is the profile
 * interval, exactly, without a fit for each trial value.
 */
import { backSubstitute, invertTriangle, triangularize } from '../numeric/qr'
import { findRoot, maximize } from '../numeric/roots'
import { profileRange, type BindingProfile } from './profile'
import { indexOf, profileOf, type Problem, type Solution } from './solve'

/** An end that is null never closes. */
export interface Ends {
  lower: number | null
  upper: number | null
}

const outwardStep = Math.LN10 / 8
const coarsePlaces = 12
/** How far past the range an open end is followed for the parameters that settle there. */
const beyond = Math.log(1e3)

interface Region {
  low: number
  high: number
  isLowOpen: boolean
  isHighOpen: boolean
}

export function conditionalIntervals(solution: Solution, delta: number): Map<number, Ends> {
  const { problem } = solution
  const k = indexOf(problem.model, 'K')
  const profile = profileOf(problem)
  const threshold = solution.sum + delta
  const region = regionOf(solution, profile, threshold)
  const ends = new Map<number, Ends>()
  ends.set(k, endsOf(region))
  for (const [index, found] of linearEnds(problem, region, threshold)) ends.set(index, found)
  return ends
}

/** The profile interval of K alone, on scaled axes. */
export function bindingInterval(solution: Solution, delta: number): Ends {
  const region = regionOf(solution, profileOf(solution.problem), solution.sum + delta)
  return endsOf(region)
}

function endsOf(region: Region): Ends {
  return { lower: region.isLowOpen ? null : Math.exp(region.low), upper: region.isHighOpen ? null : Math.exp(region.high) }
}

/** The values of ln K around the optimum (or from the limit on) that S stays below the threshold for. */
function regionOf(solution: Solution, profile: BindingProfile, threshold: number): Region {
  const { problem, end, values } = solution
  const k = indexOf(problem.model, 'K')
  const range = profileRange(problem.data, problem.lower[k]!, problem.upper[k]!)
  const centre = end === 'zero' ? range.low : end === 'infinity' ? range.high : Math.log(values[k]!)
  const excess = (logK: number) => profile.at(logK) - threshold
  const crossing = (direction: 1 | -1, last: number): number | null => {
    let inner = centre
    let innerExcess = excess(inner)
    if (innerExcess > 0) return inner
    while (inner !== last) {
      const outer = direction > 0 ? Math.min(inner + outwardStep, last) : Math.max(inner - outwardStep, last)
      const outerExcess = excess(outer)
      if (outerExcess > 0) return findRoot(excess, inner, outer, innerExcess, outerExcess, 1e-12)
      inner = outer
      innerExcess = outerExcess
    }
    return null
  }
  const low = end === 'zero' ? null : crossing(-1, range.low)
  const high = end === 'infinity' ? null : crossing(1, range.high)
  return {
    low: low ?? (range.isLowBound ? range.low : range.low - beyond),
    high: high ?? (range.isHighBound ? range.high : range.high + beyond),
    isLowOpen: low === null && !range.isLowBound,
    isHighOpen: high === null && !range.isHighBound,
  }
}

/** Linear least squares at a held K: coefficients, their unscaled variances and S. */
class Conditional {
  readonly free: number[]
  readonly coefficients: Float64Array
  readonly variances: Float64Array
  sum = 0
  private readonly columns: Float64Array
  private readonly target: Float64Array
  private readonly row: Float64Array
  private readonly values: Float64Array

  constructor(private readonly problem: Problem, private readonly k: number) {
    const { held, data: { n } } = problem
    this.free = Array.from(held.keys()).filter(j => j !== k && Number.isNaN(held[j]))
    this.coefficients = new Float64Array(this.free.length)
    this.variances = new Float64Array(this.free.length)
    this.columns = new Float64Array(n * this.free.length)
    this.target = new Float64Array(n)
    this.row = new Float64Array(held.length)
    this.values = held.map(value => Number.isNaN(value) ? 0 : value)
  }

  at(logK: number): void {
    const { problem: { model, data: { n, x, y, root } }, free, columns, target, row, values } = this
    values[this.k] = Math.exp(logK)
    for (let i = 0; i < n; i++) {
      model.gradient(values, x[i]!, row, 0, 1)
      for (let j = 0; j < free.length; j++) columns[j * n + i] = row[free[j]!]! * root[i]!
      target[i] = (y[i]! - model.value(values, x[i]!)) * root[i]!
    }
    const size = free.length
    triangularize(columns, n, size, target)
    backSubstitute(columns, n, size, target, this.coefficients)
    this.sum = 0
    for (let i = size; i < n; i++) this.sum += target[i]! * target[i]!
    const inverse = invertTriangle(columns, n, size)
    for (let j = 0; j < size; j++) {
      let variance = 0
      for (let k = j; k < size; k++) variance += inverse[k * size + j]! ** 2
      this.variances[j] = variance
    }
  }
}

function linearEnds(problem: Problem, region: Region, threshold: number): Map<number, Ends> {
  const conditional = new Conditional(problem, indexOf(problem.model, 'K'))
  const { free } = conditional
  const width = (region.high - region.low) / coarsePlaces
  const coarse = free.map(() => ({ upper: [] as number[], lower: [] as number[] }))
  const reachOf = (j: number) => Math.sqrt(Math.max(threshold - conditional.sum, 0) * conditional.variances[j]!)
  for (let place = 0; place <= coarsePlaces; place++) {
    conditional.at(region.low + place * width)
    free.forEach((_, j) => {
      coarse[j]!.upper.push(conditional.coefficients[j]! + reachOf(j))
      coarse[j]!.lower.push(-conditional.coefficients[j]! + reachOf(j))
    })
  }
  const furthest = (j: number, side: 1 | -1): number | null => {
    const values = side > 0 ? coarse[j]!.upper : coarse[j]!.lower
    const best = values.indexOf(Math.max(...values))
    const diverges = divergence(problem, free[j]!)
    if ((best === 0 && region.isLowOpen && diverges.zero) || (best === coarsePlaces && region.isHighOpen && diverges.infinity)) return null
    const objective = (logK: number) => {
      conditional.at(logK)
      return side * conditional.coefficients[j]! + reachOf(j)
    }
    const from = region.low + Math.max(best - 1, 0) * width
    const to = region.low + Math.min(best + 1, coarsePlaces) * width
    const found = width > 0 ? maximize(objective, from, to, 1e-8 * (1 + width)).value : -Infinity
    return side * Math.max(found, values[best]!)
  }
  return new Map(free.map((index, j) => [index, { lower: furthest(j, -1), upper: furthest(j, 1) }]))
}

/** Which linear parameters run away in which limit of K. */
function divergence({ model, data, held }: Problem, index: number): { zero: boolean, infinity: boolean } {
  const { name } = model.parameters[index]!
  const isPinned = data.x.includes(0) || !Number.isNaN(held[0])
  return { zero: name === 'c' || name === 'Bmax', infinity: !isPinned && (name === 'T0' || name === 'Bmax') }
}
