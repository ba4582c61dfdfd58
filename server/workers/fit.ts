/** Runs in a thread of its own: one task a call. Errors do not keep their class across threads, so problems travel as values. */
import type { MessagePort } from 'node:worker_threads'
import type { InputProblem } from '#shared/science/errors'
import { ScienceError } from '#shared/science/errors'
import { compareModels, fit, type ModelComparison } from '#shared/science/fitting'
import { fitExpression } from '#shared/science/fitting/expression'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'

export type Task = { kind: 'fit', request: FitRequest } | { kind: 'compare', request: Omit<FitRequest, 'model' | 'parameters'> }
export type Outcome = { answer: FitResult | ModelComparison } | { problems: readonly InputProblem[] }

function answerTo({ kind, request }: Task) {
  if (kind === 'compare') return compareModels(request)
  return typeof request.model === 'string' ? fit(request) : fitExpression(request)
}

export default function carryOut({ begun, ...task }: Task & { begun: MessagePort }): Outcome {
  begun.postMessage('begun')
  try {
    return { answer: answerTo(task) }
  }
  catch (error) {
    if (error instanceof ScienceError) return { problems: error.problems }
    throw error
  }
}
