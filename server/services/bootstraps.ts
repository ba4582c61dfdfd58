import { randomInt } from 'node:crypto'
import { and, desc, eq, inArray, sql } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { Bootstraps, StartBootstrap } from '#shared/contracts/bootstrap'
import type { Job } from '#shared/contracts/jobs'
import { ScienceError } from '#shared/science/errors'
import { pointsOf } from '#shared/science/fitting'
import type { NamedRequest } from '#shared/science/fitting/types'
import { Bootstrap, type BootstrapOptions, type BootstrapResult } from '#shared/science/resampling/bootstrap'
import { asPerson, type Transaction } from '~~/server/database/client'
import { fit, fitResult, job, series } from '~~/server/database/schema'
import { enqueue } from '~~/server/jobs/queue'
import { note } from './audit'
import { ServiceError } from './errors'
import { currentFits } from './fits'
import { writtenJob } from './jobs'
import { contentOf } from './series-content'

/** What the job's row carries: all that the draw needs, so that the series may move on meanwhile. */
export interface BootstrapInput {
  series: string
  fit: string
  request: NamedRequest
  options: BootstrapOptions
}

const bandPlaces = 61

/**
 * Starts a bootstrap of a series' current fit.
 *
 * @throws ServiceError 'invalid' where there is no fit to resample about
 */
export function startBootstrap(who: string, id: string, { seed, ...asked }: StartBootstrap): Promise<Job> {
  return asPerson(who, async (tx) => {
    const [head] = await tx.select({ project: series.project }).from(series).where(eq(series.id, id))
    const current = await currentFitOf(tx, id)
    if (!current) throw new ServiceError('invalid', 'There is no fit to draw about: the readings are too few.', { faults: [{ path: 'series', message: 'must have a fit' }] })
    const largest = Math.max(...current.request.points.map(({ x }) => x))
    const options: BootstrapOptions = {
      ...asked, seed: seed ?? randomInt(2 ** 32), at: Array.from({ length: bandPlaces }, (_, i) => largest * i / (bandPlaces - 1)),
    }
    refuseImpossible(current.request, options)
    const input: BootstrapInput = { series: id, fit: current.id, request: current.request, options }
    const [row] = await tx.insert(job).values({ id: v7(), kind: 'bootstrap', project: head!.project, person: who, input: { ...input }, total: options.samples }).returning()
    await note(tx, who, { project: head!.project, action: 'started', subject: 'job', id: row!.id, values: { kind: 'bootstrap', series: id } })
    await enqueue(tx, 'bootstrap', row!.id)
    return writtenJob(row!)
  })
}

function refuseImpossible(request: NamedRequest, options: BootstrapOptions): void {
  try {
    new Bootstrap(request, options)
  }
  catch (error) {
    if (!(error instanceof ScienceError)) throw error
    throw new ServiceError('invalid', `There is nothing to draw about: ${error.problems.map(({ message }) => message).join('; ')}.`, { faults: error.problems.map(({ path, message }) => ({ path, message })) })
  }
}

async function currentFitOf(tx: Transaction, id: string) {
  const content = (await contentOf(tx, [id])).get(id)
  const found = content?.revision && (await currentFits(tx, [content.revision.id])).get(content.revision.id)
  if (!content || !found || found.model === 'expression') return null
  const [kept] = await tx.select({ options: fit.options }).from(fit).where(eq(fit.id, found.id))
  return { id: found.id, request: { ...kept!.options, model: found.model, points: pointsOf(content.readings) } satisfies NamedRequest }
}

/** Keeps what was drawn beside its fit; drawn the same way before, it is there already. */
export async function keepBootstrap(tx: Transaction, project: string, of: string, result: BootstrapResult): Promise<void> {
  const same = await tx.select({ id: fitResult.id }).from(fitResult)
    .where(and(eq(fitResult.fit, of), eq(fitResult.kind, 'bootstrap'), sql`${fitResult.result} ->> 'seed' = ${String(result.seed)} and ${fitResult.result} ->> 'kind' = ${result.kind} and ${fitResult.result} ->> 'samples' = ${String(result.samples)}`)).limit(1)
  if (same.length === 0) await tx.insert(fitResult).values({ project, fit: of, kind: 'bootstrap', result })
}

/** The bootstraps of the current fit, newest first, and the newest one that is still on its way. */
export function showBootstraps(who: string, id: string): Promise<Bootstraps> {
  return asPerson(who, async (tx) => {
    const current = await currentFitOf(tx, id)
    const rows = current ? await tx.select().from(fitResult).where(and(eq(fitResult.fit, current.id), eq(fitResult.kind, 'bootstrap'))).orderBy(desc(fitResult.createdAt)).limit(10) : []
    const [running] = await tx.select().from(job)
      .where(and(eq(job.kind, 'bootstrap'), sql`${job.input} ->> 'series' = ${id}`, inArray(job.state, ['waiting', 'running']))).orderBy(desc(job.createdAt)).limit(1)
    return {
      results: rows.map(({ id: result, createdAt, result: drawn }) => ({ ...drawn as BootstrapResult, id: result, at: createdAt.toISOString() })),
      job: running ? writtenJob(running) : null,
    }
  })
}
