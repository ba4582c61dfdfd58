import { asc, and, eq, inArray, isNull } from 'drizzle-orm'
import type { Series } from '#shared/contracts/series'
import type { FitResult } from '#shared/science/fitting/types'
import type { Transaction } from '~~/server/database/client'
import { batch, campaign, lab, project, reading, series } from '~~/server/database/schema'
import { currentFits } from '../fits'
import { contentOf } from '../series-content'

/** A series as it is taken away. */
export interface Exported {
  project: string
  lab: string
  campaign: string
  salt: string
  scale: 'mol/L' | 'mol/kg'
  revision: number
  readings: Series['readings']
  /** by reading: what the page does not show */
  further: ReadonlyMap<string, { rate: number | null, ph: number | null, measuredOn: string | null }>
  fit: FitResult | null
}

/** Every measured series of a project, or one of them, in the order they were made. */
export async function exportedSeries(tx: Transaction, which: { series: string } | { project: string }): Promise<Exported[]> {
  const heads = await tx.select({ id: series.id, project: project.name, lab: lab.name, campaign: campaign.name, salt: series.saltFormula, scale: series.scale }).from(series)
    .innerJoin(project, eq(project.id, series.project)).innerJoin(campaign, eq(campaign.id, series.campaign)).innerJoin(lab, eq(lab.id, campaign.lab))
    .where(and(isNull(series.deletedAt), 'series' in which ? eq(series.id, which.series) : eq(series.project, which.project)))
    .orderBy(asc(series.id))
  const contents = await contentOf(tx, heads.map(({ id }) => id))
  const fits = await currentFits(tx, [...contents.values()].flatMap(({ revision }) => revision?.id ?? []))
  const ids = [...new Set([...contents.values()].flatMap(({ readings }) => readings.map(({ id }) => id)))]
  const further = new Map(ids.length === 0
    ? []
    : (await tx.select({ id: reading.id, rate: reading.rate, ph: reading.ph, measuredOn: batch.measuredOn }).from(reading)
        .leftJoin(batch, eq(batch.id, reading.batch)).where(inArray(reading.id, ids))).map(({ id, ...rest }) => [id, rest] as const))
  return heads.flatMap(({ id, ...head }) => {
    const { revision, readings } = contents.get(id)!
    return revision ? [{ ...head, revision: revision.number, readings, further, fit: fits.get(revision.id) ?? null }] : []
  })
}
