/** Plants the demo as the owner: `node seed.mjs`. With ANIONARY_DEMO=0 nothing is planted and no demo account exists. */
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

if (process.env.ANIONARY_DEMO !== '0') await plantAll(connectionString)

async function plantAll(connectionString: string) {
  const client = new Client({ connectionString })
  await client.connect()
  try {
    await client.query('select pg_advisory_lock($1)', [seedLock])
    const database = drizzle(client, { schema })
    for (const seed of seeds) {
      await database.transaction(async (tx) => {
        const planted = await tx.select().from(schema.seed).where(eq(schema.seed.name, seed.name))
        if (planted.length > 0) return
        await seed.plant(tx)
        await tx.insert(schema.seed).values({ name: seed.name })
      })
    }
  }
  finally {
    await client.end()
  }
}
