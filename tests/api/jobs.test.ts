import { beforeAll, describe, expect, it } from 'vitest'
import { jobContract, type Job } from '#shared/contracts/jobs'
import { asOwner, clearCounters } from './support/database'
import { address, demoProject, everywhere, signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
interface SentEvent { id: number, job: Job }

let owner: Agent
let project: string
let cookie: string

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  project = await demoProject()
  cookie = owner.jar.getCookies(everywhere).toValueString()
})

const start = async () => jobContract.parse((await owner.post(`/api/v1/projects/${project}/refit`).expect(202)).body)
const show = async (id: string) => jobContract.parse((await owner.get(`/api/v1/jobs/${id}`).expect(200)).body)

/** Reads the events of a job until the server ends the stream. */
async function watch(id: string, seen?: number): Promise<SentEvent[]> {
  const response = await fetch(`${address}/api/v1/jobs/${id}/events`, { headers: { cookie, ...(seen !== undefined && { 'last-event-id': String(seen) }) } })
  expect(response.headers.get('content-type')).toBe('text/event-stream')
  expect(response.headers.get('x-accel-buffering')).toBe('no')
  const text = await response.text()
  return [...text.matchAll(/^id: (\d+)\nevent: job\ndata: (.*)$/gm)].map(([, event, data]) => ({ id: Number(event), job: jobContract.parse(JSON.parse(data!)) }))
}

const fitCount = () => asOwner(async client => Number((await client.query('select count(*) from fit where project_id = $1', [project])).rows[0].count))

describe('fitting a project again', () => {
  it('goes through the queue to its end and tells its progress', async () => {
    const { id } = await start()
    const events = await watch(id)
    expect(events.at(-1)!.job).toMatchObject({ state: 'done', done: 60, total: 60, problem: null })
    expect(events.map(event => event.id)).toEqual([...events.map(event => event.id)].sort((one, other) => one - other))
    expect(await show(id)).toEqual(events.at(-1)!.job)
  })

  it('leaves a fit on every series that was measured, and a second time adds none', async () => {
    const before = await fitCount()
    const { id } = await start()
    await watch(id)
    expect(before).toBeGreaterThanOrEqual(57)
    expect(await fitCount()).toBe(before)
  })

  it('sends a reader who comes back only what is new', async () => {
    const { id } = await start()
    const events = await watch(id)
    expect(await watch(id, events.at(-1)!.id)).toEqual([])
    expect(await watch(id, events.at(-1)!.id - 1)).toEqual([events.at(-1)])
  })

  it('is taken into the trail with the person who asked', async () => {
    const { id } = await start()
    const { rows } = await asOwner(client => client.query('select action, project_id from audit_event where subject_id = $1', [id]))
    expect(rows).toEqual([{ action: 'started', project_id: project }])
    await watch(id)
  })
})

describe('stopping a job', () => {
  it('ends it between two series', async () => {
    const { id } = await start()
    await owner.post(`/api/v1/jobs/${id}/cancel`).expect(200)
    const last = (await watch(id)).at(-1)!.job
    expect(last).toMatchObject({ state: 'cancelled', cancelRequested: true })
    expect(last.done).toBeLessThan(60)
  })

  it('leaves a finished job as it is', async () => {
    const { id } = await start()
    await watch(id)
    const before = await show(id)
    const { body } = await owner.post(`/api/v1/jobs/${id}/cancel`).expect(200)
    expect(body).toEqual(before)
  })
})
