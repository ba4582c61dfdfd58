import { v7 } from 'uuid'
import { fold } from '#shared/tables/cells/fold'
import type { FoundReading, TableChoices } from '#shared/tables/types'
import type { Transaction } from '~~/server/database/client'
import { batch, batchRevision, batchRevisionReading } from '~~/server/database/schema'
import { newestOfBatch, pinnedInBatch, pinRows } from '../revisions/pinned'
import { insertInPieces, insertReadings, pinnedReading, readingRow, type Destination } from './new-readings'

export interface KnownBatch { id: string, label: string, measuredOn: string | null }
/** Finds the batch of a reading. */
export type BatchOf = (found: FoundReading) => string

interface Place { destination: Destination, campaign: string, fileName: string, known: readonly KnownBatch[], choices: TableChoices }

/** A reading without a batch belongs to its day, and without a day to its file. */
const labelOf = ({ batch: label, date }: FoundReading, fileName: string) => label ?? date ?? fileName

function isJoined(label: string, { batch: named, date }: FoundReading, choices: TableChoices): boolean {
  if (named === null) return date !== null
  return choices.answers?.findLast(({ code, subject }) => code === 'batch-exists' && subject === label)?.value !== 'apart'
}

/** The label, or the first one after it that is free: 4 March, 4 March (2), … */
function freeLabel(label: string, taken: ReadonlySet<string>): string {
  for (let count = 2; ; count++) {
    const next = `${label} (${count})`
    if (!taken.has(fold(next))) return next
  }
}

/** Finds or makes the batch of every reading, as the answers say. */
export async function placeBatches(tx: Transaction, readings: readonly FoundReading[], { destination, campaign, fileName, known, choices }: Place): Promise<{ batchOf: BatchOf, labels: ReadonlyMap<string, string> }> {
  const byLabel = new Map(known.map(one => [fold(one.label), one]))
  const taken = new Set(byLabel.keys())
  const chosen = new Map<string, string>()
  const labels = new Map<string, string>()
  const made: (typeof batch.$inferInsert)[] = []
  for (const found of readings) {
    const label = labelOf(found, fileName)
    if (chosen.has(label)) continue
    const existing = byLabel.get(fold(label))
    if (existing && isJoined(label, found, choices)) {
      chosen.set(label, existing.id)
      labels.set(existing.id, existing.label)
      continue
    }
    const row = { id: v7(), project: destination.project, campaign, label: taken.has(fold(label)) ? freeLabel(label, taken) : label, measuredOn: found.date }
    taken.add(fold(row.label))
    made.push(row)
    chosen.set(label, row.id)
    labels.set(row.id, row.label)
  }
  if (made.length > 0) await tx.insert(batch).values(made)
  return { batchOf: found => chosen.get(labelOf(found, fileName))!, labels }
}

/** Adds blanks to their batches, each as the next revision. @returns how many came to each batch */
export async function addBlanks(tx: Transaction, readings: readonly FoundReading[], destination: Destination, batchOf: BatchOf, fileName: string): Promise<Map<string, number>> {
  const blanks = readings.filter(({ salt }) => salt === null)
  const counts = new Map<string, number>()
  for (const of of new Set(blanks.map(batchOf))) {
    const own = blanks.filter(found => batchOf(found) === of)
    const rows = own.map(found => readingRow(found, destination, null, of))
    const newest = await newestOfBatch(tx, of)
    const before = newest ? await pinnedInBatch(tx, newest.id) : []
    const id = v7()
    await insertReadings(tx, rows)
    await tx.insert(batchRevision).values({
      id, project: destination.project, batch: of, number: (newest?.number ?? 0) + 1, summary: `${own.length === 1 ? 'a blank' : `${own.length} blanks`} imported from ${fileName}`, madeBy: destination.who,
    })
    const pinned = [...before, ...rows.map((row, index) => pinnedReading(row, own[index]!, destination))]
    await insertInPieces(pinRows(destination.project, id, pinned), piece => tx.insert(batchRevisionReading).values(piece))
    counts.set(of, own.length)
  }
  return counts
}
