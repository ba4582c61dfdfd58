/** Applies the migrations as the owner. Two at once wait for each other on one advisory lock. */
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import { fileURLToPath } from 'node:url'
import { Client } from 'pg'
import { prepareQueue } from '../jobs/queue-schema'

const migrationLock = 7_220_451

const connectionString = process.env.DATABASE_OWNER_URL
if (!connectionString) throw new Error('DATABASE_OWNER_URL is not set: it is the address of the database as anionary_owner')

const client = new Client({ connectionString })
await client.connect()
try {
  await client.query('select pg_advisory_lock($1)', [migrationLock])
  await migrate(drizzle(client), { migrationsFolder: fileURLToPath(new URL('./migrations', import.meta.url)) })
  await prepareQueue(client, connectionString)
}
finally {
  await client.end()
}
