import { createHash } from 'node:crypto'
import { and, desc, eq, inArray } from 'drizzle-orm'
import { v7 } from 'uuid'
import { choiceFaults, fitAsChosen, pointsOf, type ChosenFit } from '#shared/science/fitting'
import type { FitResult } from '#shared/science/fitting/types'
import { engine } from '#shared/science/version'
import type { Transaction } from '~~/server/database/client'
import { fit, fitBlank, fitResult, fitRevision, series } from '~~/server/database/schema'
import { ServiceError } from './errors'
import { contentOf, type SeriesContent } from './series-content'

/**
 * Fits the newest revision of a series as it asks to be fitted, and keeps the fit. Asked twice for the same thing it finds the fit that is there.
 *
 * @returns the fit's id, or null where the readings are too few for any model
 */
export async function fitSeries(tx: Transaction, who: string, id: string): Promise<string | null> {
  const content = (await contentOf(tx, [id])).get(id)
  const made = content?.revision ? fitAsChosen(pointsOf(content.readings), content.revision.choice) : null
  return content && made ? keepFit(tx, who, id, content, made) : null
}

/**
 * Whether the newest revision can be fitted as it asks. Too few readings are no fault of the choice.
 *
 * @throws ServiceError 'invalid' with what the engine finds wrong with the options
 */
export async function checkChoice(tx: Transaction, id: string): Promise<void> {
  const content = (await contentOf(tx, [id])).get(id)!
  const choice = content.revision?.choice
  const faults = choice ? choiceFaults(pointsOf(content.readings), choice) : []
  if (faults.length === 0) return
  throw new ServiceError('invalid', 'The fit cannot be made as asked; nothing was kept.', {
    faults: faults.map(({ path, message }) => ({ path: path === 'model' ? 'choice.model' : `choice.options.${path}`, message })),
  })
}

// The blanks' revision and not the blanks themselves: going back to earlier blanks is a new state, and its fit the newest one.
async function keepFit(tx: Transaction, who: string, id: string, { revision, readings, blankRevisions }: SeriesContent, { model, options, result }: ChosenFit) {
  const blanks = readings.filter(one => one.blank && one.entersFit).map(one => one.id)
  const asked = { revisions: [revision!.id], blanks: blankRevisions, model, options, engine: engine.version }
  const fingerprint = createHash('sha256').update(JSON.stringify(asked)).digest('hex')
  const [owner] = await tx.select({ project: series.project }).from(series).where(eq(series.id, id))
  const project = owner!.project
  const [made] = await tx.insert(fit)
    .values({ id: v7(), project, model, options, engineVersion: engine.version, fingerprint, madeBy: who })
    .onConflictDoNothing({ target: fit.fingerprint }).returning({ id: fit.id })
  if (!made) {
    const [there] = await tx.select({ id: fit.id }).from(fit).where(eq(fit.fingerprint, fingerprint))
    return there!.id
  }
  await tx.insert(fitRevision).values({ project, fit: made.id, revision: revision!.id })
  if (blanks.length > 0) await tx.insert(fitBlank).values(blanks.map(reading => ({ project, fit: made.id, reading })))
  await tx.insert(fitResult).values({ project, fit: made.id, kind: 'estimate', result })
  return made.id
}

/** The newest fit of each revision, by the revision's id. */
export async function currentFits(tx: Transaction, revisions: readonly string[]): Promise<Map<string, FitResult & { id: string }>> {
  if (revisions.length === 0) return new Map()
  const rows = await tx.selectDistinctOn([fitRevision.revision], { revision: fitRevision.revision, id: fit.id, result: fitResult.result })
    .from(fitRevision).innerJoin(fit, eq(fit.id, fitRevision.fit))
    .innerJoin(fitResult, eq(fitResult.fit, fit.id))
    .where(and(inArray(fitRevision.revision, [...revisions]), eq(fitResult.kind, 'estimate')))
    .orderBy(fitRevision.revision, desc(fit.createdAt), desc(fit.id), fitResult.createdAt)
  return new Map(rows.map(({ revision, id, result }) => [revision, { ...result as FitResult, id }]))
}
