import { and, eq, inArray, sql } from 'drizzle-orm'
import { asPerson, asSystem, type Transaction } from '../database/client'
import { job } from '../database/schema'
import type { JobKind } from '../database/schema/jobs'
import { drawBootstrap } from './bootstrap'
import { refit } from './refit'

/** What a handler works with: it does its work in transactions of the person who asked, one a chunk. */
export interface JobContext {
  person: string
  project: string
  /** as it was asked for */
  input: Record<string, unknown>
  inTransaction: <Answer>(work: (tx: Transaction) => Promise<Answer>) => Promise<Answer>
  /** Keeps the progress. @throws JobCancelled, JobInterrupted where the work has to end here */
  report: (done: number, total: number) => Promise<void>
}

export class JobCancelled extends Error {}
/** The worker stops: the queue hands the job to the next one, and the handler goes on where it was. */
export class JobInterrupted extends Error {}

const handlers: Record<JobKind, (context: JobContext) => Promise<void>> = { refit, bootstrap: drawBootstrap }

type JobRow = typeof job.$inferSelect
const unfinished = ['waiting', 'running'] as const

function update(id: string, values: Partial<JobRow>) {
  return asSystem('job', async (tx) => {
    const [row] = await tx.update(job).set({ ...values, version: sql`${job.version} + 1` })
      .where(and(eq(job.id, id), inArray(job.state, [...unfinished]))).returning()
    return row
  })
}

/**
 * Carries out one job: once finished, a second delivery does nothing.
 *
 * @param stopping aborted when this worker has to end
 */
export async function carryOut(id: string, stopping: AbortSignal): Promise<void> {
  const row = await update(id, { state: 'running', startedAt: new Date(), problem: null })
  if (!row) return
  try {
    await handlers[row.kind](contextOf(row, stopping))
    await update(id, { state: 'done', finishedAt: new Date() })
  }
  catch (error) {
    if (error instanceof JobInterrupted) {
      await update(id, { state: 'waiting' })
      throw error
    }
    if (error instanceof JobCancelled) return void await update(id, { state: 'cancelled', finishedAt: new Date() })
    await update(id, { state: 'failed', finishedAt: new Date(), problem: 'The work ended with a fault on our side. What was done before it stays; start it again, and tell an administrator if it fails twice.' })
    throw error
  }
}

function contextOf(row: JobRow, stopping: AbortSignal): JobContext {
  return {
    person: row.person,
    project: row.project!,
    input: row.input,
    inTransaction: work => asPerson(row.person, work),
    async report(done, total) {
      const now = await update(row.id, { done, total })
      if (!now || now.cancelRequested) throw new JobCancelled()
      if (stopping.aborted) throw new JobInterrupted()
    },
  }
}
