import { seededRandom } from '../../random'
import { parameterUnits } from '../scale'
import { isExact, note, type Diagnosis } from './note'
import { thresholds } from './thresholds'

const draws = 399
const seed = 1
/** Below this studentized residual a removal is never unusual, and the simulation is spared. */
const unremarkable = 1.5

/**
 * The reading whose removal moves a constant furthest, by one Gauss–Newton step from the optimum:
 * Δθ = −C·Jᵢ·rᵢ/(1 − hᵢ), exact for linear models. How far is usual depends on the ladder, so noise is drawn on the
 * same one.
 *
 * @source Cook & Weisberg, Residuals and Influence in Regression (1982), 3.3 and 5.2
 */
export const influence: Diagnosis = ({ analysis, result }) => {
  const { solution, covariance, variance, degreesOfFreedom } = analysis
  const { stationary, columns, estimated, problem: { data } } = solution
  const leverages = covariance?.leverages
  if (!stationary || !covariance?.unscaled || !leverages || variance === null || degreesOfFreedom < thresholds.degreesOfFreedom || isExact(analysis)) return []
  const pulls = pullsOf(stationary.jacobian, covariance.unscaled, leverages)
  const s = Math.sqrt(stationary.sum / degreesOfFreedom)
  const { reading, shift } = furthest(pulls, stationary.residuals, s)
  const studentized = Math.abs(stationary.residuals[reading]!) / (s * Math.sqrt(1 - leverages[reading]!))
  if (!(studentized > unremarkable)) return []
  const probability = probabilityOf(shift, pulls, stationary.jacobian, covariance.unscaled, degreesOfFreedom)
  if (probability > thresholds.influenceProbability) return []
  const { column, change } = movedBy(reading, stationary.jacobian, covariance.unscaled, stationary.residuals[reading]! / (1 - leverages[reading]!))
  const index = columns[column]!
  const { x, y } = result.residuals[reading]!
  return [note('one-point-decides', 'caution', {
    reading: reading + 1, x, y, parameter: estimated.parameters[index]!.name, shift,
    change: change * parameterUnits(estimated, data)[index]!, probability,
  })]
}

/** For each reading, the most standard errors a constant moves per unit of its residual; 0 where nothing is left without it. */
function pullsOf(jacobian: Float64Array, covariance: number[][], leverages: Float64Array): Float64Array {
  return leverages.map((leverage, i) => {
    if (1 - leverage < 1e-6) return 0
    const { column, change } = movedBy(i, jacobian, covariance, 1 / (1 - leverage))
    return Math.abs(change) / Math.sqrt(covariance[column]![column]!)
  })
}

/** The constant that a reading moves furthest, in standard errors, and by how much on its own scale. */
function movedBy(reading: number, jacobian: Float64Array, covariance: number[][], residual: number): { column: number, change: number } {
  const n = jacobian.length / covariance.length
  let best = { column: 0, change: 0 }
  let furthest = -1
  covariance.forEach((row, column) => {
    let change = 0
    for (let b = 0; b < row.length; b++) change += row[b]! * jacobian[b * n + reading]! * residual
    const shift = Math.abs(change) / Math.sqrt(row[column]!)
    if (shift > furthest) {
      furthest = shift
      best = { column, change }
    }
  })
  return best
}

function furthest(pulls: Float64Array, residuals: Float64Array, s: number): { reading: number, shift: number } {
  let best = { reading: 0, shift: 0 }
  for (let i = 0; i < pulls.length; i++) {
    const shift = pulls[i]! * Math.abs(residuals[i]!) / s
    if (shift > best.shift) best = { reading: i, shift }
  }
  return best
}

/** How often pure noise on this ladder moves a constant as far. */
function probabilityOf(shift: number, pulls: Float64Array, jacobian: Float64Array, covariance: number[][], degreesOfFreedom: number): number {
  const n = pulls.length
  const size = covariance.length
  const random = seededRandom(seed)
  const noise = new Float64Array(n)
  let further = 0
  for (let draw = 0; draw < draws; draw++) {
    for (let i = 0; i < n; i++) noise[i] = random.normal()
    const gradient = covariance.map((_, b) => dot(jacobian, b * n, noise))
    const step = covariance.map(row => row.reduce((sum, value, b) => sum + value * gradient[b]!, 0))
    for (let b = 0; b < size; b++) for (let i = 0; i < n; i++) noise[i]! -= jacobian[b * n + i]! * step[b]!
    const s = Math.sqrt(dot(noise, 0, noise) / degreesOfFreedom)
    if (furthest(pulls, noise, s).shift >= shift) further++
  }
  return (further + 1) / (draws + 1)
}

function dot(left: Float64Array, from: number, right: Float64Array): number {
  let sum = 0
  for (let i = 0; i < right.length; i++) sum += left[from + i]! * right[i]!
  return sum
}
