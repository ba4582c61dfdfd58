import { Client } from 'pg'
import { setting } from './server'

async function withClient<Answer>(connectionString: string, work: (client: Client) => Promise<Answer>): Promise<Answer> {
  const client = new Client({ connectionString })
  await client.connect()
  try {
    return await work(client)
  }
  finally {
    await client.end()
  }
}

/** Connects as anionary_owner, past row-level security. */
export const asOwner = <Answer>(work: (client: Client) => Promise<Answer>) => withClient(setting('DATABASE_OWNER_URL'), work)

/** Connects as the service does, in a transaction that is rolled back, with somebody or nobody set as asking. */
export function asApp<Answer>(person: string | null, work: (client: Client) => Promise<Answer>): Promise<Answer> {
  return withClient(setting('DATABASE_URL'), async (client) => {
    await client.query('begin')
    if (person) await client.query('select set_config(\'anionary.person\', $1, true)', [person])
    try {
      return await work(client)
    }
    finally {
      await client.query('rollback')
    }
  })
}

/** The code PostgreSQL refuses a statement with; null when it lets it through. */
export async function refusalOf(client: Client, statement: string, values: unknown[] = []): Promise<string | null> {
  await client.query('savepoint before')
  try {
    await client.query(statement, values)
    return null
  }
  catch (error) {
    return (error as { code?: string }).code ?? 'unknown'
  }
  finally {
    await client.query('rollback to savepoint before')
  }
}

export async function tablesOf(client: Client): Promise<string[]> {
  const { rows } = await client.query<{ name: string }>('select relname as name from pg_class where relnamespace = \'public\'::regnamespace and relkind in (\'r\', \'p\') order by 1')
  return rows.map(row => row.name)
}

/** Forgets misses at the door and counted requests, so that one file's tests do not make another's wait. */
export const clearCounters = () => asOwner(client => client.query('delete from sign_in_attempt; delete from rate_limit'))

export const personId = (email: string) => asOwner(async (client) => {
  const { rows } = await client.query<{ id: string }>('select id from person where email = $1', [email])
  return rows[0]!.id
})
