import { eq, inArray } from 'drizzle-orm'
import type { z } from 'zod'
import type { Committed, commitImportContract } from '#shared/contracts/imports'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, series, seriesRevision, tableImport, type ImportedSeries } from '~~/server/database/schema'
import type { Found } from '~~/server/workers/tables/answers'
import { note } from '../audit'
import { ServiceError, type Fault } from '../errors'
import { currentFits, fitSeries } from '../fits'
import { refitBeside } from '../revisions/keep-blanks'
import { refuseClosed } from './change-import'
import { knownBatches, readImport, tableOf, type HeldImport } from './held-import'
import type { Destination } from './new-readings'
import { addBlanks, placeBatches } from './place-batches'
import { addToSeries } from './place-series'
import { keepRecipe } from './recipes'
import { seenQuestion } from './seen-question'
import { askTable } from './table-pool'

const mostAttempts = 5

/**
 * Makes readings of a table, all or none, and fits every series they touch.
 *
 * @throws ServiceError 'invalid' with a fault for every row and question that is still open; 'conflict' where the import is closed
 */
export async function commitImport(who: string, id: string, { recipe }: z.infer<typeof commitImportContract>): Promise<Committed> {
  for (let attempt = 0; attempt < mostAttempts; attempt++) {
    const held = await asPerson(who, tx => readImport(tx, id))
    refuseClosed(held.row)
    const found = await askTable(tableOf(held), { kind: 'found' })
    refuseOpen(held, found)
    const done = await asPerson(who, tx => commit(tx, who, held, found, recipe))
    if (done) return done
  }
  throw new ServiceError('unavailable', 'Others import into this campaign right now. Try again in a few seconds.', { retryAfter: 2 })
}

function refuseOpen({ row, seen }: HeldImport, { open, unanswered, readings }: Found): void {
  const questions = [...seenQuestion(seen, row.choices).filter(({ isBlocking }) => isBlocking), ...unanswered]
  const faults: Fault[] = [
    ...questions.map(({ code, subject, message }) => ({ path: `questions.${code}${subject === '' ? '' : `.${subject}`}`, message })),
    ...open.map(one => ({ path: `rows.${one.row}`, row: one.row, message: one.message })),
  ]
  if (faults.length > 0) throw new ServiceError('invalid', `${faults.length === 1 ? 'One thing is' : `${faults.length} things are`} still open; nothing was imported.`, { faults })
  if (readings.length === 0) throw new ServiceError('invalid', 'No row of the table holds a reading; there is nothing to import.', { faults: [{ path: 'rows', message: 'must hold at least one reading' }] })
}

/** @returns null where the import or the campaign's batches moved on since the table was read */
async function commit(tx: Transaction, who: string, held: HeldImport, { readings, signature }: Found, recipe: string | undefined): Promise<Committed | null> {
  const { file, campaign: { id: of, project, lab, clouds } } = held
  await tx.select({ id: campaign.id }).from(campaign).where(eq(campaign.id, of)).for('update')
  const [now] = await tx.select().from(tableImport).where(eq(tableImport.id, held.row.id)).for('update')
  refuseClosed(now!)
  const known = await knownBatches(tx, of)
  if (now!.version !== held.row.version || JSON.stringify(known) !== JSON.stringify(held.batches)) return null
  const destination: Destination = { project, upload: file.id, who, now: new Date(), clouds }
  const { batchOf, labels } = await placeBatches(tx, readings, { destination, campaign: of, fileName: file.name, known, choices: held.row.choices })
  const blanks = await addBlanks(tx, readings, destination, batchOf, file.name)
  const made = await addToSeries(tx, readings, { destination, campaign: of, lab, fileName: file.name, batchOf })
  if (blanks.size > 0) await refitBeside(tx, who, of)
  else for (const one of made) await fitSeries(tx, who, one.series)
  await tx.update(tableImport).set({ state: 'committed', made, version: now!.version + 1, committedAt: destination.now, changedAt: destination.now }).where(eq(tableImport.id, now!.id))
  if (recipe) await keepRecipe(tx, who, lab, recipe, signature, held.row.choices)
  await note(tx, who, { project, action: 'imported', subject: 'import', id: now!.id, values: { file: file.name, readings: readings.length, series: made.length, campaign: held.campaign.name } })
  return { series: await madeSeries(tx, made), batches: [...labels].map(([id, label]) => ({ id, label, blanks: blanks.get(id) ?? 0 })) }
}

async function madeSeries(tx: Transaction, made: readonly ImportedSeries[]): Promise<Committed['series']> {
  if (made.length === 0) return []
  const rows = await tx.select({
    id: series.id, salt: { formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation }, revision: seriesRevision.id, number: seriesRevision.number,
  }).from(series).innerJoin(seriesRevision, eq(seriesRevision.series, series.id)).where(inArray(series.id, made.map(one => one.series)))
  const fits = await currentFits(tx, rows.map(({ revision }) => revision))
  return made.flatMap(({ series: id, revision: number, readings }) => rows.filter(row => row.id === id && row.number === number).map(({ salt, revision }) => ({
    id, salt, revision: number, readings, fit: fits.get(revision) ?? null,
  })))
}
