import type { H3Event } from 'h3'
import { getRequestHeader, readRawBody, setResponseHeader } from 'h3'
import { ServiceError } from '~~/server/services/errors'

/** Room for ordinary JSON, in bytes. */
export const ordinaryBody = 1_000_000

/** Reads the body as JSON, never more than `limit` bytes of it. */
export async function readJson(event: H3Event, limit: number, isOptional: boolean): Promise<unknown> {
  const type = getRequestHeader(event, 'content-type') ?? ''
  const bytes = await readBytes(event, limit)
  if (bytes.length === 0 && isOptional) return {}
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

/** A file as it came. */
export interface UploadedFile {
  name: string
  mediaType: string
  bytes: Uint8Array
}

export function hasFile(event: H3Event): boolean {
  return /^multipart\/form-data\b/i.test(getRequestHeader(event, 'content-type') ?? '')
}

/** Room for the boundaries and names around a file, in bytes. */
const wrapping = 10_000

/** Reads the field `file` of a form. @throws ServiceError 'too-large', 'malformed', or 'invalid' where the field is missing */
export async function readFile(event: H3Event, limit: number): Promise<UploadedFile> {
  const bytes = await readBytes(event, limit + wrapping)
  const headers = { 'content-type': getRequestHeader(event, 'content-type')! }
  const form = await new Response(new Uint8Array(bytes), { headers }).formData().catch(() => {
    throw new ServiceError('malformed', 'The form cannot be read; send multipart/form-data with the field file.')
  })
  const file = form.get('file')
  if (!(file instanceof File)) throw new ServiceError('invalid', 'No file came along.', { faults: [{ path: 'file', message: 'must be a file, in a field of this name' }] })
  return { name: file.name.slice(0, 200) || 'unnamed', mediaType: file.type || 'application/octet-stream', bytes: new Uint8Array(await file.arrayBuffer()) }
}

/** Beyond this many times the limit nobody is waiting for a sentence any more. */
const patience = 10

/** Collects the body up to the limit; what exceeds it is read and dropped, so that the sender hears the answer. */
async function readBytes(event: H3Event, limit: number): Promise<Buffer> {
  const { req } = event.node
  // A page rendered on the server calls without a socket; its body is already in memory.
  if ('body' in req) return await readRawBody(event, false) ?? Buffer.alloc(0)
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let size = 0
    const refuse = () => {
      setResponseHeader(event, 'connection', 'close')
      reject(new ServiceError('too-large', `The body is larger than ${Math.round(limit / 1_000_000)} MB, the most this address takes. Send less at once.`))
    }
    req.on('data', (chunk: Buffer) => {
      size += chunk.length
      if (size <= limit) chunks.push(chunk)
      else chunks.length = 0
      if (size > limit * patience) refuse()
    })
    req.on('end', () => size > limit ? refuse() : resolve(Buffer.concat(chunks)))
    req.on('error', reject)
  })
}
