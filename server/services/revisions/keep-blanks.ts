import { and, eq, isNull } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { Change } from '#shared/contracts/revisions'
import type { Transaction } from '~~/server/database/client'
import { batch, batchRevision, batchRevisionReading, campaign, reading, series } from '~~/server/database/schema'
import { note } from '../audit'
import type { Fault } from '../errors'
import { fitSeries } from '../fits'
import { applyChanges, type Sheet } from './changes'
import { newestOfBatch, pinnedInBatch, pinRows } from './pinned'
import { summaryOf } from './summary'

export interface BlankChanges { batch: string, from: number | null, changes: readonly Change[] }
export interface Prepared { faults: Fault[], isStale: boolean, keep: () => Promise<void> }

const notZero = 'must be 0: a blank holds no salt'

/** Locks a batch and applies changes to its blanks; nothing is written before `keep`. Null where the batch is not there. */
export async function prepareBlanks(tx: Transaction, who: string, { batch: id, from, changes }: BlankChanges, path: string): Promise<Prepared | null> {
  const [head] = await tx.select({ project: batch.project, campaign: batch.campaign, label: batch.label, clouds: campaign.clouds }).from(batch)
    .innerJoin(campaign, eq(campaign.id, batch.campaign)).where(eq(batch.id, id)).for('update', { of: batch })
  if (!head) return null
  const newest = await newestOfBatch(tx, id)
  if ((newest?.number ?? null) !== from) return { faults: [], isStale: true, keep: async () => {} }
  const sheet: Sheet = {
    pinned: newest ? await pinnedInBatch(tx, newest.id) : [], who, now: new Date(), path,
    objectTo: x => x === 0 ? null : notZero,
    add: ({ y, sd, n, note: words, direction, limit }) => ({
      id: v7(), project: head.project, series: null, batch: id, concentration: 0, composition: [], value: y, sd, sdGiven: sd, sdGivenMeaning: sd === null ? null : 'standard-uncertainty',
      n, direction: direction ?? (head.clouds === 'on-heating' ? 'heating' : 'cooling'), rate: null, ph: null, polymerConcentration: null, limit, note: words || null,
      origin: { kind: 'typed' }, replaces: null, changeReason: null, changeWords: null,
    }),
  }
  const { pinned, made, faults, told } = applyChanges(changes, sheet)
  const keep = async () => {
    if (made.length > 0) await tx.insert(reading).values(made)
    const revision = v7()
    const number = (newest?.number ?? 0) + 1
    const summary = summaryOf(told, undefined, null).replaceAll('reading', 'blank')
    await tx.insert(batchRevision).values({ id: revision, project: head.project, batch: id, number, summary, madeBy: who })
    if (pinned.length > 0) await tx.insert(batchRevisionReading).values(pinRows(head.project, revision, pinned))
    await note(tx, who, { project: head.project, action: 'revised', subject: 'blanks', id, values: { label: head.label, number, summary } })
  }
  return { faults, isStale: false, keep }
}

/** Fits every series of a campaign that the changed blanks can touch; fits that stand are found again. */
export async function refitBeside(tx: Transaction, who: string, of: string): Promise<void> {
  const beside = await tx.select({ id: series.id }).from(series).where(and(eq(series.campaign, of), isNull(series.deletedAt)))
  for (const { id } of beside) await fitSeries(tx, who, id)
}
