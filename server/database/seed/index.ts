/** Plants the demo as the owner: `node seed.mjs`. With ANIONARY_DEMO=0 nothing is planted, and a database that holds the demo is refused. */
import { eq } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/node-postgres'
import { Client } from 'pg'
import * as schema from '../schema'
import { accounts } from './accounts'
import { demo } from './demo'
import { demoFits } from './demo-fits'
import type { Seed } from './seeding'

const seeds: Seed[] = [accounts, demo, demoFits]
const seedLock = 7_220_452

const connectionString = process.env.DATABASE_OWNER_URL
if (!connectionString) throw new Error('DATABASE_OWNER_URL is not set: it is the address of the database as anionary_owner')

const client = new Client({ connectionString })
const database = drizzle(client, { schema })
await client.connect()
try {
  await client.query('select pg_advisory_lock($1)', [seedLock])
  await (process.env.ANIONARY_DEMO === '0' ? refuseDemo() : plantAll())
}
finally {
  await client.end()
}

async function plantAll() {
  for (const seed of seeds) {
    await database.transaction(async (tx) => {
      const planted = await tx.select().from(schema.seed).where(eq(schema.seed.name, seed.name))
      if (planted.length > 0) return
      await seed.plant(tx)
      await tx.insert(schema.seed).values({ name: seed.name })
    })
  }
}

/** The demo's password is known to everybody: its accounts must not open a database that is meant to be real. */
async function refuseDemo() {
  const planted = await database.select().from(schema.seed)
  if (planted.length === 0) return
  console.error('ANIONARY_DEMO is 0 and this database holds the demo accounts: start with an empty database or data folder (ANIONARY_DATA).')
  process.exitCode = 1
}
