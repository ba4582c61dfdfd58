/** The worker process: takes jobs from the queue until it is asked to stop, then hands back what it holds. */
import PgBoss from 'pg-boss'
import { closeDatabase, onLostConnection } from '../database/client'
import { jobKinds } from '../database/schema/jobs'
import { config } from '../utils/config'
import { logger, reportLostConnection } from '../utils/logger'
import { stopping } from '../utils/stopping'
import { carryOut, JobInterrupted } from './carry-out'
import type { QueuedJob } from './queue'
import { queueSchema } from './queue-name'

const patience = 10_000

onLostConnection(reportLostConnection)
const boss = new PgBoss({ connectionString: config().DATABASE_URL, schema: queueSchema, migrate: false, schedule: false, max: 4 })
boss.on('error', error => logger().error({ err: error }, 'queue'))
await boss.start()
for (const kind of jobKinds) {
  await boss.work<QueuedJob>(kind, { batchSize: 1, pollingIntervalSeconds: 0.5 }, async ([message]) => {
    if (message) await work(kind, message.data.job)
  })
}
logger().info('worker is ready')

async function work(kind: string, job: string) {
  logger().info({ job, kind }, 'job taken')
  try {
    await carryOut(job, stopping)
    logger().info({ job, kind }, 'job ended')
  }
  catch (error) {
    if (error instanceof JobInterrupted) throw error
    logger().error({ job, kind, err: error }, 'job failed')
  }
}

stopping.addEventListener('abort', async () => {
  await boss.stop({ graceful: true, timeout: patience })
  await closeDatabase()
  logger().info('worker has stopped')
  process.exit(0)
})
