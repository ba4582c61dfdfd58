import { toOriginal } from '../scale'
import { indexOf } from '../solve'
import { standardErrors } from '../result'
import type { FitNote } from '../types'
import { note, type Diagnosis } from './note'

/** Whether the numbers are an optimum at all. */
export const convergence: Diagnosis = ({ analysis, result }) => {
  const { solution, covariance, degreesOfFreedom } = analysis
  const notes: FitNote[] = []
  if (result.stopReason === 'limit') notes.push(note('not-converged', 'problem'))
  if (solution.end) notes.push(withoutOptimum(analysis))
  else if (covariance && !covariance.unscaled) {
    notes.push(note('singular', 'problem', { condition: Number.isFinite(covariance.condition) ? covariance.condition : null }))
  }
  if (degreesOfFreedom < 3) {
    notes.push(note('few-points', degreesOfFreedom === 0 ? 'problem' : 'caution', { n: result.n, parameters: result.n - degreesOfFreedom, degreesOfFreedom }))
  }
  return [...notes, ...boundNotes(analysis)]
}

/** Which end K ran to, and everything that stays determined there. */
function withoutOptimum(analysis: Parameters<typeof standardErrors>[0]): FitNote {
  const { solution } = analysis
  const { problem, estimated } = solution
  const errors = standardErrors(analysis)
  const values: FitNote['values'] = { end: solution.end }
  estimated.parameters.forEach(({ name }, j) => {
    if (estimated === problem.model && name !== 'T0') return
    values[name] = toOriginal(estimated, problem.data, j, solution.values[j]!)
    values[`${name}StandardError`] = errors.get(name) ?? null
  })
  return note('binding-not-identified', 'problem', values)
}

function boundNotes({ solution, free }: Parameters<typeof standardErrors>[0]): FitNote[] {
  const { problem, values, columns, end } = solution
  if (end) return []
  return free.filter(j => !columns.includes(j)).map((j) => {
    const { name } = problem.model.parameters[j]!
    const isLower = values[j]! <= problem.lower[j]!
    return note('parameter-at-bound', 'caution', { parameter: name, side: isLower ? 'lower' : 'upper', bound: toOriginal(problem.model, problem.data, indexOf(problem.model, name), values[j]!) })
  })
}
