import { ScienceError } from '#shared/science/errors'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'
import type { ModelComparison } from '#shared/science/fitting'
import type { Outcome, Task } from '~~/server/workers/fit'
import { ServiceError } from './errors'
import { workshop } from './threads'

const { run, warm, close } = workshop<Task, Outcome>({
  file: 'fit', threads: 2, timeLimit: 2_000, memory: 256, longestQueue: 50,
  isBusy: 'Too many fits are waiting. Try again in a few seconds.',
  tooSlow: () => new ServiceError('invalid', 'The fit was stopped after two seconds.', {
    faults: [{ path: 'model', message: 'took more than two seconds; choose a simpler model, give starts nearer to the answer, or send fewer points' }],
  }),
})

export { warm as warmFitPool, close as closeFitPool }

/** Fits in a thread that is ended when its two seconds are over. */
export function fitInPool(request: FitRequest): Promise<FitResult> {
  return answerOf<FitResult>({ kind: 'fit', request })
}

/** Compares the named models in such a thread. */
export function compareInPool(request: Omit<FitRequest, 'model' | 'parameters'>): Promise<ModelComparison> {
  return answerOf<ModelComparison>({ kind: 'compare', request })
}

async function answerOf<Answer>(task: Task): Promise<Answer> {
  const outcome = await run(task)
  if ('problems' in outcome) throw new ScienceError('unusable-input', outcome.problems)
  return outcome.answer as Answer
}
