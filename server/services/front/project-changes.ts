import { and, desc, eq, gt, inArray, ne } from 'drizzle-orm'
import type { ProjectChange } from '#shared/contracts/front'
import type { Transaction } from '~~/server/database/client'
import { auditEvent, batch, campaign, lab, person, series } from '~~/server/database/schema'

const most = 30
const mostAtFirst = 10
/** Jobs and imports on their way are nobody's news. */
const told = inArray(auditEvent.action, ['made', 'changed', 'revised', 'imported'])

/** What others did in a project since then, newest first; on a first visit the newest of anybody. */
export async function changesSince(tx: Transaction, who: string, project: string, since: Date | null): Promise<ProjectChange[]> {
  const rows = await tx.select({ event: auditEvent, by: person.name }).from(auditEvent).leftJoin(person, eq(person.id, auditEvent.person))
    .where(and(eq(auditEvent.project, project), told, since ? and(gt(auditEvent.at, since), ne(auditEvent.person, who)) : undefined))
    .orderBy(desc(auditEvent.at), desc(auditEvent.id)).limit(since ? most : mostAtFirst)
  const subjects = rows.flatMap(({ event }) => event.subjectId ?? [])
  const [seriesOf, campaignOf] = [await seriesAmong(tx, subjects), await campaignsAmong(tx, subjects)]
  return rows.map(({ event, by }) => {
    const about = seriesOf.get(event.subjectId ?? '')
    return {
      id: event.id, at: event.at.toISOString(), by: by ?? 'a former member',
      action: event.action as ProjectChange['action'], subject: event.subject as ProjectChange['subject'],
      series: about ? { id: about.id, salt: about.salt } : null, campaign: about?.campaign ?? campaignOf.get(event.subjectId ?? '') ?? null, values: event.values,
    }
  })
}

const place = { id: campaign.id, name: campaign.name, labId: lab.id, labName: lab.name }
const placeOf = ({ id, name, labId, labName }: { id: string, name: string, labId: string, labName: string }) => ({ id, name, lab: { id: labId, name: labName } })

async function seriesAmong(tx: Transaction, ids: string[]) {
  if (ids.length === 0) return new Map<string, never>()
  const rows = await tx.select({ id: series.id, formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation, place }).from(series)
    .innerJoin(campaign, eq(campaign.id, series.campaign)).innerJoin(lab, eq(lab.id, campaign.lab)).where(inArray(series.id, ids))
  return new Map(rows.map(({ id, place: where, ...salt }) => [id, { id, salt, campaign: placeOf(where) }]))
}

/** Campaigns by their own id and by those of their batches. */
async function campaignsAmong(tx: Transaction, ids: string[]) {
  if (ids.length === 0) return new Map<string, never>()
  const own = await tx.select({ key: campaign.id, ...place }).from(campaign).innerJoin(lab, eq(lab.id, campaign.lab)).where(inArray(campaign.id, ids))
  const byBatch = await tx.select({ key: batch.id, ...place }).from(batch)
    .innerJoin(campaign, eq(campaign.id, batch.campaign)).innerJoin(lab, eq(lab.id, campaign.lab)).where(inArray(batch.id, ids))
  return new Map([...own, ...byBatch].map(({ key, ...where }) => [key, placeOf(where)]))
}
