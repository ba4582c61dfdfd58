import type { H3Error, H3Event } from 'h3'
import { sendProblem } from './utils/problem'

/** Errors outside our routes (a wrong method, a library's refusal) leave the API as problems too; pages keep the page for errors. */
export default async function answerError(error: H3Error, event: H3Event) {
  if (!event.path.startsWith('/api/') || event.handled) return
  await sendProblem(event, error)
}
