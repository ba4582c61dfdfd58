import { foreignKey, index, jsonb, pgEnum, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core'
import { modelNames, type FitRequest, type FitResult } from '#shared/science/fitting/types'
import type { BootstrapResult } from '#shared/science/resampling/bootstrap'
import { createdAt, identity } from './columns'
import { person } from './people'
import { project } from './projects'
import { reading, seriesRevision } from './series'

export const fitModel = pgEnum('fit_model', [...modelNames, 'expression'])

/** How a fit was asked for, beside its readings. */
export type FitOptions = Omit<FitRequest, 'model' | 'points'>

/** One model applied to stated revisions and blanks with stated options. Never changed. */
export const fit = pgTable('fit', {
  id: identity(),
  project: uuid('project_id').notNull().references(() => project.id),
  model: fitModel('model').notNull(),
  options: jsonb('options').$type<FitOptions>().notNull(),
  engineVersion: text('engine_version').notNull(),
  /** SHA-256 over revisions, blanks, model, options and engine: asking twice finds the fit that is there. */
  fingerprint: text('fingerprint').notNull(),
  madeBy: uuid('made_by').notNull().references(() => person.id),
  createdAt: createdAt(),
}, table => [
  unique('fit_in_project').on(table.id, table.project),
  unique('fit_fingerprint').on(table.fingerprint),
  index('fit_project').on(table.project),
]).enableRLS()

export const fitRevision = pgTable('fit_revision', {
  project: uuid('project_id').notNull(),
  fit: uuid('fit_id').notNull(),
  revision: uuid('revision_id').notNull(),
}, table => [
  primaryKey({ columns: [table.fit, table.revision] }),
  foreignKey({ name: 'fit_revision_fit', columns: [table.fit, table.project], foreignColumns: [fit.id, fit.project] }),
  foreignKey({ name: 'fit_revision_revision', columns: [table.revision, table.project], foreignColumns: [seriesRevision.id, seriesRevision.project] }),
  index('fit_revision_revision').on(table.revision),
]).enableRLS()

/** The blanks a fit used: a batch may get more of them later. */
export const fitBlank = pgTable('fit_blank', {
  project: uuid('project_id').notNull(),
  fit: uuid('fit_id').notNull(),
  reading: uuid('reading_id').notNull(),
}, table => [
  primaryKey({ columns: [table.fit, table.reading] }),
  foreignKey({ name: 'fit_blank_fit', columns: [table.fit, table.project], foreignColumns: [fit.id, fit.project] }),
  foreignKey({ name: 'fit_blank_reading', columns: [table.reading, table.project], foreignColumns: [reading.id, reading.project] }),
  index('fit_blank_reading').on(table.reading),
]).enableRLS()

export const fitResultKind = pgEnum('fit_result_kind', ['estimate', 'bootstrap'])

/** What a fit gave; late results, such as a bootstrap, are further rows. */
export const fitResult = pgTable('fit_result', {
  id: identity(),
  project: uuid('project_id').notNull(),
  fit: uuid('fit_id').notNull(),
  kind: fitResultKind('kind').notNull(),
  result: jsonb('result').$type<FitResult | BootstrapResult>().notNull(),
  createdAt: createdAt(),
}, table => [
  foreignKey({ name: 'fit_result_fit', columns: [table.fit, table.project], foreignColumns: [fit.id, fit.project] }),
  index('fit_result_fit').on(table.fit, table.kind),
]).enableRLS()
