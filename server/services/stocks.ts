import { eq } from 'drizzle-orm'
import type { Series } from '#shared/contracts/series'
import { asPerson } from '~~/server/database/client'
import { campaign, series, stock } from '~~/server/database/schema'
import { note } from './audit'
import { ServiceError } from './errors'
import { showSeries } from './series'

/** Links the stock a series was measured with. @throws ServiceError 'invalid' for a stock of another salt, lab or project */
export async function linkStock(who: string, id: string, chosen: string | null): Promise<Series> {
  await asPerson(who, async (tx) => {
    const [head] = await tx.select({ project: series.project, anion: series.anion, cation: series.cation, lab: campaign.lab }).from(series)
      .innerJoin(campaign, eq(campaign.id, series.campaign)).where(eq(series.id, id)).for('update', { of: series })
    const [found] = chosen ? await tx.select().from(stock).where(eq(stock.id, chosen)) : []
    const fits = found && found.project === head!.project && found.lab === head!.lab && found.anion === head!.anion && found.cation === head!.cation
    if (chosen && !fits) {
      throw new ServiceError('invalid', 'That stock is not one this series can rest on.', { faults: [{ path: 'stock', message: 'must be a stock of the same salt, made by the campaign\'s lab for this project' }] })
    }
    await tx.update(series).set({ stock: chosen }).where(eq(series.id, id))
    await note(tx, who, { project: head!.project, action: 'changed', subject: 'series', id, values: { stock: chosen } })
  })
  return showSeries(who, id)
}
