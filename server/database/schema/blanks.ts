import { sql } from 'drizzle-orm'
import { check, foreignKey, index, integer, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core'
import { batch } from './campaigns'
import { createdAt, identity, instant } from './columns'
import { person } from './people'
import { reading } from './series'

/** A numbered, immutable state of a batch's blanks, as series have theirs. */
export const batchRevision = pgTable('batch_revision', {
  id: identity(),
  project: uuid('project_id').notNull(),
  batch: uuid('batch_id').notNull(),
  number: integer('number').notNull(),
  summary: text('summary').notNull(),
  madeBy: uuid('made_by').notNull().references(() => person.id),
  createdAt: createdAt(),
}, table => [
  unique('batch_revision_in_project').on(table.id, table.project),
  unique('batch_revision_number').on(table.batch, table.number),
  foreignKey({ name: 'batch_revision_batch', columns: [table.batch, table.project], foreignColumns: [batch.id, batch.project] }),
  check('batch_revision_from_one', sql`${table.number} >= 1`),
]).enableRLS()

/** Which blanks a revision of a batch holds, and which of them are set aside and why. */
export const batchRevisionReading = pgTable('batch_revision_reading', {
  project: uuid('project_id').notNull(),
  revision: uuid('revision_id').notNull(),
  reading: uuid('reading_id').notNull(),
  number: integer('number').notNull(),
  setAsideReason: text('set_aside_reason'),
  setAsideBy: uuid('set_aside_by').references(() => person.id),
  setAsideAt: instant('set_aside_at'),
}, table => [
  primaryKey({ columns: [table.revision, table.reading] }),
  unique('batch_revision_reading_number').on(table.revision, table.number),
  foreignKey({ name: 'batch_revision_reading_revision', columns: [table.revision, table.project], foreignColumns: [batchRevision.id, batchRevision.project] }),
  foreignKey({ name: 'batch_revision_reading_reading', columns: [table.reading, table.project], foreignColumns: [reading.id, reading.project] }),
  index('batch_revision_reading_reading').on(table.reading),
  check('batch_revision_reading_set_aside', sql`num_nulls(${table.setAsideReason}, ${table.setAsideBy}, ${table.setAsideAt}) in (0, 3)`),
  check('batch_revision_reading_reason', sql`length(trim(${table.setAsideReason})) > 0`),
]).enableRLS()
