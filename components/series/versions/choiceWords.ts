import type { Series } from '#shared/contracts/series'
import { formNames } from '~~/components/series/page/modelRows'

const weightWords = { none: 'equal weights', replicates: 'weights by samples', sd: 'weights by uncertainty' } as const

/** How a version is fitted, in a line. */
export function choiceWords({ choice, fit }: Series): string {
  const { weighting, intervals, confidence, parameters = {} } = choice?.options ?? {}
  const held = Object.entries(parameters).map(([name, { fixed, min, max }]) =>
    fixed === undefined ? `${name}${min === undefined ? '' : ` ≥ ${min}`}${max === undefined ? '' : ` ≤ ${max}`}` : `${name} held at ${fixed}`)
  const form = choice?.model ? formNames[choice.model] : `as supported${fit ? `: ${formNames[fit.model]}` : ''}`
  return [form, weighting && weightWords[weighting], ...held, intervals === 't' && 'symmetric intervals', confidence && `level ${Math.round(confidence * 100)} %`].filter(Boolean).join(', ')
}
