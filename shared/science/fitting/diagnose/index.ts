import type { FitNote } from '../types'
import { convergence } from './convergence'
import { concentrations, extrapolation, ladder, weighting } from './design'
import { identification, support } from './identification'
import { influence } from './influence'
import { inOrder, type Diagnosis, type Subject } from './note'
import { residualChecks } from './residuals'

const diagnoses: readonly Diagnosis[] = [
  convergence, identification, support, ladder, extrapolation, weighting, residualChecks, influence, concentrations,
]

/** What the readings do and do not support, most serious first. */
export function diagnose(subject: Subject): FitNote[] {
  return inOrder(diagnoses.flatMap(diagnosis => diagnosis(subject)))
}
