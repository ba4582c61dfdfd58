import { timestamp, uuid } from 'drizzle-orm/pg-core'
import { v7 } from 'uuid'

/** Primary key: a UUIDv7, so that ids sort by the time they were made. */
export const identity = () => uuid('id').primaryKey().$defaultFn(() => v7())

/** An instant with its zone; the API writes it as UTC ISO 8601. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

export const createdAt = () => instant('created_at').notNull().defaultNow()

/** Set: the thing lies in the bin for 30 days. */
export const deletedAt = () => instant('deleted_at')
