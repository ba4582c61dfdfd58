import { beforeAll, describe, expect, it } from 'vitest'
import { asOwner, clearCounters } from './support/database'
import { demoProject, nobody, signedInAs } from './support/server'

beforeAll(clearCounters)

describe('a connection that the database ends in the middle of a transaction', () => {
  it('fails its request alone; the server goes on', async () => {
    const owner = await signedInAs('owner')
    const project = await demoProject()
    const id = (await owner.post('/api/v1/projects').send({ name: 'before the loss' }).expect(201)).body.id
    const asked = await asOwner(async (client) => {
      await client.query('begin')
      await client.query('select 1 from project where id = $1 for update', [id])
      const waiting = owner.put(`/api/v1/projects/${id}`).send({ name: 'after the loss' }).then(({ status }) => status)
      await expect.poll(async () => {
        const { rows } = await client.query('select count(*)::int as count from pg_stat_activity where usename = \'anionary_app\' and wait_event_type = \'Lock\'')
        return rows[0].count
      }).toBe(1)
      await client.query('select pg_terminate_backend(pid) from pg_stat_activity where usename = \'anionary_app\' and wait_event_type = \'Lock\'')
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
    for (let count = 0; count < 125; count++) {
      const { status } = await nobody().post('/api/v1/fit').set('x-forwarded-for', `10.0.0.${count}`).send({ model: 'linear', points })
      statuses.push(status)
    }
    expect(statuses).toContain(429)
    await clearCounters()
  })
})
