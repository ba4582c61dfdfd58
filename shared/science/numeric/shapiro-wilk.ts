import { normalDistribution, normalQuantile } from './distributions'

/** Coefficients for the two outermost weights, and for the mean and spread of the transformed statistic. */
const outermost = [0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056]
const second = [0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633]

function polynomial(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0)
}

/**
 * Shapiro–Wilk test of normality, for 6 to 5000 values.
 *
 * @returns W and the probability of one as small from a normal sample; null where all values are equal or n is out of range
 * @source Royston, Applied Statistics 44 (1995) 547 (algorithm AS R94)
 */
export function shapiroWilk(values: readonly number[]): { w: number, probability: number } | null {
  const n = values.length
  if (n < 6 || n > 5_000) return null
  const sorted = [...values].sort((a, b) => a - b)
  const mean = sorted.reduce((sum, value) => sum + value, 0) / n
  const spread = sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  if (!(spread > 0)) return null
  const weights = weightsFor(n)
  const slope = sorted.reduce((sum, value, i) => sum + weights[i]! * value, 0)
  const w = Math.min(slope * slope / spread, 1)
  return { w, probability: w === 1 ? 1 : upperTail(w, n) }
}

/** Weights of the ordered values, antisymmetric about the middle. */
function weightsFor(n: number): number[] {
  const scores = Array.from({ length: n }, (_, i) => normalQuantile((i + 1 - 0.375) / (n + 0.25)))
  const square = scores.reduce((sum, score) => sum + score * score, 0)
  const root = 1 / Math.sqrt(n)
  const last = polynomial(outermost, root) + scores[n - 1]! / Math.sqrt(square)
  const lastButOne = polynomial(second, root) + scores[n - 2]! / Math.sqrt(square)
  const rest = Math.sqrt((square - 2 * scores[n - 1]! ** 2 - 2 * scores[n - 2]! ** 2) / (1 - 2 * last ** 2 - 2 * lastButOne ** 2))
  const weights = scores.map(score => score / rest)
  weights[n - 1] = last
  weights[n - 2] = lastButOne
  weights[0] = -last
  weights[1] = -lastButOne
  return weights
}

function upperTail(w: number, n: number): number {
  const logN = Math.log(n)
  if (n >= 12) {
    const mean = polynomial([-1.5861, -0.31082, -0.083751, 0.0038915], logN)
    const deviation = Math.exp(polynomial([-0.4803, -0.082676, 0.0030302], logN))
    return 1 - normalDistribution((Math.log(1 - w) - mean) / deviation)
  }
  const gamma = polynomial([-2.273, 0.459], n)
  const inside = gamma - Math.log(1 - w)
  if (inside <= 0) return 0
  const mean = polynomial([0.544, -0.39978, 0.025054, -6.714e-4], n)
  const deviation = Math.exp(polynomial([1.3822, -0.77857, 0.062767, -0.0020322], n))
  return 1 - normalDistribution((-Math.log(inside) - mean) / deviation)
}
