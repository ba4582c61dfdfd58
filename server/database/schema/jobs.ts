import { sql } from 'drizzle-orm'
import { boolean, check, index, integer, jsonb, pgEnum, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import { jobStates } from '#shared/contracts/jobs'
import { createdAt, identity, instant } from './columns'
import { person } from './people'
import { project } from './projects'

export const jobState = pgEnum('job_state', jobStates)
export const jobKinds = ['refit', 'bootstrap'] as const
export type JobKind = typeof jobKinds[number]
export const jobKind = pgEnum('job_kind', jobKinds)

/** Long work as a person sees it; the queue only carries its id. */
export const job = pgTable('job', {
  id: identity(),
  kind: jobKind('kind').notNull(),
  project: uuid('project_id').references(() => project.id),
  person: uuid('person_id').notNull().references(() => person.id),
  input: jsonb('input').$type<Record<string, unknown>>().notNull(),
  state: jobState('state').notNull().default('waiting'),
  done: integer('done').notNull().default(0),
  total: integer('total'),
  cancelRequested: boolean('cancel_requested').notNull().default(false),
  problem: text('problem'),
  /** Counts every change; the id of the events a watcher has seen. */
  version: integer('version').notNull().default(1),
  createdAt: createdAt(),
  startedAt: instant('started_at'),
  finishedAt: instant('finished_at'),
}, table => [
  index('job_person').on(table.person, table.createdAt),
  index('job_project').on(table.project, table.createdAt),
  check('job_progress', sql`${table.done} >= 0 and (${table.total} is null or ${table.done} <= ${table.total})`),
]).enableRLS()
