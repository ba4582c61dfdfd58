import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 } from 'uuid'
import { closeDatabase } from '~~/server/database/client'
import { carryOut, JobInterrupted } from '~~/server/jobs/carry-out'
import { asOwner, personId } from './support/database'
import { demoProject, people } from './support/server'

const running = new AbortController().signal
let project: string
let person: string

beforeAll(async () => {
  project = await demoProject()
  person = await personId(people.owner)
})
afterAll(closeDatabase)

/** A job's row that no queue knows of, so that no worker takes it. */
async function rowOfJob(values: { person?: string, project?: string } = {}): Promise<string> {
  const id = v7()
  await asOwner(client => client.query('insert into job (id, kind, project_id, person_id, input) values ($1, \'refit\', $2, $3, \'{}\')', [id, values.project ?? project, values.person ?? person]))
  return id
}
const stateOf = (id: string) => asOwner(async client =>
  (await client.query('select state, done, total, version, problem, finished_at is not null as finished from job where id = $1', [id])).rows[0])

describe('carrying out a job', () => {
  it('hands it back where the worker stops, and the next one finishes it', async () => {
    const id = await rowOfJob()
    await expect(carryOut(id, AbortSignal.abort())).rejects.toThrow(JobInterrupted)
    expect(await stateOf(id)).toMatchObject({ state: 'waiting', finished: false })
    await carryOut(id, running)
    expect(await stateOf(id)).toMatchObject({ state: 'done', done: 60, total: 60, finished: true })
  })

  it('does nothing when it is delivered once more', async () => {
    const id = await rowOfJob()
    await carryOut(id, running)
    const before = await stateOf(id)
    await carryOut(id, running)
    expect(await stateOf(id)).toEqual(before)
  })

  it('sees no more of the project than the person who asked', async () => {
    const id = await rowOfJob({ person: await personId(people.outsider) })
    await carryOut(id, running)
    expect(await stateOf(id)).toMatchObject({ state: 'done', total: 0 })
  })

  it('says in its row that it failed, in words for a person', async () => {
    const id = await rowOfJob(await unfittedProject())
    await expect(carryOut(id, running)).rejects.toThrow()
    expect(await stateOf(id)).toMatchObject({ state: 'failed', finished: true, problem: expect.stringMatching(/start it again/) })
  })
})

describe('a bootstrap whose worker is stopped', () => {
  const seed = 20261201
  const request = { model: 'linear', points: [31, 29.9, 29.1, 27.95, 27.05, 26].map((y, i) => ({ x: i / 5, y })) }
  const kept = (fit: string) => asOwner(async client =>
    (await client.query('select count(*)::int as count from fit_result where fit_id = $1 and kind = \'bootstrap\' and result ->> \'seed\' = $2', [fit, String(seed)])).rows[0].count as number)

  async function rowOfBootstrap(fit: string): Promise<string> {
    const id = v7()
    const input = { series: v7(), fit, request, options: { kind: 'residual', samples: 600, seed, confidence: 0.95 } }
    await asOwner(client => client.query('insert into job (id, kind, project_id, person_id, input) values ($1, \'bootstrap\', $2, $3, $4)', [id, project, person, input]))
    return id
  }

  it('keeps nothing then, and one result once it is drawn, also when it is drawn again', async () => {
    const fit = await asOwner(async client => (await client.query('select id from fit where project_id = $1 limit 1', [project])).rows[0].id as string)
    const id = await rowOfBootstrap(fit)
    await expect(carryOut(id, AbortSignal.abort())).rejects.toThrow(JobInterrupted)
    expect(await kept(fit)).toBe(0)
    await carryOut(id, running)
    expect(await stateOf(id)).toMatchObject({ state: 'done', done: 600 })
    await carryOut(await rowOfBootstrap(fit), running)
    expect(await kept(fit)).toBe(1)
  })
})

/** A project whose one series has no fit yet, and a reader of it who may keep none. */
async function unfittedProject(): Promise<{ project: string, person: string }> {
  const [maker, reader] = [await personId(people.outsider), await personId(people.admin)]
  const ids = { project: v7(), campaign: v7(), series: v7(), revision: v7() }
  await asOwner(async (client) => {
    await client.query('insert into project (id, name, created_by) values ($1, \'Without fits\', $2)', [ids.project, maker])
    await client.query('insert into project_member (project_id, person_id, role) values ($1, $2, \'collaborator\')', [ids.project, reader])
    await client.query('insert into campaign (id, project_id, lab_id, name, clouds) select $1, $2, id, \'one day\', \'on-heating\' from lab limit 1', [ids.campaign, ids.project])
    await client.query('insert into series (id, project_id, campaign_id, salt_formula, salt_name, anion, cation) values ($1, $2, $3, \'NaCl\', \'sodium chloride\', \'Cl^-\', \'Na^+\')', [ids.series, ids.project, ids.campaign])
    await client.query('insert into series_revision (id, project_id, series_id, number, summary, made_by) values ($1, $2, $3, 1, \'typed in\', $4)', [ids.revision, ids.project, ids.series, maker])
    for (let number = 1; number <= 6; number++) {
      const reading = v7()
      await client.query('insert into reading (id, project_id, series_id, concentration, composition, value, direction, origin) values ($1, $2, $3, $4, \'[]\', $5, \'heating\', \'{"kind":"typed"}\')', [reading, ids.project, ids.series, number / 10, 31 - number])
      await client.query('insert into revision_reading (project_id, revision_id, reading_id, number) values ($1, $2, $3, $4)', [ids.project, ids.revision, reading, number])
    }
  })
  return { project: ids.project, person: reader }
}
