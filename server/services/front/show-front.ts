import { and, asc, desc, eq, isNull } from 'drizzle-orm'
import type { ProjectFront } from '#shared/contracts/front'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, draft, instrument, lab, sample, series, tableImport } from '~~/server/database/schema'
import { batchesIn } from '../campaign-content'
import { shortConditions } from '../conditions'
import { importRows } from '../imports/list-imports'
import { instruments } from '../instruments'
import { missingFrom } from '../reporting'
import { movedSince } from './moved'
import { changesSince } from './project-changes'
import { lastVisit } from './visits'

/** What a project's front page tells its reader. */
export function showFront(who: string, project: string): Promise<ProjectFront> {
  return asPerson(who, async (tx) => {
    const since = await lastVisit(tx, who, project)
    return {
      since: since?.toISOString() ?? null,
      changes: await changesSince(tx, who, project, since),
      campaigns: await campaignsOf(tx, project),
      waits: { imports: await openImports(tx, who, project), drafts: await draftsOf(tx, who, project) },
      moved: await movedSince(tx, project, since),
    }
  })
}

async function campaignsOf(tx: Transaction, project: string): Promise<ProjectFront['campaigns']> {
  const rows = await tx.select({ campaign, lab: { id: lab.id, name: lab.name }, sample }).from(campaign)
    .innerJoin(lab, eq(lab.id, campaign.lab)).leftJoin(sample, eq(sample.id, campaign.sample))
    .where(and(eq(campaign.project, project), isNull(campaign.deletedAt))).orderBy(asc(lab.name), asc(campaign.id))
  const told: ProjectFront['campaigns'] = []
  for (const { campaign: head, lab: by, sample: measured } of rows) {
    const [device] = head.instrument ? await instruments(tx).where(eq(instrument.id, head.instrument)) : []
    const batches = await batchesIn(tx, head.id)
    told.push({
      id: head.id, name: head.name, lab: by, conditions: shortConditions(head), missing: missingFrom(head, measured, device ?? null),
      batchesWithoutBlanks: batches.filter(one => one.series > 0 && one.blanks === 0).map(({ label }) => label),
    })
  }
  return told
}

async function openImports(tx: Transaction, who: string, project: string) {
  return importRows(tx, and(eq(tableImport.project, project), eq(tableImport.person, who), eq(tableImport.state, 'open')), 20)
}

async function draftsOf(tx: Transaction, who: string, project: string): Promise<ProjectFront['waits']['drafts']> {
  const rows = await tx.select({
    series: series.id, salt: { formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation },
    campaign: { id: campaign.id, name: campaign.name }, lab: { id: lab.id, name: lab.name }, at: draft.updatedAt,
  }).from(draft)
    .innerJoin(series, eq(series.id, draft.subject)).innerJoin(campaign, eq(campaign.id, series.campaign)).innerJoin(lab, eq(lab.id, campaign.lab))
    .where(and(eq(draft.person, who), eq(draft.project, project), eq(draft.kind, 'series'), isNull(series.deletedAt))).orderBy(desc(draft.updatedAt)).limit(20)
  return rows.map(({ campaign: of, lab: by, at, ...row }) => ({ ...row, campaign: { ...of, lab: by }, at: at.toISOString() }))
}
