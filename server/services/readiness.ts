import { sql } from 'drizzle-orm'
import { asSystem } from '~~/server/database/client'
import journal from '~~/server/database/migrations/meta/_journal.json'
import { objects } from '~~/server/utils/object-store'
import { ServiceError } from './errors'

const newestMigration = Math.max(...journal.entries.map(({ when }) => when))

async function checkDatabase(): Promise<string | null> {
  try {
    const { rows } = await asSystem('readiness', tx =>
      tx.execute<{ newest: string | null }>(sql`select max(created_at) as newest from drizzle.__drizzle_migrations`))
    return Number(rows[0]?.newest ?? 0) >= newestMigration ? null : 'the database misses migrations: run the migrate tool'
  }
  catch {
    return 'the database does not answer, or was never migrated'
  }
}

async function checkStorage(): Promise<string | null> {
  try {
    // Any answer will do; nothing lies under this name.
    await objects().exists('0'.repeat(64))
    return null
  }
  catch {
    return 'the object store does not answer'
  }
}

/** @throws ServiceError 'unavailable' naming everything that is missing */
export async function checkReadiness() {
  const missing = (await Promise.all([checkDatabase(), checkStorage()])).filter(one => one !== null)
  if (missing.length > 0) {
    throw new ServiceError('unavailable', 'Not everything is ready yet.', { faults: missing.map(message => ({ path: '', message })), retryAfter: 2 })
  }
  return { status: 'ready' as const }
}
