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
const rootTolerance = 1e-10
const gridStep = Math.LN10 / 8
const reach = 3 * Math.LN10
/** Largest x beside the smallest positive x that the grid follows. */
const widestLadder = Math.log(1e6)

export class BindingProfile {
  /** Of the latest `at`: the sum of squares and its exact derivative by ln K. */
  sum = 0
  derivative = 0

  private readonly n: number
  /** Orthonormal basis of the columns that do not depend on K; zeros where there is none. */
  private readonly first: Float64Array
  private readonly second: Float64Array
  private coefficient = 0
  private readonly target: Float64Array
  private readonly column: Float64Array
  private readonly slopes: Float64Array
  private readonly hasLevel: boolean
  /** Numerators of the two bases, whitened; the denominator of both is 1 + K·x. */
  private readonly lowTop: Float64Array
  private readonly highTop: Float64Array

  constructor(private readonly data: ScaledData, linear: LinearPart) {
    const { n, x, y, root } = data
    this.n = n
    this.hasLevel = linear.level === null
    const hasSlope = linear.slope === null
    this.column = new Float64Array(n)
    this.slopes = new Float64Array(n)
    this.target = new Float64Array(n)
    this.lowTop = new Float64Array(n)
    this.highTop = new Float64Array(n)
    for (let i = 0; i < n; i++) {
      this.target[i] = (y[i]! - (linear.level ?? 0) - (linear.slope ?? 0) * x[i]!) * root[i]!
      this.lowTop[i] = (hasSlope ? x[i]! * x[i]! : x[i]!) * root[i]!
      this.highTop[i] = (this.hasLevel ? 1 : x[i]!) * root[i]!
    }
    this.first = this.hasLevel ? unit(root.slice()) : new Float64Array(n)
    const slope = new Float64Array(n)
    if (hasSlope) for (let i = 0; i < n; i++) slope[i] = x[i]! * root[i]!
    this.second = unit(slope, this.first)
    project(this.target, this.first)
    project(this.target, this.second)
  }

  /** Sum of squares with no binding term at all. */
  get sumWithout(): number {
    return square(this.target)
  }

  /** Sets `sum` and `derivative` at a value of ln K. */
  at(logK: number): number {
    const { n, column, slopes, target } = this
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
    const { n, column, slopes, target, data: { x }, first, second } = this
    const k = Math.exp(logK)
    const top = k < 1 ? this.lowTop : this.highTop
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
    const { n, column, target, data: { x, root } } = this
    const hasStep = !this.hasLevel || x.includes(0)
    for (let i = 0; i < n; i++) {
      column[i] = end === 'zero' ? this.lowTop[i]! : root[i]! * (hasStep ? Number(x[i]! > 0) : 1 / x[i]!)
    }
    const before = square(column)
    project(column, this.first)
    project(column, this.second)
    const gg = square(column)
    const coefficient = gg > smallestRest * before ? dot(column, target) / gg : 0
    let sum = 0
    for (let i = 0; i < n; i++) sum += (target[i]! - coefficient * column[i]!) ** 2
    return sum
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

/** A column at unit length, off another one; zeros where nothing is left. Twice: the second pass removes rounding. */
function unit(column: Float64Array, other?: Float64Array): Float64Array {
  const before = square(column)
  if (other) for (let pass = 0; pass < 2; pass++) project(column, other)
  const after = square(column)
  const scale = after > smallestRest * before ? 1 / Math.sqrt(after) : 0
  for (let i = 0; i < column.length; i++) column[i]! *= scale
  return column
}

function project(v: Float64Array, onto: Float64Array): void {
  const amount = dot(v, onto)
  for (let i = 0; i < v.length; i++) v[i]! -= amount * onto[i]!
}
