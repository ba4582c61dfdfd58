import { interruptShown } from './run.mjs'

/** Thrown between two steps when Ctrl-C or SIGTERM asked for the end: a clean exit, not a failure. */
export class Interrupted extends Error {
  name = 'Interrupted'
}

/**
 * One run of a command that starts things: what was started is stopped in reverse order, however the run ends.
 * @typedef {object} Session
 * @property {(stop: () => Promise<void> | void) => void} onEnd adds what to do at the end
 * @property {() => void} checkpoint throws Interrupted when the end was asked for
 * @property {Promise<void>} interrupted settles when the end is asked for
 */

/**
 * @template T
 * @param {(session: Session) => Promise<T>} work @returns {Promise<T | undefined>} undefined when interrupted
 */
export async function withSession(work) {
  /** @type {(() => Promise<void> | void)[]} */
  const endings = []
  let isAsked = false
  /** @type {Promise<void>} */
  const interrupted = new Promise((settle) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
      process.on(signal, () => {
        isAsked = true
        interruptShown()
        settle()
      })
    }
  })
  const checkpoint = () => {
    if (isAsked) throw new Interrupted()
  }
  try {
    return await work({ onEnd: stop => endings.push(stop), checkpoint, interrupted })
  }
  catch (error) {
    // A long command that the signal ended fails in its own words: the signal is the reason.
    if (!isAsked) throw error
    return undefined
  }
  finally {
    for (const stop of endings.reverse()) await stop()
  }
}
