import { asc, desc, eq } from 'drizzle-orm'
import type { Transaction } from '~~/server/database/client'
import { batchRevision, batchRevisionReading, reading, revisionReading, seriesRevision } from '~~/server/database/schema'
import type { Pinned } from './changes'

export interface Newest { id: string, number: number }

export async function newestOfSeries(tx: Transaction, id: string): Promise<typeof seriesRevision.$inferSelect | undefined> {
  const [found] = await tx.select().from(seriesRevision).where(eq(seriesRevision.series, id)).orderBy(desc(seriesRevision.number)).limit(1)
  return found
}

export async function newestOfBatch(tx: Transaction, id: string): Promise<typeof batchRevision.$inferSelect | undefined> {
  const [found] = await tx.select().from(batchRevision).where(eq(batchRevision.batch, id)).orderBy(desc(batchRevision.number)).limit(1)
  return found
}

type Row = { reading: typeof reading.$inferSelect, reason: string | null, by: string | null, at: Date | null }

const pinnedOf = ({ reading: row, reason, by, at }: Row): Pinned =>
  ({ reading: row, setAside: reason === null ? null : { setAsideReason: reason, setAsideBy: by, setAsideAt: at } })

/** The readings of one revision of a series, in their order. */
export async function pinnedInSeries(tx: Transaction, revision: string): Promise<Pinned[]> {
  const rows = await tx.select({ reading, reason: revisionReading.setAsideReason, by: revisionReading.setAsideBy, at: revisionReading.setAsideAt })
    .from(revisionReading).innerJoin(reading, eq(reading.id, revisionReading.reading))
    .where(eq(revisionReading.revision, revision)).orderBy(asc(revisionReading.number))
  return rows.map(pinnedOf)
}

/** The blanks of one revision of a batch, in their order. */
export async function pinnedInBatch(tx: Transaction, revision: string): Promise<Pinned[]> {
  const rows = await tx.select({ reading, reason: batchRevisionReading.setAsideReason, by: batchRevisionReading.setAsideBy, at: batchRevisionReading.setAsideAt })
    .from(batchRevisionReading).innerJoin(reading, eq(reading.id, batchRevisionReading.reading))
    .where(eq(batchRevisionReading.revision, revision)).orderBy(asc(batchRevisionReading.number))
  return rows.map(pinnedOf)
}

/** As rows of the table that pins them. */
export function pinRows(project: string, revision: string, pinned: readonly Pinned[]) {
  return pinned.map(({ reading: { id }, setAside }, place) => ({ project, revision, reading: id, number: place + 1, ...setAside }))
}
