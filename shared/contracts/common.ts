import { z } from 'zod'

export const id = z.uuid().describe('UUIDv7')
export const instant = z.iso.datetime().describe('UTC, ISO 8601')
export const named = z.object({ id, name: z.string() })

/** A list that pages by cursor. */
export function listOf<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item), nextCursor: z.string().nullable() })
}

export const pageQuery = z.object({
  cursor: z.string().max(200).optional().describe('nextCursor of the page before'),
  limit: z.coerce.number().int().min(1).max(200).default(100).describe('items a page'),
})
