import { and, eq } from 'drizzle-orm'
import type { ChangeImport, TableImport } from '#shared/contracts/imports'
import type { RowCounts, TableChoices } from '#shared/tables/types'
import { asPerson, type Transaction } from '~~/server/database/client'
import { tableImport } from '~~/server/database/schema'
import { note } from '../audit'
import { ServiceError } from '../errors'
import { readImport, tableOf, type HeldImport } from './held-import'
import { mergeChoices } from './merge-choices'
import { presentImport, showImport } from './show-import'
import { askTable } from './table-pool'

/** Somebody else's word may come in while the table is read; then it is read again with both. */
const mostAttempts = 10

/** @throws ServiceError 'conflict' where the import is closed */
export function refuseClosed({ state }: HeldImport['row']): void {
  if (state === 'committed') throw new ServiceError('conflict', 'This table has been imported already. Change its readings in their series.')
  if (state === 'discarded') throw new ServiceError('conflict', 'This import was discarded. Upload the file again.')
}

/** Adds what a person says about the table. Nobody else's word is lost; a table that cannot be read that way stays as it was. */
export async function changeImport(who: string, id: string, given: ChangeImport): Promise<TableImport> {
  for (let attempt = 0; attempt < mostAttempts; attempt++) {
    const held = await asPerson(who, tx => readImport(tx, id))
    refuseClosed(held.row)
    const next = { ...held, row: { ...held.row, choices: mergeChoices(held.row.choices, given) } }
    const summary = await askTable(tableOf(next), { kind: 'summary' })
    if (await asPerson(who, tx => keepChoices(tx, held.row, next.row.choices, summary.counts))) return presentImport(who, next, summary)
  }
  throw new ServiceError('unavailable', 'Others change this import right now. Try again in a few seconds.', { retryAfter: 2 })
}

/** @returns false where the import moved on since it was read */
async function keepChoices(tx: Transaction, { id, version }: HeldImport['row'], choices: TableChoices, counts: RowCounts): Promise<boolean> {
  const kept = await tx.update(tableImport).set({ choices, counts, version: version + 1, changedAt: new Date() })
    .where(and(eq(tableImport.id, id), eq(tableImport.version, version), eq(tableImport.state, 'open'))).returning({ id: tableImport.id })
  return kept.length > 0
}

/** Closes an import without its readings. The file stays. */
export async function discardImport(who: string, id: string): Promise<TableImport> {
  await asPerson(who, async (tx) => {
    const [row] = await tx.select().from(tableImport).where(eq(tableImport.id, id)).for('update')
    refuseClosed(row!)
    await tx.update(tableImport).set({ state: 'discarded', version: row!.version + 1, changedAt: new Date() }).where(eq(tableImport.id, id))
    await note(tx, who, { project: row!.project, action: 'discarded', subject: 'import', id })
  })
  return showImport(who, id)
}
