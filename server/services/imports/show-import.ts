import { inArray } from 'drizzle-orm'
import type { z } from 'zod'
import type { ImportRows, importRowsQuery, TableImport } from '#shared/contracts/imports'
import { asPerson, type Transaction } from '~~/server/database/client'
import { series } from '~~/server/database/schema'
import type { Summary } from '~~/server/workers/tables/answers'
import { readImport, tableOf, type HeldImport } from './held-import'
import { seenQuestion } from './seen-question'
import { askTable } from './table-pool'

/** An import with how its table reads now. */
export async function showImport(who: string, id: string): Promise<TableImport> {
  const held = await asPerson(who, tx => readImport(tx, id))
  return presentImport(who, held, await askTable(tableOf(held), { kind: 'summary' }))
}

/** Some rows of the table, in the order of the file. */
export async function showImportRows(who: string, id: string, { state, look, after, limit }: z.infer<typeof importRowsQuery>): Promise<ImportRows> {
  const held = await asPerson(who, tx => readImport(tx, id))
  return askTable(tableOf(held), { kind: 'rows', onlyTelling: look === 'yes', after, limit, ...(state && { state }) })
}

export async function presentImport(who: string, held: HeldImport, { counts, signature: _, questions, ...summary }: Summary): Promise<TableImport> {
  const { row, file, campaign, lab, project, recipe, seen } = held
  return {
    ...summary,
    id: row.id,
    state: row.state,
    campaign: { id: campaign.id, name: campaign.name, lab },
    project,
    file: { name: file.name, size: file.size, sha256: file.sha256, by: file.by, at: file.createdAt.toISOString() },
    rows: counts,
    questions: [...seenQuestion(seen, row.choices), ...questions],
    recipe,
    series: await asPerson(who, tx => madeSeries(tx, row.made)),
  }
}

async function madeSeries(tx: Transaction, made: HeldImport['row']['made']): Promise<TableImport['series']> {
  if (made.length === 0) return []
  const rows = await tx.select({ id: series.id, salt: { formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation } })
    .from(series).where(inArray(series.id, made.map(one => one.series)))
  return made.flatMap(({ series: id, revision, readings }) => {
    const found = rows.find(row => row.id === id)
    return found ? [{ ...found, revision, readings }] : []
  })
}
