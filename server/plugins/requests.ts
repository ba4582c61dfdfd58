import { defineNitroPlugin } from '#imports'
import { getRequestHeader, setResponseHeader } from 'h3'
import { v7 } from 'uuid'
import { logger } from '~~/server/utils/logger'

declare module 'h3' {
  interface H3EventContext {
    requestId?: string
    startedAt?: number
  }
}

const givenId = /^[\w-]{8,64}$/

/** Every request has an id, in its answer and in the log. */
export default defineNitroPlugin((app) => {
  app.hooks.hook('request', (event) => {
    const given = getRequestHeader(event, 'x-request-id') ?? ''
    event.context.requestId = givenId.test(given) ? given : v7()
    event.context.startedAt = performance.now()
    setResponseHeader(event, 'x-request-id', event.context.requestId)
  })
  app.hooks.hook('afterResponse', (event) => {
    const { requestId, startedAt = performance.now() } = event.context
    const path = event.path.split('?')[0]
    logger().info({ requestId, method: event.method, path, status: event.node.res.statusCode, milliseconds: Math.round(performance.now() - startedAt) }, 'request')
  })
})
