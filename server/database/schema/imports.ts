import { sql } from 'drizzle-orm'
import { check, foreignKey, index, integer, jsonb, pgEnum, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import { importStates } from '#shared/contracts/imports'
import type { RowCounts, TableChoices } from '#shared/tables/types'
import { campaign } from './campaigns'
import { createdAt, identity, instant } from './columns'
import { lab, person } from './people'
import { project } from './projects'
import { upload } from './trail'

/** How a lab's files of one kind are read; found again by the signature of their header. */
export const recipe = pgTable('recipe', {
  id: identity(),
  lab: uuid('lab_id').notNull().references(() => lab.id),
  name: text('name').notNull(),
  signature: text('signature').notNull(),
  choices: jsonb('choices').$type<TableChoices>().notNull(),
  madeBy: uuid('made_by').notNull().references(() => person.id),
  createdAt: createdAt(),
  usedAt: instant('used_at'),
}, table => [
  unique('recipe_name_unique').on(table.lab, table.name),
  index('recipe_signature').on(table.lab, table.signature),
]).enableRLS()

export interface ImportedSeries { series: string, revision: number, readings: number }

export const importState = pgEnum('import_state', importStates)

/** A table on its way to readings. The file is kept whole; what people said about it stands in `choices`. */
export const tableImport = pgTable('table_import', {
  id: identity(),
  project: uuid('project_id').notNull().references(() => project.id),
  campaign: uuid('campaign_id').notNull(),
  upload: uuid('upload_id').notNull().references(() => upload.id),
  person: uuid('person_id').notNull().references(() => person.id),
  state: importState('state').notNull().default('open'),
  choices: jsonb('choices').$type<TableChoices>().notNull(),
  counts: jsonb('counts').$type<RowCounts>().notNull(),
  recipe: uuid('recipe_id').references(() => recipe.id),
  /** What a committed import made. */
  made: jsonb('made').$type<ImportedSeries[]>().notNull().default([]),
  version: integer('version').notNull().default(1),
  createdAt: createdAt(),
  changedAt: instant('changed_at').notNull().defaultNow(),
  committedAt: instant('committed_at'),
}, table => [
  foreignKey({ name: 'table_import_campaign', columns: [table.campaign, table.project], foreignColumns: [campaign.id, campaign.project] }),
  index('table_import_project').on(table.project, table.state),
  index('table_import_upload').on(table.upload),
  check('table_import_committed', sql`(${table.state} = 'committed') = (${table.committedAt} is not null)`),
]).enableRLS()
