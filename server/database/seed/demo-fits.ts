import { asc, desc, eq } from 'drizzle-orm'
import { fitSeries } from '~~/server/services/fits'
import { series, seriesRevision } from '../schema'
import { projectByName, type Seed } from './seeding'

/** Fits every measured series of the demonstration as the product itself does, in the name of whoever made its newest revision. */
export const demoFits: Seed = {
  name: 'demo-fits',
  async plant(tx) {
    const project = await projectByName(tx, 'Shadehouse gel')
    const newest = await tx.selectDistinctOn([series.id], { id: series.id, by: seriesRevision.madeBy })
      .from(series).innerJoin(seriesRevision, eq(seriesRevision.series, series.id))
      .where(eq(series.project, project)).orderBy(asc(series.id), desc(seriesRevision.number))
    for (const { id, by } of newest) await fitSeries(tx, by, id)
  },
}
