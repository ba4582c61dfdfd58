import { and, desc, eq, lt, ne, type SQL } from 'drizzle-orm'
import type { ImportSummary } from '#shared/contracts/imports'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, lab, person, tableImport, upload } from '~~/server/database/schema'
import { cursorOf, pageOf, type Page } from '../pages'

/** The imports of a project that are open or done, newest first. */
export function listImports(who: string, of: string, page: Page): Promise<{ items: ImportSummary[], nextCursor: string | null }> {
  return asPerson(who, async (tx) => {
    const wanted = and(eq(tableImport.project, of), ne(tableImport.state, 'discarded'), page.cursor ? lt(tableImport.id, cursorOf(page.cursor)) : undefined)
    return pageOf<ImportSummary>(await importRows(tx, wanted, page.limit + 1), page.limit)
  })
}

/** Imports in a line each, newest first. */
export async function importRows(tx: Transaction, wanted: SQL | undefined, most: number): Promise<ImportSummary[]> {
  const rows = await tx.select({
    id: tableImport.id, name: upload.name, state: tableImport.state, campaign: { id: campaign.id, name: campaign.name }, lab: { id: lab.id, name: lab.name },
    rows: tableImport.counts, by: person.name, at: tableImport.createdAt,
  }).from(tableImport)
    .innerJoin(upload, eq(upload.id, tableImport.upload)).innerJoin(campaign, eq(campaign.id, tableImport.campaign))
    .innerJoin(lab, eq(lab.id, campaign.lab)).leftJoin(person, eq(person.id, tableImport.person))
    .where(wanted).orderBy(desc(tableImport.id)).limit(most)
  return rows.map(({ campaign: of, lab, by, at, ...row }) => ({ ...row, campaign: { ...of, lab }, by: by ?? 'a former member', at: at.toISOString() }))
}
