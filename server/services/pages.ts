import { z } from 'zod'
import { ServiceError } from './errors'

/** Which part of a list is wanted. */
export interface Page {
  cursor?: string
  limit: number
}

/** The id behind a cursor. @throws ServiceError 'invalid' for anything this service did not hand out */
export function cursorOf(cursor: string): string {
  const id = Buffer.from(cursor, 'base64url').toString('utf8')
  if (z.uuid().safeParse(id).success) return id
  throw new ServiceError('invalid', 'The cursor is not one of ours.', { faults: [{ path: 'query.cursor', message: 'must be the nextCursor of the page before' }] })
}

/** A page of rows read with one row to spare, which only tells that there are more. */
export function pageOf<Row extends { id: string }>(rows: readonly Row[], limit: number): { items: Row[], nextCursor: string | null } {
  const items = rows.slice(0, limit)
  const last = items.at(-1)
  return { items, nextCursor: rows.length > limit && last ? Buffer.from(last.id).toString('base64url') : null }
}
