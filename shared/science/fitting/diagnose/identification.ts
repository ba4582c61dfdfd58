import { supportOf } from '../compare'
import { fitWithoutNotes } from '../named'
import type { FitNote, FitResult } from '../types'
import { derivedValue, note, parameterOf, type Diagnosis } from './note'
import { thresholds } from './thresholds'

/** How well the constants of a binding model are pinned down. */
export const identification: Diagnosis = ({ analysis, result }) => {
  const { covariance, solution } = analysis
  const k = parameterOf(result, 'K')
  const condition = covariance?.condition ?? null
  if (!k || k.fixed || solution.end || result.model === 'expression') return conditionNote(condition, solution.end !== null)
  const factor = spanOf(k.interval)
  const isWide = k.interval !== null && (factor === null || factor > thresholds.intervalFactor)
  const product = derivedValue(result, 'BmaxK')
  const productError = product?.standardError != null && product.estimate !== 0 ? product.standardError / Math.abs(product.estimate) : null
  const notes: FitNote[] = []
  if (isWide && productError !== null && productError <= thresholds.productError) {
    notes.push(note('holds-as-product', 'caution', { factor, product: product!.estimate, productStandardError: product!.standardError, percent: 100 * productError }))
  }
  else if (isWide || (condition !== null && condition > thresholds.condition)) {
    notes.push(note('weakly-determined', 'caution', { parameter: 'K', factor, condition }))
  }
  return [...notes, ...signNote(result)]
}

function conditionNote(condition: number | null, isKnown: boolean): FitNote[] {
  const isBad = !isKnown && condition !== null && Number.isFinite(condition) && condition > thresholds.condition
  return isBad ? [note('weakly-determined', 'caution', { parameter: null, factor: null, condition })] : []
}

/** Upper end over lower end; null for an open one. */
function spanOf(interval: { lower: number | null, upper: number | null } | null): number | null {
  if (!interval || interval.lower === null || interval.upper === null || interval.lower <= 0) return null
  return interval.upper / interval.lower
}

function signNote(result: FitResult): FitNote[] {
  const interval = parameterOf(result, 'Bmax')?.interval
  if (!interval) return []
  const isUnknown = (interval.lower ?? -Infinity) < 0 && (interval.upper ?? Infinity) > 0
  return isUnknown ? [note('sign-of-binding-unknown', 'caution', { lower: interval.lower, upper: interval.upper })] : []
}

/** Whether a straight line would do as well. */
export const support: Diagnosis = ({ analysis, result }) => {
  if (result.model !== 'linear-langmuir' || result.parameters.some(({ name, fixed }) => fixed && name !== 'T0')) return []
  const { request, degreesOfFreedom } = analysis
  if (degreesOfFreedom < 0) return []
  const { T0 } = request.parameters ?? {}
  const line = fitWithoutNotes({ ...request, model: 'linear', parameters: T0 && { T0 }, intervals: 't' })
  const { verdict, deltaAicc, probability, detectable } = supportOf(request, line, result)
  if (verdict !== 'no-evidence') return []
  return [note('no-evidence-of-binding', 'caution', { deltaAicc, probability, detectableBmax: detectable?.bmax ?? null, atK: detectable?.k ?? null })]
}
