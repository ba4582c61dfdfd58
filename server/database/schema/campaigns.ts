import { sql } from 'drizzle-orm'
import { check, date, doublePrecision, foreignKey, index, pgEnum, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { cloudings, criteria, enthalpyBases, replicateKinds } from '#shared/contracts/campaigns'
import { createdAt, deletedAt, identity } from './columns'
import { instrument, sample } from './materials'
import { lab } from './people'
import { project } from './projects'

export const clouding = pgEnum('clouding', cloudings)
export const criterion = pgEnum('criterion', criteria)
export const enthalpyBasis = pgEnum('enthalpy_basis', enthalpyBases)
export const replicateKind = pgEnum('replicate_kind', replicateKinds)

/** What one lab measured with one polymer sample under one set of conditions. */
export const campaign = pgTable('campaign', {
  id: identity(),
  project: uuid('project_id').notNull().references(() => project.id),
  lab: uuid('lab_id').notNull().references(() => lab.id),
  sample: uuid('sample_id'),
  instrument: uuid('instrument_id').references(() => instrument.id),
  name: text('name').notNull(),
  clouds: clouding('clouds').notNull(),
  solvent: text('solvent').notNull().default('water'),
  buffer: text('buffer'),
  ph: doublePrecision('ph'),
  /** The buffer's own ions are not part of the varied concentration. */
  polymerConcentration: doublePrecision('polymer_concentration'),
  criterion: criterion('criterion'),
  criterionFraction: doublePrecision('criterion_fraction'),
  rate: doublePrecision('rate'),
  /** Minutes held before a ramp. */
  hold: doublePrecision('hold'),
  replicateKind: replicateKind('replicate_kind'),
  transitionEnthalpy: doublePrecision('transition_enthalpy'),
  transitionEnthalpyBasis: enthalpyBasis('transition_enthalpy_basis'),
  startedOn: date('started_on'),
  createdAt: createdAt(),
  deletedAt: deletedAt(),
}, table => [
  unique('campaign_in_project').on(table.id, table.project),
  uniqueIndex('campaign_name_unique').on(table.project, table.lab, table.name).where(sql`${table.deletedAt} is null`),
  foreignKey({ name: 'campaign_sample', columns: [table.sample, table.project], foreignColumns: [sample.id, sample.project] }),
  check('campaign_polymer_concentration', sql`${table.polymerConcentration} > 0`),
  check('campaign_rate', sql`${table.rate} > 0 and ${table.hold} >= 0`),
  check('campaign_fraction', sql`${table.criterionFraction} > 0 and ${table.criterionFraction} < 1`),
  check('campaign_enthalpy_has_basis', sql`(${table.transitionEnthalpy} is null) = (${table.transitionEnthalpyBasis} is null)`),
]).enableRLS()

/** Readings of one day or run; owns the zero-salt readings that its series share. */
export const batch = pgTable('batch', {
  id: identity(),
  project: uuid('project_id').notNull(),
  campaign: uuid('campaign_id').notNull(),
  label: text('label').notNull(),
  measuredOn: date('measured_on'),
  /** Cloud point of the agreed reference sample in this run, °C, when it was checked. */
  referenceCheck: doublePrecision('reference_check'),
  note: text('note'),
  createdAt: createdAt(),
}, table => [
  unique('batch_in_project').on(table.id, table.project),
  unique('batch_label_unique').on(table.campaign, table.label),
  foreignKey({ name: 'batch_campaign', columns: [table.campaign, table.project], foreignColumns: [campaign.id, campaign.project] }),
  index('batch_project').on(table.project),
]).enableRLS()

export const temperatureDirection = pgEnum('temperature_direction', ['heating', 'cooling'])
