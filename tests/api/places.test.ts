import { beforeAll, describe, expect, it } from 'vitest'
import { campaignContract } from '#shared/contracts/campaigns'
import { materialsContract } from '#shared/contracts/materials'
import { clearCounters } from './support/database'
import { demoProject, signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let project: string
let demo: string
let norrvik: string

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  demo = await demoProject()
  project = (await owner.post('/api/v1/projects').send({ name: 'A project of places' }).expect(201)).body.id
  norrvik = (await owner.get(`/api/v1/projects/${project}`).expect(200)).body.labs[0].id
})

const post = (what: string, body: object) => owner.post(`/api/v1/projects/${project}/${what}`).send(body)
const faultsOf = (body: { errors: { path: string, message: string }[] }) => Object.fromEntries(body.errors.map(({ path, message }) => [path, message]))

describe('a project', () => {
  it('changes its name for its owner', async () => {
    const { body } = await owner.put(`/api/v1/projects/${project}`).send({ name: 'Places', question: 'Which salt?' }).expect(200)
    expect(body).toMatchObject({ name: 'Places', question: 'Which salt?', role: 'owner' })
  })
})

describe('materials', () => {
  it('are made, listed and changed', async () => {
    const sample = (await post('samples', { name: 'Sample 8', numberMeanMass: 31_000, massMethod: 'SEC' }).expect(201)).body
    const stock = (await post('stocks', { lab: norrvik, salt: 'sodium sulfate decahydrate', lot: 'A1', purity: 0.99 }).expect(201)).body
    const instrument = (await post('instruments', { lab: norrvik, name: 'Bench', kind: 'transmittance', wavelength: 500 }).expect(201)).body
    expect(stock).toMatchObject({ salt: { formula: 'Na2SO4', anion: 'SO4^2-', cation: 'Na^+' }, hydrate: 10, lot: 'A1' })
    const listed = materialsContract.parse((await owner.get(`/api/v1/projects/${project}/materials`).expect(200)).body)
    expect(listed.samples).toEqual([sample])
    expect(listed.stocks).toEqual([stock])
    expect(listed.instruments).toContainEqual(instrument)
    const changed = (await owner.put(`/api/v1/stocks/${stock.id}`).send({ lab: norrvik, salt: 'NaCl', lot: 'B2' }).expect(200)).body
    expect(changed).toMatchObject({ salt: { formula: 'NaCl' }, hydrate: 0, lot: 'B2', purity: null })
    await owner.put(`/api/v1/samples/${sample.id}`).send({ name: 'Sample 8b' }).expect(200)
    await owner.put(`/api/v1/instruments/${instrument.id}`).send({ lab: norrvik, name: 'Bench 2', kind: 'by-eye' }).expect(200)
  })

  it.each([['NaSNC', /did you mean NaSCN\?/], ['water', /must be a salt/], ['unobtainium', /not a salt known here/]])('refuse %s as the salt of a stock and say what to do', async (salt, message) => {
    const { body } = await post('stocks', { lab: norrvik, salt }).expect(400)
    expect(faultsOf(body).salt).toMatch(message)
  })

  it('refuse water stated twice and differently', async () => {
    const { body } = await post('stocks', { lab: norrvik, salt: 'Na2SO4·10H2O', hydrate: 7 }).expect(400)
    expect(faultsOf(body).hydrate).toMatch(/Na2SO4·10H2O/)
  })

  it('refuse a lab that is not of the project and an instrument of another lab', async () => {
    const labs = (await owner.get(`/api/v1/projects/${demo}`).expect(200)).body.labs as { id: string, name: string }[]
    const ostrel = labs.find(({ name }) => name === 'Ostrel')!.id
    expect(faultsOf((await post('stocks', { lab: ostrel, salt: 'NaCl' }).expect(400)).body).lab).toMatch(/of the project/)
    expect(faultsOf((await post('instruments', { lab: ostrel, name: 'x', kind: 'by-eye' }).expect(400)).body).lab).toMatch(/member/)
    const theirs = (await owner.get(`/api/v1/projects/${demo}/materials`).expect(200)).body.instruments.find((one: { lab: { name: string } }) => one.lab.name === 'Ostrel').id
    await owner.put(`/api/v1/instruments/${theirs}`).send({ lab: ostrel, name: 'mine now', kind: 'by-eye' }).expect(403)
  })
})

