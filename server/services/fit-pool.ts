import Piscina from 'piscina'
import { ScienceError } from '#shared/science/errors'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'
import type { FitOutcome } from '~~/server/workers/fit'
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
export async function fitInPool(request: FitRequest): Promise<FitResult> {
  const outcome = await run(request)
  if ('problems' in outcome) throw new ScienceError('unusable-input', outcome.problems)
  return outcome.result
}

async function run(request: FitRequest): Promise<FitOutcome> {
  const clock = AbortSignal.timeout(timeLimit)
  try {
    return await fitPool().run(request, { signal: clock }) as FitOutcome
  }
  catch (error) {
    if (clock.aborted) {
      throw new ServiceError('invalid', 'The fit was stopped after two seconds.', {
        faults: [{ path: 'model', message: 'took more than two seconds; simplify the expression, give starts nearer to the answer, or send fewer points' }],
      })
    }
    if (error instanceof Error && /queue/i.test(error.message)) {
      throw new ServiceError('unavailable', 'Too many fits are waiting. Try again in a few seconds.', { retryAfter: 5 })
    }
    throw error
  }
}

export async function closeFitPool(): Promise<void> {
  await pool?.destroy()
  pool = undefined
}
