import { send, setResponseHeaders, type H3Event } from 'h3'
import type { SentFile } from '~~/server/services/export/export'

/** Sends a file to be saved. The name in plain letters for old browsers, whole for the others (RFC 6266). */
export function sendFile(event: H3Event, { name, mediaType, body }: SentFile) {
  const plain = name.normalize('NFKD').replace(/[^\w.() -]/g, '_')
  setResponseHeaders(event, {
    'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name).replace(/['()*]/g, letter => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`)}`,
    'x-content-type-options': 'nosniff',
  })
  return send(event, body, mediaType)
}
