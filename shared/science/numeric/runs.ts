import { logGamma } from './distributions'

/**
 * Probability of as few runs of equal sign, given how many values are above and below.
 *
 * @source Wald & Wolfowitz, Annals of Mathematical Statistics 11 (1940) 147 (exact distribution)
 */
export function fewRuns(values: readonly number[]): { runs: number, expected: number, probability: number } | null {
  const signs = values.filter(value => value !== 0).map(value => value > 0)
  const above = signs.filter(Boolean).length
  const below = signs.length - above
  if (above === 0 || below === 0) return null
  const runs = 1 + signs.filter((sign, i) => i > 0 && sign !== signs[i - 1]).length
  let probability = 0
  for (let count = 2; count <= runs; count++) probability += probabilityOfRuns(count, above, below)
  return { runs, expected: 1 + 2 * above * below / signs.length, probability: Math.min(probability, 1) }
}

function probabilityOfRuns(runs: number, above: number, below: number): number {
  const half = Math.floor(runs / 2)
  const all = logChoose(above + below, above)
  const pair = (a: number, b: number) => Math.exp(logChoose(above - 1, a) + logChoose(below - 1, b) - all)
  return runs % 2 === 0 ? 2 * pair(half - 1, half - 1) : pair(half, half - 1) + pair(half - 1, half)
}

function logChoose(n: number, k: number): number {
  if (k < 0 || k > n) return -Infinity
  return logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1)
}
