import { MessageChannel } from 'node:worker_threads'
import Piscina from 'piscina'
import { ScienceError } from '#shared/science/errors'
import type { FitRequest, FitResult } from '#shared/science/fitting/types'
import type { ModelComparison } from '#shared/science/fitting'
import type { Outcome, Task } from '~~/server/workers/fit'
import { ServiceError } from './errors'

const timeLimit = 2_000
const threads = 2
const longestQueue = 50

let pool: Piscina | undefined

function fitPool(): Piscina {
  pool ??= new Piscina({
    // Beside the built server: import.meta.url names its entry file, but only after all modules have been read.
    filename: new URL('./workers/fit.mjs', import.meta.url).href,
    minThreads: threads,
    maxThreads: threads,
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
  const outcome = await inTurn(() => withinLimit(task))
  if ('problems' in outcome) throw new ScienceError('unusable-input', outcome.problems)
  return outcome.answer as Answer
}

// The thread says when it begins: time that a busy machine takes to start it is not the fit's.
async function withinLimit(task: Task): Promise<Outcome> {
  const { port1: listening, port2: begun } = new MessageChannel()
  const clock = new AbortController()
  let timer: NodeJS.Timeout | undefined
  listening.once('message', () => timer = setTimeout(() => clock.abort(), timeLimit))
  try {
    return await fitPool().run({ ...task, begun }, { signal: clock.signal, transferList: [begun] }) as Outcome
  }
  catch (error) {
    throw clock.signal.aborted ? tooSlow() : error
  }
  finally {
    clearTimeout(timer)
    listening.close()
  }
}

let running = 0
const waiting: (() => void)[] = []

// Waiting happens here and not in the pool, so that the two seconds are the fit's own.
async function inTurn<Answer>(work: () => Promise<Answer>): Promise<Answer> {
  if (waiting.length >= longestQueue) throw new ServiceError('unavailable', 'Too many fits are waiting. Try again in a few seconds.', { retryAfter: 5 })
  if (running < threads) running++
  else await new Promise<void>(resolve => waiting.push(resolve))
  try {
    return await work()
  }
  finally {
    const next = waiting.shift()
    if (next) next()
    else running--
  }
}

function tooSlow() {
  return new ServiceError('invalid', 'The fit was stopped after two seconds.', {
    faults: [{ path: 'model', message: 'took more than two seconds; choose a simpler model, give starts nearer to the answer, or send fewer points' }],
  })
}

/** Starts the threads before the first request needs them; only once the modules stand, see the note on import.meta.url. */
export function warmFitPool(): void {
  setImmediate(fitPool)
}

export async function closeFitPool(): Promise<void> {
  await pool?.destroy()
  pool = undefined
}
