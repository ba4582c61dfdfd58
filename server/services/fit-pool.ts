import Piscina from 'piscina'
import { ScienceError } from '#shared/science/errors'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'
import type { ModelComparison } from '#shared/science/fitting'
import type { Outcome, Task } from '~~/server/workers/fit'
import { ServiceError } from './errors'

const timeLimit = 2_000
const longestQueue = 50

let pool: Piscina | undefined

function fitPool(): Piscina {
  pool ??= new Piscina({
    // Beside the built server; import.meta.url names its entry file.
    filename: new URL('./workers/fit.mjs', import.meta.url).href,
    minThreads: 1,
    maxThreads: 2,
    maxQueue: longestQueue,
    idleTimeout: 60_000,
    resourceLimits: { maxOldGenerationSizeMb: 256 },
  })
  return pool
}

/** Fits in a thread that is ended when its two seconds are over, so that no request holds up the others. */
export function fitInPool(request: FitRequest): Promise<FitResult> {
  return run<FitResult>({ kind: 'fit', request })
}

/** Compares the named models in such a thread. */
export function compareInPool(request: Omit<FitRequest, 'model' | 'parameters'>): Promise<ModelComparison> {
  return run<ModelComparison>({ kind: 'compare', request })
}

async function run<Answer>(task: Task): Promise<Answer> {
  const clock = AbortSignal.timeout(timeLimit)
  const outcome = await fitPool().run(task, { signal: clock }).catch((error: unknown) => {
    throw clock.aborted ? tooSlow() : isFull(error) ? new ServiceError('unavailable', 'Too many fits are waiting. Try again in a few seconds.', { retryAfter: 5 }) : error
  }) as Outcome
  if ('problems' in outcome) throw new ScienceError('unusable-input', outcome.problems)
  return outcome.answer as Answer
}

const isFull = (error: unknown) => error instanceof Error && /queue/i.test(error.message)

function tooSlow() {
  return new ServiceError('invalid', 'The fit was stopped after two seconds.', {
    faults: [{ path: 'model', message: 'took more than two seconds; choose a simpler model, give starts nearer to the answer, or send fewer points' }],
  })
}

export async function closeFitPool(): Promise<void> {
  await pool?.destroy()
  pool = undefined
}
