import { beforeAll, describe, expect, it } from 'vitest'
import { projectFrontContract, type ProjectFront } from '#shared/contracts/front'
import { asOwner, clearCounters } from './support/database'
import { newCampaign, newSeries, thiocyanate } from './support/measuring'
import { demoProject, signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let member: Agent
let place: { project: string, campaign: string, lab: string }

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  member = await signedInAs('member')
  place = await newCampaign(owner, 'A project with news')
  await asOwner(client => client.query(
    'insert into project_member (project_id, person_id, role) select $1, id, \'editor\' from person where email = $2', [place.project, 'tomas@norrvik.example']))
})

const frontFor = async (agent: Agent, project = place.project): Promise<ProjectFront> => projectFrontContract.parse((await agent.get(`/api/v1/projects/${project}/front`).expect(200)).body)
const keep = (series: string, body: object) => owner.post(`/api/v1/series/${series}/revisions`).send(body).expect(201)
/** The member comes again, and was here last before what follows. */
const comeAgain = async () => {
  await member.put(`/api/v1/projects/${place.project}/visit`).expect(204)
  await asOwner(client => client.query('update project_visit set at = now(), before = now() where project_id = $1', [place.project]))
}

describe('the front page of a project', () => {
  it('tells what others changed since the last visit, and what moved by it', async () => {
    const series = await newSeries(place)
    await keep(series, { from: null, changes: thiocyanate.map(([x, y]) => ({ kind: 'add', x, y, n: 3 })) })
    expect((await frontFor(member)).since).toBeNull()
    await comeAgain()
    const target = (await owner.get(`/api/v1/series/${series}`).expect(200)).body.readings[4]
    await keep(series, { from: 1, changes: [{ kind: 'correct', reading: target.id, to: { y: target.y + 0.3 }, reason: 're-measured' }] })
    const { changes, moved, since } = await frontFor(member)
    expect(since).not.toBeNull()
    expect(changes[0]).toMatchObject({ by: 'Ines Tamsel', action: 'revised', subject: 'series', series: { id: series }, values: { number: 2 } })
    expect(moved).toEqual([expect.objectContaining({ series, name: 'K' })])
    expect(moved[0]!.now.estimate).not.toBe(moved[0]!.before.estimate)
  })

  it('is not told one\'s own doings, and stays news while the visit lasts', async () => {
    await comeAgain()
    const [{ id }] = (await owner.get(`/api/v1/projects/${place.project}/series`).expect(200)).body.items
    const from = (await owner.get(`/api/v1/series/${id}`).expect(200)).body.revision
    await keep(id, { from, changes: [{ kind: 'add', x: 1.1, y: 29.8, n: 3 }] })
    await owner.put(`/api/v1/projects/${place.project}/visit`).expect(204)
    await asOwner(client => client.query('update project_visit set at = now() - interval \'40 minutes\' where project_id = $1 and person_id = (select id from person where email = $2)', [place.project, 'ines@norrvik.example']))
    expect((await frontFor(owner)).changes).toEqual([])
    const before = await frontFor(member)
    expect(before.changes.length).toBeGreaterThan(0)
    await member.put(`/api/v1/projects/${place.project}/visit`).expect(204)
    expect((await frontFor(member)).changes).toEqual(before.changes)
  })

  it('says what waits: an import on its way, a draft, what a report misses', async () => {
    const { id } = (await owner.post(`/api/v1/campaigns/${place.campaign}/imports`).send({ text: 'salt,conc (M),T (°C)\nNaSNC,0.1,30\nNaSNC,0.2,29' }).expect(201)).body
    const [{ id: series }] = (await owner.get(`/api/v1/projects/${place.project}/series`).expect(200)).body.items
    await owner.put(`/api/v1/series/${series}/draft`).send({ from: 1, content: {} }).expect(200)
    const { waits, campaigns } = await frontFor(owner)
    expect(waits.imports.map(one => one.id)).toContain(id)
    expect(waits.drafts).toEqual([expect.objectContaining({ series })])
    expect(campaigns.find(one => one.id === place.campaign)!.missing).toContain('heating rate')
    expect((await frontFor(member)).waits).toEqual({ imports: [], drafts: [] })
  })

  it('names a batch without blanks that series lean on', async () => {
    const { campaigns } = await frontFor(owner, await demoProject())
    expect(campaigns.find(({ name, lab }) => lab.name === 'Quaymere' && name === 'autumn')!.batchesWithoutBlanks).toEqual(['2026-09-25'])
    expect(campaigns.filter(({ batchesWithoutBlanks }) => batchesWithoutBlanks.length > 0)).toHaveLength(1)
  })
})
