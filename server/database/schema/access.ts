import { sql } from 'drizzle-orm'
import { check, index, integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { createdAt, identity, instant } from './columns'
import { person } from './people'

/** The cookie names a session; revoking the row ends it wherever the cookie went. */
export const session = pgTable('session', {
  id: identity(),
  person: uuid('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  createdAt: createdAt(),
  expiresAt: instant('expires_at').notNull(),
  revokedAt: instant('revoked_at'),
}, table => [index('session_person').on(table.person)]).enableRLS()

/** Misses at the door, counted per account and per address; keys are hashes, so no address is kept in the clear. */
export const signInAttempt = pgTable('sign_in_attempt', {
  key: text('key').primaryKey(),
  misses: integer('misses').notNull(),
  lastAt: instant('last_at').notNull(),
  blockedUntil: instant('blocked_until'),
}, table => [
  index('sign_in_attempt_last').on(table.lastAt),
  check('sign_in_attempt_misses', sql`${table.misses} >= 0`),
]).enableRLS()

/** Requests counted per key and minute, shared by all web processes. */
export const rateLimit = pgTable('rate_limit', {
  key: text('key').notNull(),
  minute: instant('minute').notNull(),
  count: integer('count').notNull(),
}, table => [
  primaryKey({ columns: [table.key, table.minute] }),
  index('rate_limit_minute').on(table.minute),
]).enableRLS()
