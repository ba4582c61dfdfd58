import type { H3Event } from 'h3'
import { logger } from './logger'
import { stopping } from './stopping'

export interface StreamedEvent {
  /** What a browser sends back as Last-Event-ID. */
  id: string
  name: string
  data: unknown
}

const heartbeat = 15_000

/** Sends server-sent events until there are no more, the reader leaves, or the server stops. */
export async function sendEvents(event: H3Event, events: AsyncIterable<StreamedEvent>): Promise<void> {
  const response = event.node.res
  event._handled = true
  response.writeHead(200, {
    'content-type': 'text/event-stream',
    'cache-control': 'no-store',
    'connection': 'close',
    // Proxies that buffer would hold every event back until the end.
    'x-accel-buffering': 'no',
  })
  response.write('retry: 2000\n\n')
  const beat = setInterval(() => response.write(': still here\n\n'), heartbeat)
  try {
    for await (const { id, name, data } of events) {
      if (stopping.aborted || response.destroyed) break
      response.write(`id: ${id}\nevent: ${name}\ndata: ${JSON.stringify(data)}\n\n`)
    }
  }
  catch (error) {
    // The head is sent: all that is left is to end. The reader comes back by itself and is told then.
    logger().error({ requestId: event.context.requestId, err: error }, 'event stream ended early')
  }
  finally {
    clearInterval(beat)
    response.end()
  }
}
