/**
 * The sum of squares of a binding model as a function of K alone (variable projection). For given K the model is linear
 * in T0, c and Bmax; [1, x] is orthonormalized once, the binding column is projected off it for each K. Two bases span
 * the same space as the binding term without cancellation: x²/(1+Kx) where K·x ≤ 1 for all x, 1/(1+Kx) above.
 *
 * @source Golub & Pereyra, SIAM Journal on Numerical Analysis 10 (1973) 413
 */
import { findRoot } from '../numeric/roots'
import type { ScaledData } from './scale'

/** Which of the linear parameters are free, and what the others are held at (scaled). */
export interface LinearPart {
  level: number | null
  slope: number | null
}

export interface ProfileRange {
  low: number
  high: number
  /** True where the range ends at a bound that somebody set, false where it stands for a limit. */
  isLowBound: boolean
  isHighBound: boolean
}

export interface ProfileMinimum {
  /** ln K, or the limit the sum of squares is lowest at. */
  at: number | 'zero' | 'infinity'
  isAtBound: boolean
  sum: number
}

/** Share of a column's square that must be left after projection for it to be a direction of its own. */
const smallestRest = 1e-26
/** On ln K; the polish finds the remaining digits. */
const rootTolerance = 1e-13
const gridStep = Math.LN10 / 8
const reach = 3 * Math.LN10
/** Largest x beside the smallest positive x that the grid follows. */
const widestLadder = Math.log(1e6)

export class BindingProfile {
  /** Of the latest `at`: the sum of squares and its exact derivative by ln K. */
  sum = 0
  derivative = 0

  private readonly n: number
  private readonly hasLevel: boolean
  private readonly hasSlope: boolean
  private readonly columns: Columns
  private readonly lengthOfFirst: number
  private readonly lengthOfSecond: number
  private readonly slopeOnFirst: number
  private readonly targetOnFirst: number
  private readonly targetOnSecond: number
  /** Of the latest basis column: its coefficient and what was taken off it. */
  private coefficient = 0
  private onFirst = 0
  private onSecond = 0

  constructor(private readonly data: ScaledData, linear: LinearPart) {
    const { n, x, y, root } = data
    this.n = n
    this.hasLevel = linear.level === null
    this.hasSlope = linear.slope === null
    const { target, lowTop, highTop, first, second } = this.columns = columnsOf(n)
    for (let i = 0; i < n; i++) {
      const weighted = x[i]! * root[i]!
      target[i] = y[i]! * root[i]! - (linear.level ?? 0) * root[i]! - (linear.slope ?? 0) * weighted
      first[i] = this.hasLevel ? root[i]! : 0
      second[i] = this.hasSlope ? weighted : 0
      lowTop[i] = this.hasSlope ? x[i]! * weighted : weighted
      highTop[i] = this.hasLevel ? root[i]! : weighted
    }
    this.lengthOfFirst = normalize(first, square(first))
    const before = square(second)
    this.slopeOnFirst = project(second, first)
    // Twice: the second pass removes what rounding left in the first.
    project(second, first)
    this.lengthOfSecond = normalize(second, before)
    this.targetOnFirst = project(target, first)
    this.targetOnSecond = project(target, second)
  }

  /** Sum of squares with no binding term at all. */
  get sumWithout(): number {
    return square(this.columns.target)
  }

  /** Sets `sum` and `derivative` at a value of ln K. */
  at(logK: number): number {
    const { n, columns: { column, slopes, target } } = this
    this.derivative = this.slopeAt(logK)
    const coefficient = this.coefficient
    let sum = 0
    let dot = 0
    for (let i = 0; i < n; i++) {
      const r = target[i]! - coefficient * column[i]!
      sum += r * r
      dot += r * slopes[i]!
    }
    this.sum = sum
    this.derivative = -2 * coefficient * dot
    return sum
  }

  /** The derivative by ln K without the residuals: less exact near a minimum, enough to see its sign on the grid. */
  private slopeAt(logK: number): number {
    const { n, data: { x }, columns: { column, slopes, target, first, second, lowTop, highTop } } = this
    const k = Math.exp(logK)
    const top = k < 1 ? lowTop : highTop
    let onFirst = 0
    let onSecond = 0
    for (let i = 0; i < n; i++) {
      const t = 1 / (1 + k * x[i]!)
      const g = top[i]! * t
      column[i] = g
      slopes[i] = -k * x[i]! * t * g
      onFirst += g * first[i]!
      onSecond += g * second[i]!
    }
    this.onFirst = onFirst
    this.onSecond = onSecond
    let gg = 0
    let gy = 0
    let gs = 0
    let ys = 0
    for (let i = 0; i < n; i++) {
      const rest = column[i]! - onFirst * first[i]! - onSecond * second[i]!
      column[i] = rest
      gg += rest * rest
      gy += rest * target[i]!
      gs += rest * slopes[i]!
      ys += target[i]! * slopes[i]!
    }
    const coefficient = this.coefficient = gg > smallestRest * (gg + onFirst * onFirst + onSecond * onSecond) ? gy / gg : 0
    return -2 * coefficient * (ys - coefficient * gs)
  }

