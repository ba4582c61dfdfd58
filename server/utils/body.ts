import type { H3Event } from 'h3'
import { getRequestHeader, readRawBody, setResponseHeader } from 'h3'
import { ServiceError } from '~~/server/services/errors'

/** Room for ordinary JSON, in bytes. */
export const ordinaryBody = 1_000_000

/** Reads the body as JSON, never more than `limit` bytes of it. */
export async function readJson(event: H3Event, limit: number): Promise<unknown> {
  const type = getRequestHeader(event, 'content-type') ?? ''
  const bytes = await readBytes(event, limit)
  if (bytes.length === 0) throw new ServiceError('malformed', 'The request has no body; send JSON.')
  if (!/^application\/(?:[\w.+-]+\+)?json\b/i.test(type)) {
    throw new ServiceError('wrong-type', 'The body must be JSON, sent with the header content-type: application/json.')
  }
  try {
    return JSON.parse(bytes.toString('utf8')) as unknown
  }
  catch (error) {
    // NaN and Infinity are not JSON; whoever writes them gets told here.
    const hint = /\b(?:NaN|Infinity)\b/.test(bytes.toString('utf8')) ? ' JSON knows no NaN and no Infinity: leave such readings out.' : ''
    throw new ServiceError('malformed', `The body is not JSON: ${(error as Error).message}.${hint}`)
  }
}

async function readBytes(event: H3Event, limit: number): Promise<Buffer> {
  const tooLarge = () => {
    // What is still on its way is read and dropped, so that the answer arrives; then the connection ends.
    setResponseHeader(event, 'connection', 'close')
    event.node.req.resume()
    return new ServiceError('too-large', `The body is larger than ${Math.round(limit / 1_000_000)} MB, the most this address takes.`)
  }
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > limit) throw tooLarge()
  // A page rendered on the server calls without a socket; its body is already in memory.
  if ('body' in event.node.req) return await readRawBody(event, false) ?? Buffer.alloc(0)
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let size = 0
    event.node.req.on('data', (chunk: Buffer) => {
      size += chunk.length
      if (size <= limit) return chunks.push(chunk)
      chunks.length = 0
      reject(tooLarge())
    })
    event.node.req.on('end', () => resolve(Buffer.concat(chunks)))
    event.node.req.on('error', reject)
  })
}
