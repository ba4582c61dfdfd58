/** The sensitivity of a series' constants in words and numbers. */
import type { Series } from '#shared/contracts/series'
import { sensitivityOf, type Sensitivity, type Variation } from '#shared/science/diagnostics/sensitivity'
import { fixed } from '#shared/science/notation'
import { counted, listed } from '~~/components/project/overview/words'
import { quantitySymbol } from '~~/components/ui/quantityNames'
import { fitRequest } from './fitInput'
import { formNames } from './modelRows'

const weightWords = { none: 'equal weights', replicates: 'weights by samples', sd: 'weights by uncertainty' } as const
const robustWords = { huber: 'robust, Huber’s weights', tukey: 'robust, Tukey’s weights' } as const

/** What was chosen otherwise. */
export function variationWords(variation: Variation): string {
  switch (variation.code) {
    case 'model': return formNames[variation.model]
    case 'weighting': return weightWords[variation.weighting]
    case 'robust': return robustWords[variation.kind]
    case 'restored': return variation.count === 1 ? 'the reading set aside is back' : `${counted(variation.count, 'reading')} set aside are back`
    case 'without-blanks': return 'without the blanks'
    case 'branch': return `the ${variation.direction} branch`
  }
}

/** Choices of the form are told in the table and left out of the sentence: another form means another constant. */
const isForm = ({ variation }: { variation: Variation }) => variation.code === 'model'

/** One sentence: how far the constants hang on the other choices. */
export function sensitivitySentence({ rows }: Sensitivity): string {
  const others = rows.filter(row => !isForm(row))
  const names = others[0]?.constants.map(({ name }) => name) ?? []
  const parts = names.flatMap((name, j) => {
    const shifts = others.flatMap(({ variation, constants }) => constants[j]!.shift === null ? [] : [{ size: Math.abs(constants[j]!.shift), variation }])
    const most = shifts.sort((a, b) => b.size - a.size)[0]
    return most ? [{ name, ...most }] : []
  })
  const worst = [...parts].sort((a, b) => b.size - a.size)[0]
  if (!worst) return 'There is no other choice to compare with.'
  if (worst.size < 1) return `With the same form no constant moves by more than ${fixed(worst.size, 1)} standard errors.`
  const moving = parts.filter(({ size }) => size >= 1).map(({ name, size, variation }) => `${quantitySymbol(name)} by up to ${fixed(size, 1)} (${variationWords(variation)})`)
  return `With the same form, in standard errors: ${listed(moving)}.`
}

/** Other choices with the constants they give; null without a fit of a named form. */
export function seriesSensitivity(series: Series): Sensitivity | null {
  const request = fitRequest(series)
  if (!request || !series.fit) return null
  const { points: _, ...asked } = request
  return sensitivityOf(series.readings, { ...asked, ...(series.choice?.options.parameters && { parameters: series.choice.options.parameters }) }, series.fit, series.campaign.clouds)
}
