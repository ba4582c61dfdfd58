/** Runs in a thread of its own: one task a call. Errors do not keep their class across threads, so problems travel as values. */
import type { InputProblem } from '#shared/science/errors'
import { ScienceError } from '#shared/science/errors'
import { compareModels, fit, type ModelComparison } from '#shared/science/fitting'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'

export type Task = { kind: 'fit', request: FitRequest } | { kind: 'compare', request: Omit<FitRequest, 'model' | 'parameters'> }
export type Outcome = { answer: FitResult | ModelComparison } | { problems: readonly InputProblem[] }

export default function carryOut(task: Task): Outcome {
  try {
    return { answer: task.kind === 'fit' ? fit(task.request) : compareModels(task.request) }
  }
  catch (error) {
    if (error instanceof ScienceError) return { problems: error.problems }
    throw error
  }
}
