import { sql } from 'drizzle-orm'
import PgBoss from 'pg-boss'
import type { Transaction } from '../database/client'
import type { JobKind } from '../database/schema/jobs'
import { queueSchema } from './queue-name'

/** What travels through the queue: everything else stands in the job's row. */
export interface QueuedJob {
  job: string
}

// Only writes its statements; the connection is the caller's, so job and message come into being together or not at all.
const sender = new PgBoss({ schema: queueSchema, db: { executeSql: () => Promise.reject(new Error('messages are sent inside a transaction')) } })

/** Retries belong to stops of a worker and lost connections; a handler that fails for good says so in the job's row. */
const retryLimit = 5

/** Puts a job into the queue as part of the caller's transaction. */
export async function enqueue(tx: Transaction, kind: JobKind, job: string): Promise<void> {
  const db = {
    async executeSql(text: string, values: unknown[]) {
      const { rows } = await tx.execute(withValues(text, values))
      return { rows }
    },
  }
  await sender.send(kind, { job } satisfies QueuedJob, { db, retryLimit, retryDelay: 1 })
}

/** `$1 … $n` and their values as one statement of the transaction. */
function withValues(text: string, values: unknown[]) {
  return sql.join(text.split(/\$(\d+)/).map((part, index) => index % 2 === 0 ? sql.raw(part) : sql`${sql.param(values[Number(part) - 1] ?? null)}`))
}
