import { beforeAll, describe, expect, it } from 'vitest'
import { asApp, asOwner, clearCounters } from './support/database'
import { demoProject, nobody, signedInAs } from './support/server'

beforeAll(clearCounters)

/** Asks about the service's connections that wait for a lock; only the service's own role sees and may end them. */
const ofWaiting = (what: string) => asApp(null, async (client) => {
  const { rows } = await client.query(`select ${what} as answer from pg_stat_activity where usename = current_user and wait_event_type = 'Lock'`)
  return rows[0]?.answer
})

describe('a connection that the database ends in the middle of a transaction', () => {
  it('fails its request alone; the server goes on', async () => {
    const owner = await signedInAs('owner')
    const project = await demoProject()
    const id = (await owner.post('/api/v1/projects').send({ name: 'before the loss' }).expect(201)).body.id
    const asked = await asOwner(async (client) => {
      await client.query('begin')
      await client.query('select 1 from project where id = $1 for update', [id])
      const waiting = owner.put(`/api/v1/projects/${id}`).send({ name: 'after the loss' }).then(({ status }) => status)
      await expect.poll(() => ofWaiting('count(*)::int')).toBe(1)
      await ofWaiting('pg_terminate_backend(pid)')
      await client.query('rollback')
      return waiting
    })
    expect(asked).toBe(503)
    await nobody().get('/api/health').expect(200)
    await owner.get(`/api/v1/projects/${project}`).expect(200)
  })
})

describe('a forged address', () => {
  it('does not get past the limit of public fits', async () => {
    await clearCounters()
    const points = [[0, 31], [0.1, 30], [0.2, 29]].map(([x, y]) => ({ x, y }))
    const statuses: number[] = []
    // Twice the limit and more: whatever minute ends meanwhile, one of the two has too many.
    for (let count = 0; count < 245; count++) {
      const { status } = await nobody().post('/api/v1/fit').set('x-forwarded-for', `10.0.0.${count}`).send({ model: 'linear', points })
      statuses.push(status)
    }
    expect(statuses).toContain(429)
    await clearCounters()
  })
})
