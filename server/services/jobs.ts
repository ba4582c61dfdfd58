import { and, eq, sql } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { Job } from '#shared/contracts/jobs'
import { asPerson } from '~~/server/database/client'
import { job } from '~~/server/database/schema'
import { enqueue } from '~~/server/jobs/queue'
import { note } from './audit'
import { ServiceError } from './errors'

type JobRow = typeof job.$inferSelect

export function writtenJob({ id, kind, state, done, total, cancelRequested, problem, createdAt, finishedAt }: JobRow): Job {
  return { id, kind, state, done, total, cancelRequested, problem, createdAt: createdAt.toISOString(), finishedAt: finishedAt?.toISOString() ?? null }
}

async function readJob(who: string, id: string): Promise<JobRow | undefined> {
  const [row] = await asPerson(who, tx => tx.select().from(job).where(eq(job.id, id)))
  return row
}

/** Whether a job is the person's own, or one they may watch as a member of its project; null where there is nothing to see. */
export async function jobRight(who: string, id: string): Promise<'own' | 'see' | null> {
  const row = await readJob(who, id)
  if (!row) return null
  return row.person === who ? 'own' : 'see'
}

export async function showJob(who: string, id: string): Promise<Job> {
  const row = await readJob(who, id)
  if (!row) throw new ServiceError('not-found', 'There is no such job any more.')
  return writtenJob(row)
}

/** Starts fitting every series of a project again; row and message are written together. */
export function startRefit(who: string, project: string): Promise<Job> {
  return asPerson(who, async (tx) => {
    const id = v7()
    const [row] = await tx.insert(job).values({ id, kind: 'refit', project, person: who, input: {} }).returning()
    await note(tx, who, { project, action: 'started', subject: 'job', id, values: { kind: 'refit' } })
    await enqueue(tx, 'refit', id)
    return writtenJob(row!)
  })
}

/** Asks a job to stop after the piece it is at; a finished job stays as it is. */
export function cancelJob(who: string, id: string): Promise<Job> {
  return asPerson(who, async (tx) => {
    await tx.update(job).set({ cancelRequested: true, version: sql`${job.version} + 1` })
      .where(and(eq(job.id, id), sql`${job.state} in ('waiting', 'running')`))
    const [row] = await tx.select().from(job).where(eq(job.id, id))
    return writtenJob(row!)
  })
}

const lookEvery = 300

/** The states of a job from the first one not yet seen to its end. The id of each is the job's version. */
export async function* watchJob(who: string, id: string, seen: number, gone: AbortSignal) {
  for (let last = seen; !gone.aborted;) {
    const row = await readJob(who, id)
    if (!row) return
    if (row.version > last) {
      last = row.version
      yield { id: String(last), name: 'job', data: writtenJob(row) }
    }
    if (row.finishedAt) return
    await pause(gone)
  }
}

function pause(gone: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(done, lookEvery)
    function done() {
      clearTimeout(timer)
      gone.removeEventListener('abort', done)
      resolve()
    }
    gone.addEventListener('abort', done, { once: true })
  })
}
