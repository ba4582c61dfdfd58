import { noteCodes, type FitNote, type FitResult, type NoteCode, type Severity } from '../types'
import type { Analysis } from '../result'

/** What every diagnosis looks at. */
export interface Subject {
  analysis: Analysis
  result: FitResult
}

export type Diagnosis = (subject: Subject) => FitNote[]

/** Residuals at the level of rounding carry no message. */
export function isExact({ solution }: Analysis): boolean {
  return solution.sum < 1e-24 * solution.problem.data.n
}

export function note(code: NoteCode, severity: Severity, values: FitNote['values'] = {}): FitNote {
  return { code, severity, values }
}

export function parameterOf(result: FitResult, name: string) {
  return result.parameters.find(parameter => parameter.name === name)
}

export function derivedValue(result: FitResult, name: string) {
  return result.derived.find(quantity => quantity.name === name)
}

const severities: readonly Severity[] = ['problem', 'caution', 'info']

/** Most serious first; within a severity in the order of the codes. */
export function inOrder(notes: readonly FitNote[]): FitNote[] {
  const rank = ({ severity, code }: FitNote) => severities.indexOf(severity) * noteCodes.length + noteCodes.indexOf(code)
  return [...notes].sort((a, b) => rank(a) - rank(b))
}
