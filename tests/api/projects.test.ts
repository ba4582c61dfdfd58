import { beforeAll, describe, expect, it } from 'vitest'
import { listOf } from '#shared/contracts/common'
import { projectContract, projectDetailContract } from '#shared/contracts/projects'
import { seriesContract, seriesSummaryContract, type SeriesSummary } from '#shared/contracts/series'
import { asOwner, clearCounters } from './support/database'
import { demoProject, signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let project: string

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  project = await demoProject()
})

const series = async (): Promise<SeriesSummary[]> => {
  const { body } = await owner.get(`/api/v1/projects/${project}/series?limit=200`).expect(200)
  return listOf(seriesSummaryContract).strict().parse(body).items
}

describe('projects', () => {
  it('are listed for their members with the member\'s role', async () => {
    const { body } = await (await signedInAs('collaborator')).get('/api/v1/projects').expect(200)
    expect(listOf(projectContract).parse(body).items).toEqual([expect.objectContaining({ id: project, invented: true, role: 'collaborator' })])
  })

  it('show labs, campaigns and members', async () => {
    const { body } = await owner.get(`/api/v1/projects/${project}`).expect(200)
    const detail = projectDetailContract.parse(body)
    expect(detail.labs.map(lab => lab.name)).toEqual(['Norrvik', 'Ostrel', 'Quaymere'])
    expect(detail.campaigns).toHaveLength(6)
    expect(detail.members.find(member => member.person.name === 'Ines Tamsel')?.role).toBe('owner')
    expect(detail.members).toHaveLength(5)
  })

  it('bring a lab with them for somebody who is in none, and for nobody else', async () => {
    const newcomer = await signedInAs('outsider')
    const make = (lab: string) => newcomer.post('/api/v1/projects').send({ name: 'A first project', lab })
    expect((await make('norrvik').expect(409)).body.errors).toEqual([{ path: 'lab', message: 'is taken' }])
    const { id } = (await make('A bench of its own').expect(201)).body
    try {
      expect((await newcomer.get(`/api/v1/projects/${id}`).expect(200)).body.labs).toEqual([expect.objectContaining({ name: 'A bench of its own' })])
      await newcomer.post(`/api/v1/projects/${id}/campaigns`).send({ name: 'spring' }).expect(201)
      expect((await make('Another bench').expect(400)).body.errors[0].path).toBe('lab')
    }
    finally {
      await asOwner(client => client.query('delete from membership using lab where lab.id = membership.lab_id and lab.name = $1', ['A bench of its own']))
    }
  })

  it('belong to whoever makes them and are hidden from everybody else', async () => {
    const maker = await signedInAs('outsider')
    const { body } = await maker.post('/api/v1/projects').send({ name: ' A new question ' }).expect(201)
    expect(projectContract.parse(body)).toMatchObject({ name: 'A new question', question: null, invented: false, role: 'owner' })
    await maker.get(`/api/v1/projects/${body.id}`).expect(200)
    await owner.get(`/api/v1/projects/${body.id}`).expect(404)
  })

  it('need a name', async () => {
    const { body } = await owner.post('/api/v1/projects').send({ name: '  ', colour: 'red' }).expect(400)
    expect((body.errors as { path: string }[]).map(error => error.path).sort()).toEqual(['colour', 'name'])
  })
})

describe('the series of a project', () => {
  it('are all there, with their blanks shared within a batch', async () => {
    const all = await series()
    expect(all).toHaveLength(60)
    const owners = new Map<string, number>()
    for (const one of all) for (const reading of one.readings) if (reading.blank) owners.set(reading.id, (owners.get(reading.id) ?? 0) + 1)
    expect(Math.max(...owners.values())).toBeGreaterThan(1)
    expect(all.flatMap(one => one.readings).filter(reading => reading.blank).every(reading => reading.x === 0)).toBe(true)
  })

  it('come in pages that join without a gap', async () => {
    const seen: string[] = []
    let cursor: string | null = null
    do {
      const next: string = cursor ? `&cursor=${cursor}` : ''
      const { body } = await owner.get(`/api/v1/projects/${project}/series?limit=25${next}`).expect(200)
      seen.push(...(body.items as { id: string }[]).map(item => item.id))
      cursor = body.nextCursor
    } while (cursor)
    expect(seen).toEqual((await series()).map(one => one.id))
  })

  it('refuse a page of no or too many items', async () => {
    for (const limit of [0, 201, 'all']) {
      const { body } = await owner.get(`/api/v1/projects/${project}/series?limit=${limit}`).expect(400)
      expect(body.errors[0].path).toBe('query.limit')
    }
  })
})

describe('one series', () => {
  it('holds readings, the current fit, the comparison of models and its revisions', async () => {
    const thiocyanate = (await series()).find(one => one.salt.formula === 'NaSCN' && one.campaign.lab.name === 'Norrvik')!
    const { body } = await owner.get(`/api/v1/series/${thiocyanate.id}`).expect(200)
    const shown = seriesContract.parse(body)
    expect(shown.readings.map(reading => reading.number)).toEqual(shown.readings.map((_, index) => index + 1))
    expect(shown.readings.filter(reading => reading.blank).length).toBeGreaterThan(0)
    expect(shown.support.models.map(model => model.model)).toContain('linear-langmuir')
    expect(shown.revisions[0]!.number).toBe(shown.revision)
    expect(shown.campaign.conditions).toMatch(/g L⁻¹/)
  })

  it('keeps what is set aside, with reason, person and day, and leaves it out of the fit', async () => {
    const withAside = (await series()).find(one => one.readings.some(reading => reading.setAside) && one.fit)!
    const { body } = await owner.get(`/api/v1/series/${withAside.id}`).expect(200)
    const shown = seriesContract.parse(body)
    const aside = shown.readings.filter(reading => reading.setAside)
    expect(aside[0]!.setAside).toMatchObject({ reason: expect.stringMatching(/./), by: expect.stringMatching(/./) })
    expect(shown.fit!.n).toBe(shown.readings.length - aside.length)
  })
})
