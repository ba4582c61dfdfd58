import { and, eq, isNull } from 'drizzle-orm'
import { v7 } from 'uuid'
import { readSalt } from '#shared/science/chemistry/read-salt'
import type { Salt } from '#shared/science/chemistry/salts'
import type { FoundReading } from '#shared/tables/types'
import type { Transaction } from '~~/server/database/client'
import { revisionReading, series, seriesRevision, stock, type ImportedSeries } from '~~/server/database/schema'
import { newestOfSeries, pinnedInSeries, pinRows } from '../revisions/pinned'
import { insertInPieces, insertReadings, pinnedReading, readingRow, type Destination } from './new-readings'
import type { BatchOf } from './place-batches'

interface Place { destination: Destination, campaign: string, lab: string, fileName: string, batchOf: BatchOf }

function saltOf(formula: string): Salt {
  const reading = readSalt(formula)
  if (reading.kind !== 'salt') throw new Error(`a ready row names ${formula}, which is no salt`)
  return reading.salt
}

/** The lab's stock of a salt, where there is exactly one. */
async function onlyStock(tx: Transaction, project: string, lab: string, formula: string): Promise<string | null> {
  const found = await tx.select({ id: stock.id }).from(stock).where(and(eq(stock.project, project), eq(stock.lab, lab), eq(stock.saltFormula, formula))).limit(2)
  return found.length === 1 ? found[0]!.id : null
}

async function findOrMake(tx: Transaction, formula: string, scale: FoundReading['scale'], { destination: { project }, campaign, lab }: Place): Promise<string> {
  const [found] = await tx.select({ id: series.id }).from(series)
    .where(and(eq(series.campaign, campaign), eq(series.saltFormula, formula), eq(series.scale, scale), isNull(series.deletedAt)))
  if (found) return found.id
  const { name, anion, cation } = saltOf(formula)
  const id = v7()
  await tx.insert(series).values({ id, project, campaign, stock: await onlyStock(tx, project, lab, formula), saltFormula: formula, saltName: name, anion, cation, scale })
  return id
}

async function addReadings(tx: Transaction, id: string, own: readonly FoundReading[], { destination, fileName, batchOf }: Place): Promise<ImportedSeries> {
  const newest = await newestOfSeries(tx, id)
  const before = newest ? await pinnedInSeries(tx, newest.id) : []
  const rows = own.map(found => readingRow(found, destination, id, batchOf(found)))
  const revision = { id: v7(), number: (newest?.number ?? 0) + 1 }
  await insertReadings(tx, rows)
  await tx.insert(seriesRevision).values({
    ...revision, project: destination.project, series: id, choice: newest?.choice ?? null, madeBy: destination.who,
    summary: `${own.length === 1 ? 'a reading' : `${own.length} readings`} imported from ${fileName}`,
  })
  const pinned = [...before, ...rows.map((row, index) => pinnedReading(row, own[index]!, destination))]
  await insertInPieces(pinRows(destination.project, revision.id, pinned), piece => tx.insert(revisionReading).values(piece))
  return { series: id, revision: revision.number, readings: own.length }
}

/** Adds readings to the series of their salts, made where they are missing, each as its next revision. */
export async function addToSeries(tx: Transaction, readings: readonly FoundReading[], place: Place): Promise<ImportedSeries[]> {
  const groups = new Map<string, FoundReading[]>()
  for (const found of readings) {
    if (found.salt === null) continue
    const key = `${found.salt} ${found.scale}`
    const known = groups.get(key)
    if (known) known.push(found)
    else groups.set(key, [found])
  }
  const made: ImportedSeries[] = []
  for (const own of groups.values()) {
    const { salt, scale } = own[0]!
    made.push(await addReadings(tx, await findOrMake(tx, salt!, scale, place), own, place))
  }
  return made
}
