import { defineEventHandler, getRequestHeader, type H3Event } from 'h3'
import { ServiceError } from '~~/server/services/errors'
import { sendProblem } from '~~/server/utils/problem'

const safe = ['GET', 'HEAD', 'OPTIONS']

/** A browser says where a form or script comes from; another site's are refused whatever cookie they carry. */
export default defineEventHandler((event) => {
  if (safe.includes(event.method) || isOwn(event)) return
  return sendProblem(event, new ServiceError('forbidden', 'This request comes from another site. Open Anionary itself and try again.'))
})

function isOwn(event: H3Event): boolean {
  if (getRequestHeader(event, 'sec-fetch-site') === 'cross-site') return false
  const origin = getRequestHeader(event, 'origin')
  // Programs that are no browser send none, and carry no cookie that a site could misuse.
  if (origin === undefined) return true
  return URL.canParse(origin) && new URL(origin).host === getRequestHeader(event, 'host')
}
