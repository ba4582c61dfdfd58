/** A mean over labs that scatter more than their own errors say. */
export interface Pooled {
  value: number
  standardError: number
  /** τ, standard deviation between labs, in the unit of the value */
  betweenLabs: number
}

interface Known {
  value: number
  standardError: number
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)

function weightedMean(estimates: readonly Known[], weights: readonly number[]): number {
  return sum(estimates.map(({ value }, index) => value * weights[index]!)) / sum(weights)
}

/** Inverse-variance mean of repeated estimates of one thing, such as a lab's two campaigns; null for none. */
export function fixedEffect(estimates: readonly Known[]): Known | null {
  if (estimates.length === 0) return null
  const weights = estimates.map(({ standardError }) => 1 / standardError ** 2)
  return { value: weightedMean(estimates, weights), standardError: 1 / Math.sqrt(sum(weights)) }
}

/**
 * Random-effects mean with the moment estimate of the variance between labs, τ² = max(0, (Q − (k − 1)) / C).
 *
 * @param estimates one a lab, each with a standard error above zero
 * @returns null for none
 * @source R. DerSimonian, N. Laird, Control. Clin. Trials 7 (1986) 177
 */
export function randomEffects(estimates: readonly Known[]): Pooled | null {
  const fixed = fixedEffect(estimates)
  if (!fixed) return null
  const weights = estimates.map(({ standardError }) => 1 / standardError ** 2)
  const q = sum(estimates.map(({ value }, index) => weights[index]! * (value - fixed.value) ** 2))
  const c = sum(weights) - sum(weights.map(weight => weight ** 2)) / sum(weights)
  const variance = c > 0 ? Math.max(0, (q - (estimates.length - 1)) / c) : 0
  const widened = estimates.map(({ standardError }) => 1 / (standardError ** 2 + variance))
  return {
    value: weightedMean(estimates, widened),
    standardError: 1 / Math.sqrt(sum(widened)),
    betweenLabs: Math.sqrt(variance),
  }
}
