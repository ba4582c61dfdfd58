import { MessageChannel } from 'node:worker_threads'
import Piscina from 'piscina'
import { ServiceError } from './errors'

interface Workshop {
  /** name of the file under the built server's workers */
  file: string
  threads: number
  /** milliseconds a task may take once it has begun */
  timeLimit: number
  memory: number
  longestQueue: number
  isBusy: string
  tooSlow: () => ServiceError
}

/** Threads that carry out one kind of task, each ended when its time is over, so that no request holds up the others. */
export function workshop<Task extends object, Outcome>({ file, threads, timeLimit, memory, longestQueue, isBusy, tooSlow }: Workshop) {
  let pool: Piscina | undefined
  let running = 0
  const waiting: (() => void)[] = []

  function open(): Piscina {
    pool ??= new Piscina({
      // Beside the built server: import.meta.url names its entry file, but only after all modules have been read.
      filename: new URL(`./workers/${file}.mjs`, import.meta.url).href,
      minThreads: threads,
      maxThreads: threads,
      resourceLimits: { maxOldGenerationSizeMb: memory },
    })
    return pool
  }

  // The thread says when it begins: time that a busy machine takes to start it is not the task's.
  async function withinLimit(task: Task): Promise<Outcome> {
    const { port1: listening, port2: begun } = new MessageChannel()
    const clock = new AbortController()
    let timer: NodeJS.Timeout | undefined
    listening.once('message', () => timer = setTimeout(() => clock.abort(), timeLimit))
    try {
      return await open().run({ ...task, begun }, { signal: clock.signal, transferList: [begun] }) as Outcome
    }
    catch (error) {
      throw clock.signal.aborted ? tooSlow() : error
    }
    finally {
      clearTimeout(timer)
      listening.close()
    }
  }

  // Waiting happens here and not in the pool, so that the time is the task's own.
  async function run(task: Task): Promise<Outcome> {
    if (waiting.length >= longestQueue) throw new ServiceError('unavailable', isBusy, { retryAfter: 5 })
    if (running < threads) running++
    else await new Promise<void>(resolve => waiting.push(resolve))
    try {
      return await withinLimit(task)
    }
    finally {
      const next = waiting.shift()
      if (next) next()
      else running--
    }
  }

  /** Starts the threads before the first request needs them; only once the modules stand, see the note on import.meta.url. */
  const warm = () => void setImmediate(open)

  async function close(): Promise<void> {
    await pool?.destroy()
    pool = undefined
  }

  return { run, warm, close }
}
