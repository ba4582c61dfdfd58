import { and, asc, eq, isNull } from 'drizzle-orm'
import { series } from '../database/schema'
import { fitSeries } from '../services/fits'
import type { JobContext } from './carry-out'

/** Fits the newest revision of every series of a project again, each as its revision asks. One transaction a series; fits that exist are found, not made twice. */
export async function refit({ person, project, inTransaction, report }: JobContext): Promise<void> {
  const all = await inTransaction(tx => tx.select({ id: series.id }).from(series)
    .where(and(eq(series.project, project), isNull(series.deletedAt))).orderBy(asc(series.id)))
  await report(0, all.length)
  for (const [index, { id }] of all.entries()) {
    await inTransaction(tx => fitSeries(tx, person, id))
    await report(index + 1, all.length)
  }
}
