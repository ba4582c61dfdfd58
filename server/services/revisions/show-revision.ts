import { and, eq } from 'drizzle-orm'
import type { SeriesState } from '#shared/contracts/revisions'
import { asPerson } from '~~/server/database/client'
import { person, seriesRevision } from '~~/server/database/schema'
import { ServiceError } from '../errors'
import { currentFits } from '../fits'
import { earlierContent } from '../series-content'

/** One revision of a series with the fit that belonged to it. */
export function showRevision(who: string, id: string, number: number): Promise<SeriesState> {
  return asPerson(who, async (tx) => {
    const content = await earlierContent(tx, id, number)
    if (!content?.revision) throw new ServiceError('not-found', `The series has no revision ${number}.`)
    const [head] = await tx.select({ summary: seriesRevision.summary, by: person.name, at: seriesRevision.createdAt }).from(seriesRevision)
      .leftJoin(person, eq(person.id, seriesRevision.madeBy)).where(and(eq(seriesRevision.series, id), eq(seriesRevision.number, number)))
    const { summary, by, at } = head!
    const fits = await currentFits(tx, [content.revision.id])
    return {
      number, summary, by: by ?? 'a former member', at: at.toISOString(), choice: content.revision.choice,
      readings: content.readings, fit: fits.get(content.revision.id) ?? null,
    }
  })
}
