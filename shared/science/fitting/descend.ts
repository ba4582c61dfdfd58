/**
 * Descent from a start, within bounds: ml-levenberg-marquardt proposes one step at a time, this file decides. A parameter
 * that sits at its bound with the gradient pushing outwards leaves the vector until the gradient turns.
 *
 * Damping, acceptance and the growing column scales follow Moré, Lecture Notes in Mathematics 630 (1978) 105.
 */
import { columnLengths, marquardt, type Marquardt } from './marquardt'
import { sumOfSquares, type Objective } from './objective'
import { convergedOffset, polish, type Stationary } from './polish'
import type { StopReason } from './types'

export interface Bounds {
  lower: Float64Array
  upper: Float64Array
}

export interface Descent {
  point: Float64Array
  sum: number
  /** Of the parameters that are not at a bound, in order. */
  stationary: Stationary | null
  inside: number[]
  stopReason: StopReason
}

const dampingUp = 2
const dampingDown = 5
const largestDamping = 1e16
const smallestDamping = 1e-14
const initialDampings = [1e-3, 1]
/** A point this close to stationary is left to the polish. */
const nearlyStationary = 1e-6
/** Large residuals make Gauss–Newton converge by a factor a step, not by doubling digits. */
const polishRounds = 30

export function unbounded(size: number): Bounds {
  return { lower: new Float64Array(size).fill(-Infinity), upper: new Float64Array(size).fill(Infinity) }
}

/** The better of the descents from a bold and a timid first step. */
export function descend(objective: Objective, start: Float64Array, bounds: Bounds, iterationLimit: number): Descent {
  let best: Descent | null = null
  for (const damping of initialDampings) {
    const found = descendFrom(objective, start, bounds, damping, iterationLimit)
    if (!best || found.sum < best.sum * (1 - 1e-12)) best = found
  }
  return best!
}

/** The parameters that may move, as an objective of their own. */
export function restrict(objective: Objective, point: Float64Array, inside: number[]): Objective {
  const { readings } = objective
  if (inside.length === objective.size) return objective
  const whole = point.slice()
  const wholeJacobian = new Float64Array(readings * objective.size)
  const complete = (part: ArrayLike<number>) => {
    for (let j = 0; j < inside.length; j++) whole[inside[j]!] = part[j]!
    return whole
  }
  return {
    readings,
    size: inside.length,
    residuals: (part, out) => objective.residuals(complete(part), out),
    jacobian(part, out) {
      objective.jacobian(complete(part), wholeJacobian)
      for (let j = 0; j < inside.length; j++) out.set(wholeJacobian.subarray(inside[j]! * readings, (inside[j]! + 1) * readings), j * readings)
    },
  }
}

/** Those not held at a bound by the direction of descent. */
function movable(objective: Objective, point: Float64Array, bounds: Bounds, residuals: Float64Array, jacobian: Float64Array): number[] {
  const inside: number[] = []
  for (let j = 0; j < point.length; j++) {
    let gradient = 0
    for (let i = 0; i < objective.readings; i++) gradient += jacobian[j * objective.readings + i]! * residuals[i]!
    const isHeld = (point[j]! <= bounds.lower[j]! && gradient >= 0) || (point[j]! >= bounds.upper[j]! && gradient <= 0)
    if (!isHeld) inside.push(j)
  }
  return inside
}

