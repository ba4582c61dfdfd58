import { and, eq } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { NewRevision } from '#shared/contracts/revisions'
import type { Series } from '#shared/contracts/series'
import { asPerson, type Transaction } from '~~/server/database/client'
import { batch, campaign, draft, reading, revisionReading, series, seriesRevision } from '~~/server/database/schema'
import { note } from '../audit'
import { ServiceError, type Fault } from '../errors'
import { checkChoice, fitSeries } from '../fits'
import { showSeries } from '../series'
import { applyChanges, type Changed, type Sheet } from './changes'
import { prepareBlanks, refitBeside } from './keep-blanks'
import { newestOfSeries, pinnedInSeries, pinRows } from './pinned'
import { summaryOf } from './summary'

type Head = Pick<typeof series.$inferSelect, 'id' | 'project' | 'campaign' | 'saltFormula' | 'scale'> & { clouds: typeof campaign.$inferSelect.clouds }

/**
 * Makes the next revision of a series and, with it, of the blanks it leans on; all or nothing.
 *
 * @throws ServiceError 'invalid' with every fault; 'conflict' with the newer state where the series moved on
 */
export async function reviseSeries(who: string, id: string, given: NewRevision): Promise<Series> {
  if (given.changes.length === 0 && given.batches.length === 0 && !given.choice) {
    throw new ServiceError('invalid', 'There is nothing to keep.', { faults: [{ path: 'changes', message: 'must hold a change, or a choice of the fit must be given' }] })
  }
  const isStale = await asPerson(who, tx => revise(tx, who, id, given))
  const current = await showSeries(who, id)
  if (!isStale) return current
  const newest = current.revisions[0]
  const sentence = newest && newest.number !== given.from
    ? `The series moved on while you worked: ${newest.by} kept revision ${newest.number}. Nothing of yours was kept yet; both states are at hand.`
    : 'The blanks of the batch moved on while you worked. Nothing of yours was kept yet; both states are at hand.'
  throw new ServiceError('conflict', sentence, { current })
}

/** @returns true where somebody was quicker; nothing is written then */
async function revise(tx: Transaction, who: string, id: string, given: NewRevision): Promise<boolean> {
  const head = await lockSeries(tx, id)
  const newest = await newestOfSeries(tx, id)
  const blanks = []
  const faults: Fault[] = []
  for (const [index, part] of given.batches.entries()) {
    const prepared = await prepareBlanks(tx, who, part, `batches.${index}.changes`)
    if (prepared) blanks.push(prepared)
    else faults.push({ path: `batches.${index}.batch`, message: 'must be a batch of this campaign' })
  }
  if ((newest?.number ?? null) !== given.from || blanks.some(({ isStale }) => isStale)) return true
  const changed = applyChanges(given.changes, await sheetOf(tx, who, head, newest?.id))
  faults.push(...changed.faults, ...blanks.flatMap(part => part.faults))
  if (faults.length > 0) throw new ServiceError('invalid', 'Some of the changes cannot be made; nothing was kept.', { faults })
  for (const part of blanks) await part.keep()
  if (given.changes.length > 0 || given.choice) await keepRevision(tx, who, head, newest, changed, given)
  if (blanks.length > 0) await refitBeside(tx, who, head.campaign)
  else await fitSeries(tx, who, id)
  if (given.choice) await checkChoice(tx, id)
  await tx.delete(draft).where(and(eq(draft.person, who), eq(draft.kind, 'series'), eq(draft.subject, id)))
  return false
}

async function lockSeries(tx: Transaction, id: string): Promise<Head> {
  const [head] = await tx.select({
    id: series.id, project: series.project, campaign: series.campaign, saltFormula: series.saltFormula, scale: series.scale, clouds: campaign.clouds,
  }).from(series).innerJoin(campaign, eq(campaign.id, series.campaign)).where(eq(series.id, id)).for('update', { of: series })
  return head!
}

async function sheetOf(tx: Transaction, who: string, head: Head, revision: string | undefined): Promise<Sheet> {
  const batches = await tx.select({ id: batch.id }).from(batch).where(eq(batch.campaign, head.campaign))
  return {
    pinned: revision ? await pinnedInSeries(tx, revision) : [], who, now: new Date(), path: 'changes',
    objectTo: x => x > 0 ? null : 'must be above 0: a reading without salt is a blank and belongs to its batch',
    add: ({ x, y, sd, n, note: words, batch: of, direction, limit }) => {
      if (of && !batches.some(({ id }) => id === of)) return { fault: { path: 'batch', message: 'must be a batch of this campaign' } }
      return {
        id: v7(), project: head.project, series: head.id, batch: of, concentration: x, composition: [{ salt: head.saltFormula, value: x, unit: head.scale, varied: true }],
        value: y, sd, sdGiven: sd, sdGivenMeaning: sd === null ? null : 'standard-uncertainty', n, direction: direction ?? (head.clouds === 'on-heating' ? 'heating' : 'cooling'),
        rate: null, ph: null, polymerConcentration: null, limit, note: words || null, origin: { kind: 'typed' }, replaces: null, changeReason: null, changeWords: null,
      }
    },
  }
}

async function keepRevision(tx: Transaction, who: string, head: Head, newest: typeof seriesRevision.$inferSelect | undefined, { pinned, made, told }: Changed, given: NewRevision) {
  if (made.length > 0) await tx.insert(reading).values(made)
  const before = newest?.choice ?? null
  const id = v7()
  const number = (newest?.number ?? 0) + 1
  const summary = given.summary || summaryOf(told, given.choice, before)
  await tx.insert(seriesRevision).values({ id, project: head.project, series: head.id, number, summary, choice: given.choice ?? before, madeBy: who })
  if (pinned.length > 0) await tx.insert(revisionReading).values(pinRows(head.project, id, pinned))
  await note(tx, who, { project: head.project, action: 'revised', subject: 'series', id: head.id, values: { number, summary, ...numbersOf(told) } })
}

/** The one value before and after, where one value changed: the trail shows it without looking further. */
function numbersOf(told: Changed['told']): Record<string, number> {
  const [only] = told
  if (told.length !== 1 || only!.change.kind !== 'correct' || only!.change.to.y === undefined) return {}
  return { before: only!.before!.value, after: only!.change.to.y }
}
