import { sql } from 'drizzle-orm'
import { check, date, doublePrecision, foreignKey, index, pgEnum, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import { instrumentKinds } from '#shared/contracts/materials'
import { createdAt, identity } from './columns'
import { lab } from './people'
import { project, projectLab } from './projects'

/** The polymer, polypeptide or protein a project measures. Masses in g/mol. */
export const sample = pgTable('sample', {
  id: identity(),
  project: uuid('project_id').notNull().references(() => project.id),
  name: text('name').notNull(),
  numberMeanMass: doublePrecision('number_mean_mass'),
  weightMeanMass: doublePrecision('weight_mean_mass'),
  dispersity: doublePrecision('dispersity'),
  massMethod: text('mass_method'),
  endGroups: text('end_groups'),
  tacticity: text('tacticity'),
  lot: text('lot'),
  openedOn: date('opened_on'),
  createdAt: createdAt(),
}, table => [
  unique('sample_in_project').on(table.id, table.project),
  index('sample_project').on(table.project),
  check('sample_masses', sql`${table.numberMeanMass} > 0 and ${table.weightMeanMass} > 0 and ${table.dispersity} >= 1`),
]).enableRLS()

/** A salt solution as made: what the concentrations of a series rest on. */
export const stock = pgTable('stock', {
  id: identity(),
  project: uuid('project_id').notNull(),
  lab: uuid('lab_id').notNull(),
  saltFormula: text('salt_formula').notNull(),
  saltName: text('salt_name').notNull(),
  anion: text('anion').notNull(),
  cation: text('cation').notNull(),
  hydrate: doublePrecision('hydrate').notNull().default(0),
  lot: text('lot'),
  purity: doublePrecision('purity'),
  madeOn: date('made_on'),
  /** Measured concentration over the labelled one; null where nobody measured it. */
  assay: doublePrecision('assay'),
  relativeUncertainty: doublePrecision('relative_uncertainty'),
  makeUp: text('make_up'),
  createdAt: createdAt(),
}, table => [
  unique('stock_in_project').on(table.id, table.project),
  foreignKey({ name: 'stock_project_lab', columns: [table.project, table.lab], foreignColumns: [projectLab.project, projectLab.lab] }),
  index('stock_project').on(table.project),
  check('stock_fractions', sql`${table.purity} > 0 and ${table.purity} <= 1 and ${table.assay} > 0 and ${table.relativeUncertainty} >= 0 and ${table.hydrate} >= 0`),
]).enableRLS()

export const instrumentKind = pgEnum('instrument_kind', instrumentKinds)

/** Path length in mm, wavelength in nm, offset in K (read minus true). */
export const instrument = pgTable('instrument', {
  id: identity(),
  lab: uuid('lab_id').notNull().references(() => lab.id),
  name: text('name').notNull(),
  kind: instrumentKind('kind').notNull(),
  pathLength: doublePrecision('path_length'),
  wavelength: doublePrecision('wavelength'),
  probePlace: text('probe_place'),
  calibratedOn: date('calibrated_on'),
  offset: doublePrecision('offset_value'),
  offsetUncertainty: doublePrecision('offset_uncertainty'),
  offsetStatedOn: date('offset_stated_on'),
  createdAt: createdAt(),
}, table => [
  index('instrument_lab').on(table.lab),
  check('instrument_geometry', sql`${table.pathLength} > 0 and ${table.wavelength} > 0 and ${table.offsetUncertainty} >= 0`),
]).enableRLS()