export function descendFrom(objective: Objective, start: Float64Array, bounds: Bounds, firstDamping: number, iterationLimit: number): Descent {
  const { readings, size } = objective
  const point = start.map((value, j) => Math.min(Math.max(value, bounds.lower[j]!), bounds.upper[j]!))
  const residuals = new Float64Array(readings)
  const jacobian = new Float64Array(readings * size)
  const lengths = new Float64Array(size)
  const largest = new Float64Array(size)
  objective.residuals(point, residuals)
  let sum = sumOfSquares(residuals)
  let damping = firstDamping
  let inside: number[] = []
  let driver: Marquardt | null = null
  let isFresh = true
  for (let iteration = 0; iteration < iterationLimit; iteration++) {
    if (isFresh) {
      objective.jacobian(point, jacobian)
      columnLengths(jacobian, readings, size, lengths)
      for (let j = 0; j < size; j++) largest[j] = Math.max(largest[j]!, lengths[j]!)
      const next = movable(objective, point, bounds, residuals, jacobian)
      if (next.length === 0) return { point, sum, stationary: null, inside: next, stopReason: 'bound' }
      if (!driver || next.join() !== inside.join() || next.length < size) driver = marquardt(restrict(objective, point, next))
      inside = next
    }
    const from = Float64Array.from(inside, j => point[j]!)
    const moved = driver!.step(from, Float64Array.from(inside, j => largest[j]!), damping, 1)
    const outcome = moved && landing(objective, point, inside, moved, bounds)
    isFresh = outcome !== null && outcome.sum < sum
    if (!isFresh) {
      damping *= dampingUp
      if (damping > largestDamping) break
      continue
    }
    const gain = (sum - outcome!.sum) / sum
    const change = longestChange(point, outcome!.point)
    point.set(outcome!.point)
    sum = outcome!.sum
    objective.residuals(point, residuals)
    damping = Math.max(damping / dampingDown, smallestDamping)
    if (sum === 0 || (gain < 1e-10 && change < nearlyStationary)) {
      const settled = settle(objective, point, bounds)
      if (settled.stationary && settled.stationary.relativeOffset < convergedOffset) return settled
      if (!Number.isFinite(settled.sum)) break
      point.set(settled.point)
      sum = settled.sum
      objective.residuals(point, residuals)
    }
  }
  const settled = settle(objective, point, bounds)
  return Number.isFinite(settled.sum) ? settled : unfinished(point, sum)
}

/** The last point that was accepted: the objective gives no more numbers (its budget is spent), so nothing is said about its surroundings. */
function unfinished(point: Float64Array, sum: number): Descent {
  return { point, sum, stationary: null, inside: Array.from(point.keys()), stopReason: 'limit' }
}

function landing(objective: Objective, point: Float64Array, inside: number[], moved: Float64Array, bounds: Bounds) {
  const target = point.slice()
  for (let j = 0; j < inside.length; j++) {
    const at = inside[j]!
    target[at] = Math.min(Math.max(moved[j]!, bounds.lower[at]!), bounds.upper[at]!)
  }
  const residuals = new Float64Array(objective.readings)
  objective.residuals(target, residuals)
  const sum = sumOfSquares(residuals)
  return Number.isFinite(sum) ? { point: target, sum } : null
}

function longestChange(from: Float64Array, to: Float64Array): number {
  let longest = 0
  for (let j = 0; j < from.length; j++) longest = Math.max(longest, Math.abs(to[j]! - from[j]!) / (Math.abs(to[j]!) || 1))
  return longest
}

/** Polishes what is not at a bound and says how the descent ended. */
function settle(objective: Objective, point: Float64Array, bounds: Bounds): Descent {
  const { readings, size } = objective
  const residuals = new Float64Array(readings)
  const jacobian = new Float64Array(readings * size)
  objective.residuals(point, residuals)
  objective.jacobian(point, jacobian)
  const inside = movable(objective, point, bounds, residuals, jacobian)
  if (inside.length === 0) return { point, sum: sumOfSquares(residuals), stationary: null, inside, stopReason: 'bound' }
  const part = restrict(objective, point, inside)
  let stationary = polish(part, Float64Array.from(inside, j => point[j]!), polishRounds)
  const isWithin = inside.every((at, j) => stationary.point[j]! >= bounds.lower[at]! && stationary.point[j]! <= bounds.upper[at]!)
  if (!isWithin) stationary = polish(part, Float64Array.from(inside, j => point[j]!), 0)
  const whole = point.slice()
  inside.forEach((at, j) => (whole[at] = stationary.point[j]!))
  return { point: whole, sum: stationary.sum, stationary, inside, stopReason: stopReasonOf(stationary, inside.length < size) }
}

/** What a polished point says about its convergence. */
export function stopReasonOf(stationary: Stationary, isBounded: boolean): StopReason {
  if (stationary.relativeOffset < convergedOffset) return isBounded ? 'bound' : 'relative-offset'
  // Residuals at the level of rounding have no direction left: the size of the step decides.
  if (stationary.relativeStep < smallestStep) return isBounded ? 'bound' : 'step'
  return 'limit'
}

const smallestStep = 1e-10