describe('a campaign', () => {
  it('is made with sensible defaults and says what its report still misses', async () => {
    const made = campaignContract.parse((await post('campaigns', { name: 'spring' }).expect(201)).body)
    expect(made).toMatchObject({ clouds: 'on-heating', solvent: 'water', lab: { id: norrvik }, sample: null, batches: [], series: [] })
    expect(made.missing).toEqual(expect.arrayContaining(['the polymer sample', 'criterion of the cloud point', 'heating rate']))
  })

  it('copies what is not stated from another campaign, also of another project', async () => {
    const from = (await owner.get(`/api/v1/projects/${demo}`).expect(200)).body.campaigns.find((one: { lab: { name: string } }) => one.lab.name === 'Norrvik').id
    const original = (await owner.get(`/api/v1/campaigns/${from}`).expect(200)).body
    const copy = (await post('campaigns', { name: 'like the demonstration', copyFrom: from, rate: 2 }).expect(201)).body
    expect(copy).toMatchObject({ rate: 2, criterion: original.criterion, polymerConcentration: original.polymerConcentration, instrument: { id: original.instrument.id } })
    expect(copy.sample).toBeNull()
  })

  it('is refused with a name that the lab uses already', async () => {
    await post('campaigns', { name: 'twice' }).expect(201)
    const { body } = await post('campaigns', { name: 'twice' }).expect(409)
    expect(body.detail).toMatch(/Choose another name/)
  })

  it('names every fault at once', async () => {
    const { body } = await post('campaigns', { name: 'faults', criterion: 'fraction', transitionEnthalpy: 5, sample: '0197a000-0000-7000-8000-000000000000' }).expect(400)
    expect(Object.keys(faultsOf(body)).sort()).toEqual(['criterionFraction', 'sample', 'transitionEnthalpyBasis'])
  })

  it('keeps its direction once there are readings', async () => {
    const { campaigns } = (await owner.get(`/api/v1/projects/${demo}`).expect(200)).body
    const { name, clouds } = campaigns[0]
    const { body } = await owner.put(`/api/v1/campaigns/${campaigns[0].id}`).send({ name, clouds: clouds === 'on-heating' ? 'on-cooling' : 'on-heating' }).expect(400)
    expect(faultsOf(body).clouds).toMatch(/once there are readings/)
  })

  it('is refused to a person whose labs are not in the project', async () => {
    const outsider = await signedInAs('outsider')
    const own = (await outsider.post('/api/v1/projects').send({ name: 'No lab of mine' }).expect(201)).body
    expect((await outsider.get(`/api/v1/projects/${own.id}`).expect(200)).body.labs).toEqual([])
    const { body } = await outsider.post(`/api/v1/projects/${own.id}/campaigns`).send({ name: 'x' }).expect(403)
    expect(body.detail).toMatch(/Ask an owner to bring your lab in/)
  })
})

describe('a batch', () => {
  it('is made, changed and kept apart from others by its label', async () => {
    const campaign = (await post('campaigns', { name: 'of batches' }).expect(201)).body.id
    const made = (await owner.post(`/api/v1/campaigns/${campaign}/batches`).send({ label: '4 March', measuredOn: '2026-03-04' }).expect(201)).body
    expect(made).toMatchObject({ label: '4 March', measuredOn: '2026-03-04', revision: null, blanks: 0, series: 0 })
    await owner.post(`/api/v1/campaigns/${campaign}/batches`).send({ label: '4 March' }).expect(409)
    const changed = (await owner.put(`/api/v1/batches/${made.id}`).send({ label: '4 March, morning', referenceCheck: 32.1 }).expect(200)).body
    expect(changed).toMatchObject({ label: '4 March, morning', measuredOn: null, referenceCheck: 32.1 })
  })
})
