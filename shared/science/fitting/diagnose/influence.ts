import { upperTailOfF } from '../../numeric/distributions'
import { seededRandom } from '../../random'
import { parameterUnits } from '../scale'
import { isExact, note, type Diagnosis } from './note'
import { thresholds } from './thresholds'

const draws = 199
const seed = 1
/** Below this studentized residual a removal is never unusual, and the simulation is spared. */
const unremarkable = 2

/**
 * The reading whose removal moves a constant too far, by one Gauss–Newton step from the optimum:
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
  const ladder: Ladder = { jacobian: stationary.jacobian, covariance: covariance.unscaled, leverages, pulls, degreesOfFreedom }
  const found = outlier(ladder, stationary.residuals) ?? decisive(ladder, stationary.residuals)
  if (!found) return []
  const { reading, shift, probability } = found
  const { column, change } = movedBy(reading, stationary.jacobian, covariance.unscaled, stationary.residuals[reading]! / (1 - leverages[reading]!))
  const index = columns[column]!
  const { x, y } = result.residuals[reading]!
  return [note('one-point-decides', 'caution', {
    reading: reading + 1, x, y, parameter: estimated.parameters[index]!.name, shift,
    change: change * parameterUnits(estimated, data)[index]!, probability,
  })]
}

/** What the influence of a reading depends on beside the residuals. */
interface Ladder {
  jacobian: Float64Array
  covariance: number[][]
  leverages: Float64Array
  pulls: Float64Array
  degreesOfFreedom: number
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

interface Suspect {
  reading: number
  shift: number
  probability: number
}

/** The reading that moves a constant furthest, where noise on this ladder rarely moves one as far. */
function decisive(ladder: Ladder, residuals: Float64Array): Suspect | null {
  const { reading, shift, studentized } = influences(ladder, residuals).reduce(further)
  if (!(studentized > unremarkable)) return null
  const probability = probabilityOf(shift, ladder)
  return probability <= thresholds.influenceProbability ? { reading, shift, probability } : null
}

/** The reading furthest off the curve, where it is too far for noise and its removal moves a constant by its uncertainty. */
function outlier(ladder: Ladder, residuals: Float64Array): Suspect | null {
  const { reading, shift, studentized } = influences(ladder, residuals).reduce((a, b) => b.studentized > a.studentized ? b : a)
  const freedom = ladder.degreesOfFreedom - 1
  const probability = residuals.length * upperTailOfF(studentized ** 2, 1, freedom)
  return shift > 1 && probability <= thresholds.influenceProbability / 2 ? { reading, shift, probability } : null
}

interface Influence {
  reading: number
  shift: number
  studentized: number
}

const further = (a: Influence, b: Influence) => b.shift > a.shift ? b : a

function influences(ladder: Ladder, residuals: Float64Array): Influence[] {
  const sum = dot(residuals, 0, residuals)
  return Array.from(residuals, (residual, reading) => {
    const studentized = studentize(ladder, residual, reading, sum)
    return { reading, shift: ladder.pulls[reading]! * Math.sqrt(1 - ladder.leverages[reading]!) * studentized, studentized }
  })
}

/** The scatter is taken without the reading itself, or an outlier would hide behind what it adds to it. */
function studentize({ pulls, leverages, degreesOfFreedom }: Ladder, residual: number, reading: number, sum: number): number {
  if (pulls[reading] === 0) return 0
  const share = residual * residual / (1 - leverages[reading]!)
  return Math.sqrt(share * (degreesOfFreedom - 1) / Math.max(sum - share, 1e-12 * sum))
}

/** How often pure noise on this ladder moves a constant as far. */
function probabilityOf(shift: number, ladder: Ladder): number {
  const { jacobian, covariance, pulls, leverages } = ladder
  const n = pulls.length
  const size = covariance.length
  const random = seededRandom(seed)
  const noise = new Float64Array(n)
  const reaches = pulls.map((pull, i) => pull * Math.sqrt(1 - leverages[i]!))
  let count = 0
  for (let draw = 0; draw < draws; draw++) {
    for (let i = 0; i < n; i++) noise[i] = random.normal()
    const gradient = covariance.map((_, b) => dot(jacobian, b * n, noise))
    const step = covariance.map(row => row.reduce((sum, value, b) => sum + value * gradient[b]!, 0))
    for (let b = 0; b < size; b++) for (let i = 0; i < n; i++) noise[i]! -= jacobian[b * n + i]! * step[b]!
    const sum = dot(noise, 0, noise)
    let isAsFar = false
    for (let i = 0; i < n && !isAsFar; i++) isAsFar = reaches[i]! * studentize(ladder, noise[i]!, i, sum) >= shift
    if (isAsFar) count++
  }
  return (count + 1) / (draws + 1)
}

function dot(left: Float64Array, from: number, right: Float64Array): number {
  let sum = 0
  for (let i = 0; i < right.length; i++) sum += left[from + i]! * right[i]!
  return sum
}
