import { FetchError } from 'ofetch'
import type { Problem } from '#shared/contracts/problem'

/** What a failed request says to a person, in one sentence; nothing typed is lost by it. */
export function sentenceOf(error: unknown): string {
  const answer = error instanceof FetchError ? error.response : undefined
  if (!answer) return 'No connection to the server. Nothing is lost: try again when you are online.'
  const problem = answer._data as Partial<Problem> | undefined
  return problem?.detail ?? 'That did not work, and the fault is ours. Nothing is lost; try again in a moment.'
}
