/** A bootstrap in the numbers and words of the page. */
import type { Bootstraps } from '#shared/contracts/bootstrap'
import { concise, plain } from '#shared/science/notation'

type Drawn = Bootstraps['results'][number]
type Ends = Drawn['quantities'][number]['percentile']

const digits = 4

/** 4.07 to 6.15; open where the draws set no end. */
export function endsText(ends: Ends | null): string {
  if (!ends) return 'not had'
  const { lower, upper } = ends
  if (lower === null && upper === null) return 'open on both sides'
  if (upper === null) return `above ${plain(lower, digits)}`
  if (lower === null) return `below ${plain(upper, digits)}`
  return `${plain(lower, digits)} to ${plain(upper, digits)}`
}

export function bootstrapRows({ quantities }: Drawn) {
  return quantities.map(({ name, unit, estimate, standardError, percentile, bca }) => ({
    name, unit, value: concise(estimate, standardError), percentile: endsText(percentile), bca: endsText(bca),
  }))
}

const kindWords = { residual: 'residuals drawn anew', case: 'readings drawn anew, concentration by concentration', parametric: 'normal scatter drawn anew' } as const

/** How it was drawn, and what became of the draws. */
export function bootstrapSentence({ kind, samples, seed, withoutOptimum }: Drawn): string {
  const lost = withoutOptimum === 0 ? '' : ` In ${plain(100 * withoutOptimum / samples, 2)} % of the draws the best K lay at 0 or without bound; an interval that reaches them is open.`
  return `${samples.toLocaleString('en-GB')} draws, ${kindWords[kind]}, seed ${seed}.${lost}`
}
