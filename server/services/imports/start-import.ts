import { eq } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { TableImport } from '#shared/contracts/imports'
import type { TableChoices } from '#shared/tables/types'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, recipe, tableImport, upload } from '~~/server/database/schema'
import { objects } from '~~/server/utils/object-store'
import type { Summary } from '~~/server/workers/tables/answers'
import type { Table } from '~~/server/workers/tables/understandings'
import { note } from '../audit'
import { ServiceError } from '../errors'
import { knownBatches, readImport } from './held-import'
import { recipeFor } from './recipes'
import { presentImport } from './show-import'
import { isPaste, sourceOf, type Source } from './source'
import { askTable } from './table-pool'

type Campaign = Pick<typeof campaign.$inferSelect, 'id' | 'project' | 'lab' | 'clouds'>

/** Reads a table, keeps its file whole, and opens an import for what people say about it. A file that cannot be taken is not kept. */
export async function startImport(who: string, of: string, given: Parameters<typeof sourceOf>[0]): Promise<TableImport> {
  const source = sourceOf(given)
  const { head, batches } = await asPerson(who, async tx => ({ head: await readCampaign(tx, of), batches: await knownBatches(tx, of) }))
  const context = { clouds: head.clouds, fileName: source.name, batches: batches.map(({ label, measuredOn }) => ({ label, measuredOn })) }
  const table = { sha256: source.sha256, isPaste: isPaste(source), bytes: source.bytes, choices: {}, context }
  const read = await readByRecipe(who, head.lab, table)
  await objects().put(source.bytes, source.mediaType)
  const held = await asPerson(who, async tx => readImport(tx, await openImport(tx, who, head, source, read)))
  return presentImport(who, held, read.summary)
}

async function readCampaign(tx: Transaction, id: string): Promise<Campaign> {
  const [found] = await tx.select({ id: campaign.id, project: campaign.project, lab: campaign.lab, clouds: campaign.clouds }).from(campaign).where(eq(campaign.id, id))
  return found!
}

interface Read { summary: Summary, choices: TableChoices, recipe: string | null }

/** Reads the table as it says itself and, where the lab has a recipe for its headings, once more by that. */
async function readByRecipe(who: string, lab: string, table: Table): Promise<Read> {
  const plain: Read = { summary: await askTable(table, { kind: 'summary' }), choices: {}, recipe: null }
  const found = await asPerson(who, tx => recipeFor(tx, lab, plain.summary.signature))
  if (!found) return plain
  try {
    return { summary: await askTable({ ...table, choices: found.choices }, { kind: 'summary' }), choices: found.choices, recipe: found.id }
  }
  catch (error) {
    // A recipe that does not fit after all is no reason to refuse the file.
    if (error instanceof ServiceError && error.code === 'invalid') return plain
    throw error
  }
}

async function openImport(tx: Transaction, who: string, head: Campaign, { name, mediaType, bytes, sha256 }: Source, { summary, choices, recipe: by }: Read): Promise<string> {
  const [file, id] = [v7(), v7()]
  await tx.insert(upload).values({ id: file, project: head.project, person: who, name, mediaType, size: bytes.length, sha256 })
  await tx.insert(tableImport).values({ id, project: head.project, campaign: head.id, upload: file, person: who, choices, counts: summary.counts, recipe: by })
  if (by) await tx.update(recipe).set({ usedAt: new Date() }).where(eq(recipe.id, by))
  await note(tx, who, { project: head.project, action: 'started', subject: 'import', id, values: { file: name, rows: summary.counts.total } })
  return id
}
