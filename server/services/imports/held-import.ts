import { and, asc, desc, eq, ne } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import type { TableContext } from '#shared/tables/understand'
import type { Transaction } from '~~/server/database/client'
import { batch, campaign, lab, person, project, recipe, tableImport, upload } from '~~/server/database/schema'
import type { Table } from '~~/server/workers/tables/understandings'
import { isPaste } from './source'

/** An import as it is held: its row, its file, the campaign it is for, and what else its reading depends on. */
export interface HeldImport {
  row: typeof tableImport.$inferSelect
  file: typeof upload.$inferSelect & { by: string }
  campaign: typeof campaign.$inferSelect
  lab: { id: string, name: string }
  project: { id: string, name: string }
  recipe: { id: string, name: string } | null
  batches: TableContext['batches']
  /** who imported the same file into this campaign before */
  seen: { by: string, at: Date } | null
}

/** The batches of a campaign as a table is held against them. */
export function knownBatches(tx: Transaction, of: string): Promise<{ id: string, label: string, measuredOn: string | null }[]> {
  return tx.select({ id: batch.id, label: batch.label, measuredOn: batch.measuredOn }).from(batch).where(eq(batch.campaign, of)).orderBy(asc(batch.id))
}

async function seenBefore(tx: Transaction, { id, campaign: of }: HeldImport['row'], sha256: string): Promise<HeldImport['seen']> {
  const [found] = await tx.select({ by: person.name, at: tableImport.committedAt }).from(tableImport)
    .innerJoin(upload, eq(upload.id, tableImport.upload)).leftJoin(person, eq(person.id, tableImport.person))
    .where(and(eq(tableImport.campaign, of), eq(upload.sha256, sha256), eq(tableImport.state, 'committed'), ne(tableImport.id, id)))
    .orderBy(desc(tableImport.committedAt)).limit(1)
  return found?.at ? { by: found.by ?? 'a former member', at: found.at } : null
}

const uploader = alias(person, 'uploader')

export async function readImport(tx: Transaction, id: string): Promise<HeldImport> {
  const [found] = await tx.select({
    row: tableImport, file: upload, by: uploader.name, campaign, lab: { id: lab.id, name: lab.name }, project: { id: project.id, name: project.name },
    recipe: { id: recipe.id, name: recipe.name },
  }).from(tableImport)
    .innerJoin(upload, eq(upload.id, tableImport.upload)).leftJoin(uploader, eq(uploader.id, upload.person))
    .innerJoin(campaign, eq(campaign.id, tableImport.campaign)).innerJoin(lab, eq(lab.id, campaign.lab))
    .innerJoin(project, eq(project.id, tableImport.project)).leftJoin(recipe, eq(recipe.id, tableImport.recipe))
    .where(eq(tableImport.id, id))
  const { by, file, ...held } = found!
  // What is closed is shown as it was read: batches that it made itself would be asked about.
  const isOpen = held.row.state === 'open'
  return {
    ...held,
    file: { ...file, by: by ?? 'a former member' },
    batches: isOpen ? await knownBatches(tx, held.campaign.id) : [],
    seen: isOpen ? await seenBefore(tx, held.row, file.sha256) : null,
  }
}

/** What a thread needs to read the table. */
export function tableOf({ row, file, campaign: { clouds }, batches }: HeldImport): Table {
  const known = batches.map(({ label, measuredOn }) => ({ label, measuredOn }))
  return { sha256: file.sha256, isPaste: isPaste(file), choices: row.choices, context: { clouds, fileName: file.name, batches: known } }
}
