import { and, asc, count, countDistinct, desc, eq, isNull } from 'drizzle-orm'
import type { Campaign } from '#shared/contracts/campaigns'
import type { Transaction } from '~~/server/database/client'
import { batch, batchRevision, batchRevisionReading, reading, series } from '~~/server/database/schema'
import { currentFits } from './fits'
import { contentOf } from './series-content'

/** The batches of a campaign, each with the newest state of its blanks and the number of series that lean on them. */
export async function batchesIn(tx: Transaction, campaign: string): Promise<Campaign['batches']> {
  const used = tx.select({ batch: reading.batch, series: countDistinct(reading.series).as('series') }).from(reading).groupBy(reading.batch).as('used')
  const held = tx.select({ revision: batchRevisionReading.revision, blanks: count().as('blanks') }).from(batchRevisionReading)
    .groupBy(batchRevisionReading.revision).as('held')
  const rows = await tx.selectDistinctOn([batch.id], {
    id: batch.id, label: batch.label, measuredOn: batch.measuredOn, referenceCheck: batch.referenceCheck, note: batch.note,
    revision: batchRevision.number, blanks: held.blanks, series: used.series,
  }).from(batch)
    .leftJoin(batchRevision, eq(batchRevision.batch, batch.id))
    .leftJoin(held, eq(held.revision, batchRevision.id))
    .leftJoin(used, eq(used.batch, batch.id))
    .where(eq(batch.campaign, campaign)).orderBy(batch.id, desc(batchRevision.number))
  return rows.map(row => ({ ...row, blanks: row.blanks ?? 0, series: row.series ?? 0 }))
}

/** The series of a campaign with how much each holds. */
export async function seriesIn(tx: Transaction, campaign: string): Promise<Campaign['series']> {
  const rows = await tx.select({ id: series.id, salt: { formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation } })
    .from(series).where(and(eq(series.campaign, campaign), isNull(series.deletedAt))).orderBy(asc(series.id))
  const contents = await contentOf(tx, rows.map(({ id }) => id))
  const fits = await currentFits(tx, [...contents.values()].flatMap(({ revision }) => revision?.id ?? []))
  return rows.map(({ id, salt }) => {
    const { revision, readings } = contents.get(id)!
    return { id, salt, readings: readings.filter(({ blank }) => !blank).length, isFitted: revision !== null && fits.has(revision.id) }
  })
}
