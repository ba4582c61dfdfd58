import type { Support } from '#shared/science/fitting'
import type { FitResult } from '#shared/science/fitting/types'
import { concise, fixed, plain } from '#shared/science/notation'
import type { MarginNoteText } from './marginNoteText'

/** A difference of AICc from which one form is clearly better; common practice. */
const clearDifference = 4

/** Correlation from which two constants are best quoted as a product; our choice. */
const strongCorrelation = 0.9

/** That the readings ask for the binding term, when they clearly do. */
export function bindingFinding(binding: FitResult, line: FitResult): MarginNoteText | null {
  if (binding.aicc === null || line.aicc === null || line.aicc - binding.aicc < clearDifference) return null
  const miss = Math.max(...line.residuals.map(({ residual }) => Math.abs(residual)))
  return {
    heading: 'The binding term is needed',
    sentences: [`A straight line misses by up to ${plain(miss, 2)} K; the binding term improves AICc by ${fixed(line.aicc - binding.aicc, 0)}.`],
    tag: 'holds',
  }
}

/** How a binding term stands beside the straight line that is shown; null where it clearly stands, or nothing can be said. */
export function straightLineFinding({ verdict, deltaAicc, probability, detectable }: Support): MarginNoteText | null {
  if (verdict === 'undecided') {
    const chance = `on a true straight line a bend like this has a probability of ${plain(probability!, 1)}`
    const sentence = deltaAicc! > 0
      ? `A binding term improves AICc by ${fixed(deltaAicc!, 1)}, and ${chance}: too little to quote *K*, too much to rule it out.`
      : `These readings are too few for AICc to tell a curve from a line, but ${chance}.`
    return { heading: 'Binding is not settled', sentences: [sentence], tag: 'not-settled' }
  }
  if (verdict !== 'no-evidence') return null
  const seen = detectable ? ` A *B*~max~ above about ${plain(detectable.bmax, 2)} K, at *K* = ${plain(detectable.k, 2)} M^−1^, would have shown.` : ''
  return { heading: 'A straight line is enough', sentences: [`A binding term does not improve AICc.${seen}`], tag: 'holds' }
}

function correlationBetween(fit: FitResult, first: string, second: string): number | null {
  const free = fit.parameters.filter(parameter => !parameter.fixed && parameter.standardError !== null).map(parameter => parameter.name)
  return fit.correlation?.[free.indexOf(first)]?.[free.indexOf(second)] ?? null
}

/** That Bmax and K move against each other and their product is the better known; null when they do not. */
export function tradeOffFinding(binding: FitResult): MarginNoteText | null {
  const correlation = correlationBetween(binding, 'Bmax', 'K')
  const product = binding.derived.find(quantity => quantity.name === 'BmaxK')
  if (correlation === null || Math.abs(correlation) < strongCorrelation || !product?.standardError) return null
  const percent = 100 * product.standardError / Math.abs(product.estimate)
  return {
    heading: '*B*~max~ and *K* trade off',
    sentences: [`Correlation ${fixed(correlation, 2)}. Quote the product, ${concise(product.estimate, product.standardError)} K M^−1^, known to ${plain(percent, 1)} %.`],
    tag: 'holds-as-product',
  }
}
