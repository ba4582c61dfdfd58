import { sql } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/node-postgres'
import { Pool } from 'pg'
import * as schema from './schema'

/** A transaction in which it is settled who asks. Services take one; none of them opens its own connection. */
export type Transaction = Parameters<Parameters<ReturnType<typeof connect>['database']['transaction']>[0]>[0]

/** Why the system itself may look: the doors of sign-in, jobs, rate limits and readiness, and nothing else. */
export type SystemReason = 'sign-in' | 'session' | 'job' | 'rate-limit' | 'readiness'

/** Connections of one process; PostgreSQL's own default allows 100 in all. */
const mostConnections = 10

let reportLost: (error: Error) => void = () => {}

/** Says where the loss of an idle connection is written down. */
export function onLostConnection(report: (error: Error) => void) {
  reportLost = report
}

function connect(connectionString: string | undefined) {
  const pool = new Pool({ connectionString, max: mostConnections })
  // An idle connection may die with the database server: unheard, that would end the process; the next query opens a fresh one.
  pool.on('error', error => reportLost(error))
  // One that is lost in the middle of a transaction fails its query, and says so once more by itself.
  pool.on('connect', client => client.on('error', error => reportLost(error)))
  return { pool, database: drizzle(pool, { schema }) }
}

let connection: ReturnType<typeof connect> | undefined

function database() {
  connection ??= connect(process.env.DATABASE_URL)
  return connection.database
}

type Setting = 'person' | 'record' | 'system'

function ask<Answer>(setting: Setting, value: string, work: (tx: Transaction) => Promise<Answer>): Promise<Answer> {
  return database().transaction(async (tx) => {
    await tx.execute(sql`select set_config(${`anionary.${setting}`}, ${value}, true)`)
    return work(tx)
  })
}

/** Runs `work` as one person, who sees and changes what membership allows. */
export const asPerson = <Answer>(person: string, work: (tx: Transaction) => Promise<Answer>) => ask('person', person, work)

/** Runs `work` for whoever holds the review link of one record. */
export const asReviewLink = <Answer>(record: string, work: (tx: Transaction) => Promise<Answer>) => ask('record', record, work)

/** Runs `work` as the system, which reaches only what sign-in, jobs and rate limits need. */
export const asSystem = <Answer>(reason: SystemReason, work: (tx: Transaction) => Promise<Answer>) => ask('system', reason, work)

/** Ends every connection; called once, when the process stops. */
export async function closeDatabase() {
  const open = connection
  connection = undefined
  await open?.pool.end()
}
