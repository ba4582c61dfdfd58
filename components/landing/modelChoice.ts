import type { FitNote, FitResult, NoteCode } from '#shared/science/fitting/types'
import type { TableFits } from '~~/composables/tableFits'

/** Which of the two fits the page shows, and what is said of it. */
export interface ModelChoice {
  /** null: constants could be computed, but nothing is left to judge them by */
  shown: FitResult | null
  /** of a curve that needs its binding term, for comparison */
  straightLine: FitResult | null
  isStraight: boolean
  notes: FitNote[]
}

/** What is said of a binding term that is not there says nothing more. */
const aboutBinding: readonly NoteCode[] = [
  'binding-not-identified', 'weakly-determined', 'holds-as-product', 'sign-of-binding-unknown', 'saturation-not-reached', 'low-concentrations-missing',
]

function isDetermined(fit: FitResult): boolean {
  return fit.parameters.every(parameter => parameter.estimate !== null)
}

function withoutConstants(fit: FitResult): ModelChoice {
  return { shown: null, straightLine: null, isStraight: false, notes: fit.notes }
}

/** The binding term stands only where the readings ask for it; else the straight line is shown, with the reason. */
export function chooseModel({ binding, line }: TableFits): ModelChoice | null {
  const isWithoutEvidence = binding?.notes.some(note => note.code === 'no-evidence-of-binding') ?? false
  if (binding && !isWithoutEvidence && isDetermined(binding)) {
    return binding.degreesOfFreedom > 0 ? { shown: binding, straightLine: line, isStraight: false, notes: binding.notes } : withoutConstants(binding)
  }
  if (!line) return null
  if (line.degreesOfFreedom < 1) return withoutConstants(line)
  const notes = (binding ?? line).notes
  return { shown: line, straightLine: null, isStraight: true, notes: isWithoutEvidence ? notes.filter(note => !aboutBinding.includes(note.code)) : notes }
}
