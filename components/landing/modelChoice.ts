import type { FitNote, FitResult } from '#shared/science/fitting/types'
import type { TableFits } from '~~/composables/useFit'

/** Which of the two fits the page shows, and what is said of it. */
export interface ModelChoice {
  shown: FitResult
  /** dashed beside a curve that needs its binding term */
  straightLine: FitResult | null
  isStraight: boolean
  notes: FitNote[]
}

function isDetermined(fit: FitResult): boolean {
  return fit.parameters.every(parameter => parameter.estimate !== null)
}

/** The binding term stands only where the readings ask for it; else the straight line is shown, with the reason. */
export function chooseModel({ binding, line }: TableFits): ModelChoice | null {
  const isSpokenFor = binding !== null && isDetermined(binding) && !binding.notes.some(note => note.code === 'no-evidence-of-binding')
  if (isSpokenFor) return { shown: binding, straightLine: line, isStraight: false, notes: binding.notes }
  if (!line) return null
  return { shown: line, straightLine: null, isStraight: true, notes: binding?.notes ?? line.notes }
}
