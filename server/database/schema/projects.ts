import { boolean, index, pgEnum, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { projectRoles } from '#shared/contracts/me'
import { createdAt, deletedAt, identity, instant } from './columns'
import { lab, person } from './people'

export const project = pgTable('project', {
  id: identity(),
  name: text('name').notNull(),
  question: text('question'),
  /** True: demonstration data, and every screen says so. */
  invented: boolean('invented').notNull().default(false),
  createdBy: uuid('created_by').notNull().references(() => person.id),
  createdAt: createdAt(),
  deletedAt: deletedAt(),
}, table => [index('project_created_by').on(table.createdBy)]).enableRLS()

export const projectLab = pgTable('project_lab', {
  project: uuid('project_id').notNull().references(() => project.id),
  lab: uuid('lab_id').notNull().references(() => lab.id),
}, table => [
  primaryKey({ columns: [table.project, table.lab] }),
  index('project_lab_lab').on(table.lab),
]).enableRLS()

export const projectRole = pgEnum('project_role', projectRoles)
export const projectMember = pgTable('project_member', {
  project: uuid('project_id').notNull().references(() => project.id),
  person: uuid('person_id').notNull().references(() => person.id),
  role: projectRole('role').notNull(),
  since: instant('since').notNull().defaultNow(),
}, table => [
  primaryKey({ columns: [table.project, table.person] }),
  index('project_member_person').on(table.person),
]).enableRLS()

/** When a person last looked at a project's front page, and the time before: what changed since then is news. */
export const projectVisit = pgTable('project_visit', {
  project: uuid('project_id').notNull().references(() => project.id),
  person: uuid('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  at: instant('at').notNull().defaultNow(),
  before: instant('before'),
}, table => [primaryKey({ columns: [table.project, table.person] })]).enableRLS()
