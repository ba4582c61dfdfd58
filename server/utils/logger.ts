import pino from 'pino'
import { config } from './config'

let root: pino.Logger | undefined

/** The process's log: one JSON object a line. Secrets and addresses of people never reach it. */
export function logger(): pino.Logger {
  root ??= pino({
    level: config().LOG_LEVEL,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: ['password', 'email', 'headers.cookie', 'headers.authorization', '*.password', '*.email'],
  })
  return root
}

/** Writes down that the database server closed an idle connection; the next query opens a fresh one. */
export function reportLostConnection(error: Error) {
  logger().warn({ err: error }, 'an idle database connection was lost')
}
