import type { Client } from 'pg'
import PgBoss from 'pg-boss'
import { jobKinds } from '../database/schema/jobs'
import { queueSchema } from './queue-name'

/** Makes or upgrades the queue's own schema as its owner and lets anionary_app use it; one queue a kind of job. */
export async function prepareQueue(client: Client, connectionString: string) {
  const boss = new PgBoss({ connectionString, schema: queueSchema, supervise: false, schedule: false, max: 2 })
  await boss.start()
  try {
    const present = new Set((await boss.getQueues()).map(queue => queue.name))
    for (const kind of jobKinds) {
      if (!present.has(kind)) await boss.createQueue(kind)
    }
  }
  finally {
    await boss.stop({ graceful: false })
  }
  await client.query(`
    grant usage on schema ${queueSchema} to anionary_app;
    grant select, insert, update, delete on all tables in schema ${queueSchema} to anionary_app;
    grant execute on all functions in schema ${queueSchema} to anionary_app;`)
}
