import { sql } from 'drizzle-orm'
import { index, pgEnum, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { labRoles, siteRoles } from '#shared/contracts/me'
import { createdAt, identity, instant } from './columns'

export const person = pgTable('person', {
  id: identity(),
  name: text('name').notNull(),
  email: text('email').notNull(),
  createdAt: createdAt(),
  deactivatedAt: instant('deactivated_at'),
}, table => [
  uniqueIndex('person_email_unique').on(sql`lower(${table.email})`),
]).enableRLS()

/** Kept apart from the person, so that nobody who may see a person can read it. */
export const credential = pgTable('credential', {
  person: uuid('person_id').primaryKey().references(() => person.id, { onDelete: 'cascade' }),
  passwordHash: text('password_hash').notNull(),
  changedAt: instant('changed_at').notNull().defaultNow(),
}).enableRLS()

export const siteRole = pgEnum('site_role', siteRoles)
export const personSiteRole = pgTable('person_site_role', {
  person: uuid('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  role: siteRole('role').notNull(),
}, table => [primaryKey({ columns: [table.person, table.role] })]).enableRLS()

export const lab = pgTable('lab', {
  id: identity(),
  name: text('name').notNull(),
  createdAt: createdAt(),
}, table => [uniqueIndex('lab_name_unique').on(sql`lower(${table.name})`)]).enableRLS()

export const labRole = pgEnum('lab_role', labRoles)
export const membership = pgTable('membership', {
  lab: uuid('lab_id').notNull().references(() => lab.id),
  person: uuid('person_id').notNull().references(() => person.id),
  role: labRole('role').notNull(),
  since: instant('since').notNull().defaultNow(),
}, table => [
  primaryKey({ columns: [table.lab, table.person, table.role] }),
  index('membership_person').on(table.person),
]).enableRLS()
