import { and, eq, isNull } from 'drizzle-orm'
import { asPerson } from '~~/server/database/client'
import { batch, campaign, sample, series, stock, tableImport } from '~~/server/database/schema'

const tables = { batch, campaign, import: tableImport, sample, series, stock } as const
export type Thing = keyof typeof tables

/** The project that holds a thing a person may see; null where there is nothing to see. */
export function projectHolding(who: string, thing: Thing, id: string): Promise<string | null> {
  const table = tables[thing]
  return asPerson(who, async (tx) => {
    const isThere = 'deletedAt' in table ? isNull(table.deletedAt) : undefined
    const [found] = await tx.select({ project: table.project }).from(table).where(and(eq(table.id, id), isThere))
    return found?.project ?? null
  })
}
