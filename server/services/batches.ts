import { and, eq } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { Campaign, newBatchContract } from '#shared/contracts/campaigns'
import { asPerson, type Transaction } from '~~/server/database/client'
import { batch, campaign } from '~~/server/database/schema'
import { note } from './audit'
import { batchesIn } from './campaign-content'
import { ServiceError } from './errors'

type NewBatch = z.infer<typeof newBatchContract>
type Batch = Campaign['batches'][number]

async function readBatch(tx: Transaction, of: string, id: string): Promise<Batch> {
  return (await batchesIn(tx, of)).find(one => one.id === id)!
}

async function refuseTakenLabel(tx: Transaction, of: string, label: string, except?: string): Promise<void> {
  const [taken] = await tx.select({ id: batch.id }).from(batch).where(and(eq(batch.campaign, of), eq(batch.label, label)))
  if (taken && taken.id !== except) {
    throw new ServiceError('conflict', `This campaign has a batch “${label}” already. Choose another label.`, { faults: [{ path: 'label', message: 'is taken' }] })
  }
}

export function makeBatch(who: string, of: string, given: NewBatch): Promise<Batch> {
  return asPerson(who, async (tx) => {
    const [{ project } = { project: '' }] = await tx.select({ project: campaign.project }).from(campaign).where(eq(campaign.id, of))
    await refuseTakenLabel(tx, of, given.label)
    const id = v7()
    await tx.insert(batch).values({ id, project, campaign: of, ...given })
    await note(tx, who, { project, action: 'made', subject: 'batch', id, values: { label: given.label } })
    return readBatch(tx, of, id)
  })
}

export function changeBatch(who: string, id: string, given: NewBatch): Promise<Batch> {
  return asPerson(who, async (tx) => {
    const [before] = await tx.select({ project: batch.project, campaign: batch.campaign }).from(batch).where(eq(batch.id, id)).for('update')
    await refuseTakenLabel(tx, before!.campaign, given.label, id)
    await tx.update(batch).set(given).where(eq(batch.id, id))
    await note(tx, who, { project: before!.project, action: 'changed', subject: 'batch', id, values: { label: given.label } })
    return readBatch(tx, before!.campaign, id)
  })
}
