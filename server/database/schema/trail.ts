import { sql } from 'drizzle-orm'
import { bigint, check, index, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import { createdAt, identity, instant } from './columns'
import { lab, person } from './people'
import { project } from './projects'

/** Who did what, when. Holds ids of persons, never their names, and is never changed. */
export const auditEvent = pgTable('audit_event', {
  id: identity(),
  at: instant('at').notNull().defaultNow(),
  person: uuid('person_id').references(() => person.id),
  project: uuid('project_id').references(() => project.id),
  lab: uuid('lab_id').references(() => lab.id),
  action: text('action').notNull(),
  subject: text('subject').notNull(),
  subjectId: uuid('subject_id'),
  values: jsonb('details').$type<Record<string, string | number | boolean | null>>().notNull(),
}, table => [
  index('audit_event_project').on(table.project, table.at),
  index('audit_event_person').on(table.person, table.at),
]).enableRLS()

/** A file as it came; its bytes lie in the object store under their SHA-256. */
export const upload = pgTable('upload', {
  id: identity(),
  project: uuid('project_id').notNull().references(() => project.id),
  person: uuid('person_id').notNull().references(() => person.id),
  name: text('name').notNull(),
  mediaType: text('media_type').notNull(),
  size: bigint('size', { mode: 'number' }).notNull(),
  sha256: text('sha256').notNull(),
  createdAt: createdAt(),
}, table => [
  index('upload_project').on(table.project, table.createdAt),
  check('upload_hash', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
]).enableRLS()

/** What a person has typed and not yet kept. */
export const draft = pgTable('draft', {
  id: identity(),
  person: uuid('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  project: uuid('project_id').references(() => project.id),
  kind: text('kind').notNull(),
  subject: uuid('subject_id'),
  content: jsonb('content').notNull(),
  createdAt: createdAt(),
  updatedAt: instant('updated_at').notNull().defaultNow(),
}, table => [
  unique('draft_one_a_subject').on(table.person, table.kind, table.subject).nullsNotDistinct(),
]).enableRLS()

/** Which seeds have been planted, so that a second run does nothing. */
export const seed = pgTable('seed', {
  name: text('name').primaryKey(),
  plantedAt: instant('planted_at').notNull().defaultNow(),
}).enableRLS()
