/** Runs in a thread of its own: one fit a call. Errors do not keep their class across threads, so problems travel as values. */
import type { InputProblem } from '#shared/science/errors'
import { ScienceError } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'

export type FitOutcome = { result: FitResult } | { problems: readonly InputProblem[] }

export default function fitOutcome(request: FitRequest): FitOutcome {
  try {
    return { result: fit(request) }
  }
  catch (error) {
    if (error instanceof ScienceError) return { problems: error.problems }
    throw error
  }
}
