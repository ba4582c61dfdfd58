import { and, eq } from 'drizzle-orm'
import type { z } from 'zod'
import type { Blanks, newBlanksContract } from '#shared/contracts/revisions'
import { asPerson } from '~~/server/database/client'
import { batch, batchRevision, person } from '~~/server/database/schema'
import { ServiceError } from '../errors'
import { blanksIn } from '../series-content'
import { prepareBlanks, refitBeside } from './keep-blanks'

/** The blanks of a batch in their newest state. */
export function showBlanks(who: string, id: string): Promise<Blanks> {
  return asPerson(who, async (tx) => {
    const [head] = await tx.select({ id: batch.id, label: batch.label, measuredOn: batch.measuredOn }).from(batch).where(eq(batch.id, id))
    const revisions = await tx.select({ number: batchRevision.number, summary: batchRevision.summary, by: person.name, at: batchRevision.createdAt })
      .from(batchRevision).leftJoin(person, eq(person.id, batchRevision.madeBy)).where(and(eq(batchRevision.batch, id)))
    return {
      ...head!, blanks: await blanksIn(tx, id),
      revisions: revisions.sort((a, b) => b.number - a.number).map(({ by, at, ...row }) => ({ ...row, by: by ?? 'a former member', at: at.toISOString() })),
    }
  })
}

/**
 * Makes the next revision of a batch's blanks and fits every series that leans on them.
 *
 * @throws ServiceError 'invalid' with every fault; 'conflict' with the newer state
 */
export async function reviseBlanks(who: string, id: string, given: z.infer<typeof newBlanksContract>): Promise<Blanks> {
  const isStale = await asPerson(who, async (tx) => {
    const [{ campaign } = { campaign: '' }] = await tx.select({ campaign: batch.campaign }).from(batch).where(eq(batch.id, id))
    const prepared = (await prepareBlanks(tx, who, { batch: id, ...given }, 'changes'))!
    if (prepared.faults.length > 0) throw new ServiceError('invalid', 'Some of the changes cannot be made; nothing was kept.', { faults: prepared.faults })
    if (prepared.isStale) return true
    await prepared.keep()
    await refitBeside(tx, who, campaign)
    return false
  })
  const current = await showBlanks(who, id)
  if (isStale) throw new ServiceError('conflict', 'The blanks moved on while you worked. Nothing of yours was kept yet; both states are at hand.', { current })
  return current
}
