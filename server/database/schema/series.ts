import { sql } from 'drizzle-orm'
import { check, doublePrecision, foreignKey, index, integer, jsonb, pgEnum, pgTable, primaryKey, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { changeReasons, readingLimits, type FitChoice } from '#shared/contracts/series'
import { batch, campaign, temperatureDirection } from './campaigns'
import { createdAt, deletedAt, identity, instant } from './columns'
import { stock } from './materials'
import { person } from './people'

export const concentrationScale = pgEnum('concentration_scale', ['mol/L', 'mol/kg'])

/** Cloud point against concentration for one salt in one campaign. Its content lives in revisions. */
export const series = pgTable('series', {
  id: identity(),
  project: uuid('project_id').notNull(),
  campaign: uuid('campaign_id').notNull(),
  stock: uuid('stock_id'),
  saltFormula: text('salt_formula').notNull(),
  saltName: text('salt_name').notNull(),
  anion: text('anion').notNull(),
  cation: text('cation').notNull(),
  scale: concentrationScale('scale').notNull().default('mol/L'),
  createdAt: createdAt(),
  deletedAt: deletedAt(),
}, table => [
  unique('series_in_project').on(table.id, table.project),
  foreignKey({ name: 'series_campaign', columns: [table.campaign, table.project], foreignColumns: [campaign.id, campaign.project] }),
  foreignKey({ name: 'series_stock', columns: [table.stock, table.project], foreignColumns: [stock.id, stock.project] }),
  /** Two people who import at once add to one series. */
  uniqueIndex('series_salt_unique').on(table.campaign, table.saltFormula, table.scale).where(sql`${table.deletedAt} is null`),
  index('series_project').on(table.project, table.id),
  index('series_campaign').on(table.campaign),
]).enableRLS()

/** A numbered, immutable state of a series; every edit makes the next one. */
export const seriesRevision = pgTable('series_revision', {
  id: identity(),
  project: uuid('project_id').notNull(),
  series: uuid('series_id').notNull(),
  number: integer('number').notNull(),
  summary: text('summary').notNull(),
  /** How it asks to be fitted; null: by the form its readings support. */
  choice: jsonb('choice').$type<FitChoice>(),
  madeBy: uuid('made_by').notNull().references(() => person.id),
  createdAt: createdAt(),
}, table => [
  unique('series_revision_in_project').on(table.id, table.project),
  unique('series_revision_number').on(table.series, table.number),
  foreignKey({ name: 'series_revision_series', columns: [table.series, table.project], foreignColumns: [series.id, series.project] }),
  check('series_revision_from_one', sql`${table.number} >= 1`),
]).enableRLS()

export interface Component { salt: string, value: number, unit: 'mol/L' | 'mol/kg', varied: boolean }
export type Origin = { kind: 'typed' } | { kind: 'demonstration' } | { kind: 'file', upload: string, row: number } | { kind: 'ramp', ramp: string }

export const readingLimit = pgEnum('reading_limit', readingLimits)
export const changeReason = pgEnum('change_reason', changeReasons)
export const sdMeaning = pgEnum('sd_meaning', ['sd-of-replicates', 'standard-uncertainty'])

/** One cloud point at one concentration. A blank has a batch and no series. Never changed: a correction is a new reading in a new revision. */
export const reading = pgTable('reading', {
  id: identity(),
  project: uuid('project_id').notNull(),
  series: uuid('series_id'),
  batch: uuid('batch_id'),
  /** Concentration of the varied salt on the scale of its series. */
  concentration: doublePrecision('concentration').notNull(),
  composition: jsonb('composition').$type<Component[]>().notNull(),
  /** °C */
  value: doublePrecision('value').notNull(),
  /** Standard uncertainty of the value, K. */
  sd: doublePrecision('sd'),
  sdGiven: doublePrecision('sd_given'),
  sdGivenMeaning: sdMeaning('sd_given_meaning'),
  n: integer('n'),
  direction: temperatureDirection('direction').notNull(),
  rate: doublePrecision('rate'),
  ph: doublePrecision('ph'),
  polymerConcentration: doublePrecision('polymer_concentration'),
  limit: readingLimit('limit').notNull().default('exact'),
  note: text('note'),
  origin: jsonb('origin').$type<Origin>().notNull(),
  /** The reading that this one corrects, and why. */
  replaces: uuid('replaces'),
  changeReason: changeReason('change_reason'),
  changeWords: text('change_words'),
  createdAt: createdAt(),
}, table => [
  unique('reading_in_project').on(table.id, table.project),
  foreignKey({ name: 'reading_series', columns: [table.series, table.project], foreignColumns: [series.id, series.project] }),
  foreignKey({ name: 'reading_batch', columns: [table.batch, table.project], foreignColumns: [batch.id, batch.project] }),
  foreignKey({ name: 'reading_replaces', columns: [table.replaces, table.project], foreignColumns: [table.id, table.project] }),
  index('reading_series').on(table.series),
  index('reading_batch').on(table.batch),
  check('reading_has_place', sql`${table.series} is not null or ${table.batch} is not null`),
  check('reading_blank_is_zero', sql`${table.series} is not null or ${table.concentration} = 0`),
  check('reading_concentration', sql`${table.concentration} >= 0 and ${table.concentration} < 'Infinity'`),
  check('reading_value', sql`${table.value} > -273.15 and ${table.value} < 1000`),
  check('reading_sd', sql`${table.sd} >= 0 and ${table.sd} < 'Infinity'`),
  check('reading_n', sql`${table.n} >= 1`),
  check('reading_change_has_reason', sql`(${table.replaces} is null) = (${table.changeReason} is null)`),
]).enableRLS()

/** Which readings a revision holds, in which order, and which of them are set aside and why. */
export const revisionReading = pgTable('revision_reading', {
  project: uuid('project_id').notNull(),
  revision: uuid('revision_id').notNull(),
  reading: uuid('reading_id').notNull(),
  number: integer('number').notNull(),
  setAsideReason: text('set_aside_reason'),
  setAsideBy: uuid('set_aside_by').references(() => person.id),
  setAsideAt: instant('set_aside_at'),
}, table => [
  primaryKey({ columns: [table.revision, table.reading] }),
  unique('revision_reading_number').on(table.revision, table.number),
  foreignKey({ name: 'revision_reading_revision', columns: [table.revision, table.project], foreignColumns: [seriesRevision.id, seriesRevision.project] }),
  foreignKey({ name: 'revision_reading_reading', columns: [table.reading, table.project], foreignColumns: [reading.id, reading.project] }),
  index('revision_reading_reading').on(table.reading),
  check('revision_reading_set_aside', sql`num_nulls(${table.setAsideReason}, ${table.setAsideBy}, ${table.setAsideAt}) in (0, 3)`),
  check('revision_reading_reason', sql`length(trim(${table.setAsideReason})) > 0`),
]).enableRLS()
