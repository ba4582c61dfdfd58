import type { H3Event } from 'h3'
import { isError, send, setResponseHeader, setResponseStatus } from 'h3'
import { v7 } from 'uuid'
import type { Problem } from '#shared/contracts/problem'
import { ScienceError } from '#shared/science/errors'
import { ServiceError, refusals, type Refusal } from '~~/server/services/errors'
import { isOutage } from './outage'
import { logger } from './logger'

/** More faults than anybody reads; the rest is counted. */
const mostFaults = 200

const codeOfStatus: Partial<Record<number, Refusal>> = {
  400: 'malformed', 401: 'signed-out', 403: 'forbidden', 404: 'not-found', 405: 'wrong-method', 413: 'too-large', 415: 'wrong-type', 429: 'too-many',
}

const sentences: Partial<Record<Refusal, string>> = {
  'not-found': 'There is nothing at this address, or it is not yours to see.',
  'wrong-method': 'This address exists but does not take this method; /api/v1/openapi.json lists what it takes.',
}

const outageSentence = 'The database does not answer right now; try again in a few seconds.'
/** Seconds; a restart of the database takes about that long. */
const outageWait = 5

/** Any error as RFC 9457 problem details; what is not a refusal becomes a 500 with a reference and no internals. */
export function problemOf(error: unknown): { problem: Problem, retryAfter?: number } {
  if (error instanceof ServiceError) {
    const { code, message, faults, retryAfter, current } = error
    return { problem: { ...refusal(code, message, faults), ...(current !== undefined && { current }) }, retryAfter }
  }
  if (error instanceof ScienceError) {
    return { problem: refusal('invalid', countSentence(error.problems.length), error.problems) }
  }
  const code = isError(error) && !error.unhandled ? codeOfStatus[error.statusCode] : undefined
  if (code) return { problem: refusal(code, sentences[code] ?? refusals[code].title + '.', []) }
  if (isOutage(rootOf(error))) return { problem: refusal('unavailable', outageSentence, []), retryAfter: outageWait }
  return { problem: fault() }
}

/** How many things need a change, in a sentence. */
export function countSentence(count: number): string {
  return count === 1 ? 'One thing in the input needs a change; nothing was done.' : `${count} things in the input need a change; nothing was done.`
}

/** Answers with the problem and logs it when the fault is ours. */
export function sendProblem(event: H3Event, error: unknown) {
  const { problem, retryAfter } = problemOf(error)
  if (problem.status >= 500 && !(error instanceof ServiceError)) {
    logger().error({ requestId: event.context.requestId, reference: problem.reference, err: rootOf(error) }, 'request failed')
  }
  if (retryAfter !== undefined) setResponseHeader(event, 'retry-after', Math.ceil(retryAfter))
  setResponseStatus(event, problem.status)
  return send(event, JSON.stringify(problem), 'application/problem+json')
}

function refusal(code: Refusal, detail: string, faults: Problem['errors'] | readonly Problem['errors'][number][]): Problem {
  const { status, title } = refusals[code]
  const shown = faults.slice(0, mostFaults).map(({ path, row, message }) => ({ path, ...(row !== undefined && { row }), message }))
  if (faults.length > mostFaults) shown.push({ path: '', message: `and ${faults.length - mostFaults} more of the kind` })
  return { type: `urn:anionary:problem:${code}`, title, status, detail, errors: shown }
}

function fault(): Problem {
  const reference = v7()
  return {
    type: 'urn:anionary:problem:fault',
    title: 'Something went wrong on our side',
    status: 500,
    detail: `Nothing was changed. Please try again; if it happens again, quote the reference ${reference}.`,
    reference,
    errors: [],
  }
}

// The driver's error stands behind the query's: the log wants the one that says why.
function rootOf(error: unknown): unknown {
  return error instanceof Error && error.cause instanceof Error ? rootOf(error.cause) : error
}
