import { lt, sql } from 'drizzle-orm'
import { asSystem } from '~~/server/database/client'
import { rateLimit } from '~~/server/database/schema'
import { ServiceError } from './errors'

const minute = 60_000
const kept = 10 * minute

/** Counts one request under a key and refuses it when the minute is full; all web processes count together. */
export async function countRequest(key: string, perMinute: number): Promise<void> {
  const now = Date.now()
  const start = new Date(now - now % minute)
  const count = await asSystem('rate-limit', async (tx) => {
    const [row] = await tx.insert(rateLimit).values({ key, minute: start, count: 1 })
      .onConflictDoUpdate({ target: [rateLimit.key, rateLimit.minute], set: { count: sql`${rateLimit.count} + 1` } })
      .returning({ count: rateLimit.count })
    if (row?.count === 1) await tx.delete(rateLimit).where(lt(rateLimit.minute, new Date(now - kept)))
    return row?.count ?? 1
  })
  if (count <= perMinute) return
  const retryAfter = Math.ceil((start.getTime() + minute - now) / 1000)
  throw new ServiceError('too-many', `This address takes ${perMinute} requests a minute. Wait ${retryAfter} seconds, then go on.`, { retryAfter })
}
