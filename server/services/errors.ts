/** Every way a service can refuse; each leaves as one HTTP status. */
export const refusals = {
  'malformed': { status: 400, title: 'The request cannot be read' },
  'invalid': { status: 400, title: 'The input needs a change' },
  'signed-out': { status: 401, title: 'Please sign in' },
  'wrong-credentials': { status: 401, title: 'Sign-in failed' },
  'forbidden': { status: 403, title: 'Not allowed' },
  'not-found': { status: 404, title: 'Not found' },
  'wrong-method': { status: 405, title: 'This address does not take that method' },
  'conflict': { status: 409, title: 'Somebody was quicker' },
  'too-large': { status: 413, title: 'Too large' },
  'wrong-type': { status: 415, title: 'Send JSON' },
  'too-many': { status: 429, title: 'Please wait' },
  'unavailable': { status: 503, title: 'Not ready' },
} as const
export type Refusal = keyof typeof refusals

/** One thing wrong with the input: where it stands, and a sentence that says what to do. */
export interface Fault {
  path: string
  row?: number
  message: string
}

interface Details {
  faults?: readonly Fault[]
  /** Seconds until it is worth trying again. */
  retryAfter?: number
  /** With a conflict: the newer state. */
  current?: unknown
}

/** A refusal with a sentence for the person who asked. */
export class ServiceError extends Error {
  readonly faults: readonly Fault[]
  readonly retryAfter: number | undefined
  readonly current: unknown

  constructor(readonly code: Refusal, detail: string, { faults = [], retryAfter, current }: Details = {}) {
    super(detail)
    this.name = 'ServiceError'
    this.faults = faults
    this.retryAfter = retryAfter
    this.current = current
  }
}