  /**
   * The sum of squares in a limit. K → 0: a quadratic, or a line without c. K → ∞: a step behind the blanks, or, where
   * there are none and the level is free, a term in 1/x.
   */
  limit(end: 'zero' | 'infinity'): number {
    const { n, data: { x, root }, columns: { column, target, first, second, lowTop } } = this
    const hasStep = !this.hasLevel || x.includes(0)
    for (let i = 0; i < n; i++) {
      column[i] = end === 'zero' ? lowTop[i]! : root[i]! * (hasStep ? Number(x[i]! > 0) : 1 / x[i]!)
    }
    const before = square(column)
    project(column, first)
    project(column, second)
    const gg = square(column)
    const coefficient = gg > smallestRest * before ? dot(column, target) / gg : 0
    let sum = 0
    for (let i = 0; i < n; i++) sum += (target[i]! - coefficient * column[i]!) ** 2
    return sum
  }

  /** The linear parameters that go with a value of ln K; a held one is given as 0. */
  linearAt(logK: number): { level: number, slope: number, saturation: number } {
    this.at(logK)
    const { coefficient, hasLevel, hasSlope } = this
    const k = Math.exp(logK)
    const slope = this.lengthOfSecond > 0 ? (this.targetOnSecond - coefficient * this.onSecond) / this.lengthOfSecond : 0
    const level = this.lengthOfFirst > 0 ? (this.targetOnFirst - coefficient * this.onFirst - slope * this.slopeOnFirst) / this.lengthOfFirst : 0
    // From the basis column back to the binding term, whose line or level the basis had taken out.
    if (k < 1 && hasSlope) return { level, slope: slope + coefficient / k, saturation: -coefficient / (k * k) }
    if (k >= 1 && hasLevel) return { level: level + coefficient, slope, saturation: -coefficient }
    return { level, slope, saturation: coefficient / k }
  }

  /** Lowest point over the range, limits and bounds included. */
  minimum(range: ProfileRange): ProfileMinimum {
    let best = this.ends(range)
    let previous = range.low
    this.at(previous)
    let previousDerivative = this.derivative
    const steps = Math.max(1, Math.ceil((range.high - range.low) / gridStep))
    const derivativeAt = (logK: number) => {
      this.at(logK)
      return this.derivative
    }
    for (let j = 1; j <= steps; j++) {
      const logK = j === steps ? range.high : range.low + (range.high - range.low) * j / steps
      const derivative = this.slopeAt(logK)
      if (previousDerivative < 0 && derivative >= 0) {
        const at = findRoot(derivativeAt, previous, logK, previousDerivative, derivative, rootTolerance)
        const sum = this.at(at)
        if (sum < best.sum) best = { at, isAtBound: false, sum }
      }
      previous = logK
      previousDerivative = derivative
    }
    return best
  }

  private ends(range: ProfileRange): ProfileMinimum {
    const low: ProfileMinimum = range.isLowBound
      ? { at: range.low, isAtBound: true, sum: this.at(range.low) }
      : { at: 'zero', isAtBound: false, sum: this.limit('zero') }
    const high: ProfileMinimum = range.isHighBound
      ? { at: range.high, isAtBound: true, sum: this.at(range.high) }
      : { at: 'infinity', isAtBound: false, sum: this.limit('infinity') }
    return low.sum <= high.sum ? low : high
  }
}

/** The range of ln K (x scaled to at most 1) that readings can speak about, cut to the bounds on K. */
export function profileRange(data: ScaledData, lowest: number, highest: number): ProfileRange {
  let smallest = 1
  for (let i = 0; i < data.n; i++) if (data.x[i]! > 0 && data.x[i]! < smallest) smallest = data.x[i]!
  const low = -reach
  const high = reach + Math.min(-Math.log(smallest), widestLadder)
  const isLowBound = lowest > 0
  const isHighBound = highest < Infinity
  const from = isLowBound ? Math.log(lowest) : Math.min(low, Math.log(highest) - reach)
  const to = isHighBound ? Math.log(highest) : Math.max(high, from + reach)
  return { low: from, high: to, isLowBound, isHighBound }
}

function square(v: Float64Array): number {
  let sum = 0
  for (let i = 0; i < v.length; i++) sum += v[i]! * v[i]!
  return sum
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!
  return sum
}

/** Brings a column to unit length and gives back what it was; zeros where nothing of its former square is left. */
function normalize(column: Float64Array, before: number): number {
  const after = square(column)
  const length = after > smallestRest * before ? Math.sqrt(after) : 0
  const scale = length > 0 ? 1 / length : 0
  for (let i = 0; i < column.length; i++) column[i]! *= scale
  return length
}

/** Takes off a column its part along a unit one, and gives back that part. */
function project(v: Float64Array, onto: Float64Array): number {
  const amount = dot(v, onto)
  for (let i = 0; i < v.length; i++) v[i]! -= amount * onto[i]!
  return amount
}

/** What a profile keeps of its readings, and the room it works in. */
interface Columns {
  target: Float64Array
  column: Float64Array
  slopes: Float64Array
  /** Orthonormal basis of the columns that do not depend on K; zeros where there is none. */
  first: Float64Array
  second: Float64Array
  /** Numerators of the two bases, whitened; the denominator of both is 1 + K·x. */
  lowTop: Float64Array
  highTop: Float64Array
}

function columnsOf(n: number): Columns {
  const column = () => new Float64Array(n)
  return { target: column(), column: column(), slopes: column(), first: column(), second: column(), lowTop: column(), highTop: column() }
}
