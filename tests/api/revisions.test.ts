import { beforeAll, describe, expect, it } from 'vitest'
import { blanksContract, seriesStateContract } from '#shared/contracts/revisions'
import { seriesContract, type Series } from '#shared/contracts/series'
import { clearCounters } from './support/database'
import { newCampaign, newSeries, thiocyanate } from './support/measuring'
import { signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let place: { project: string, campaign: string, lab: string }
let batch: string

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  place = await newCampaign(owner, 'A project of revisions')
  batch = (await owner.post(`/api/v1/campaigns/${place.campaign}/batches`).send({ label: '4 March', measuredOn: '2026-03-04' }).expect(201)).body.id
})

const keep = (series: string, body: object) => owner.post(`/api/v1/series/${series}/revisions`).send(body)
const add = ([x, y]: readonly [number, number]) => ({ kind: 'add', x, y, n: 3, sd: 0.03, batch })
const faultsOf = (body: { errors: { path: string, message: string }[] }) => Object.fromEntries(body.errors.map(({ path, message }) => [path, message]))
const estimate = ({ fit }: Series, name: string) => fit!.parameters.find(one => one.name === name)!.estimate!
const own = ({ readings }: Series) => readings.filter(({ blank }) => !blank)

/** A series with its readings and one blank. */
async function measured(): Promise<Series> {
  const { campaign } = place
  const fresh = (await owner.post(`/api/v1/projects/${place.project}/campaigns`).send({ name: `copy ${Math.random()}`, copyFrom: campaign }).expect(201)).body.id
  const day = (await owner.post(`/api/v1/campaigns/${fresh}/batches`).send({ label: 'day' }).expect(201)).body.id
  const id = await newSeries({ project: place.project, campaign: fresh })
  const { body } = await keep(id, {
    from: null,
    changes: thiocyanate.map(pair => ({ ...add(pair), batch: day })),
    batches: [{ batch: day, from: null, changes: [{ kind: 'add', x: 0, y: 31.0, n: 3 }, { kind: 'add', x: 0, y: 31.02, n: 3 }] }],
  }).expect(201)
  return seriesContract.parse(body)
}

describe('keeping a revision', () => {
  it('makes the first from nothing, with its blanks and its fit', async () => {
    const series = await measured()
    expect(series).toMatchObject({ revision: 1, canEdit: true, choice: null })
    expect(series.readings.filter(({ blank }) => blank)).toHaveLength(2)
    expect(own(series)).toHaveLength(thiocyanate.length)
    expect(series.fit!.model).toBe('linear-langmuir')
    expect(series.fit!.n).toBe(thiocyanate.length + 2)
    expect(series.revisions[0]).toMatchObject({ number: 1, summary: '9 readings added' })
  })

  it('corrects a value in its place, keeps the one before and says why', async () => {
    const before = await measured()
    const target = own(before)[4]!
    const { body } = await keep(before.id, { from: 1, changes: [{ kind: 'correct', reading: target.id, to: { y: 32.2 }, reason: 'typing-error' }] }).expect(201)
    const after = seriesContract.parse(body)
    const corrected = own(after)[4]!
    expect(corrected).toMatchObject({ y: 32.2, x: target.x, number: target.number, changed: { y: target.y, reason: 'typing-error', words: null }, origin: 'typed' })
    expect(corrected.id).not.toBe(target.id)
    expect(after.revisions[0]).toMatchObject({ number: 2, summary: 'reading at 0.30 M corrected from 32.09, a typing error' })
    expect(estimate(after, 'K')).not.toBe(estimate(before, 'K'))
    const first = seriesStateContract.parse((await owner.get(`/api/v1/series/${before.id}/revisions/1`).expect(200)).body)
    expect(first.readings.map(({ y }) => y)).toEqual(before.readings.map(({ y }) => y))
    expect(first.fit!.parameters).toEqual(before.fit!.parameters)
  })

  it('sets aside with a reason and puts back', async () => {
    const before = await measured()
    const target = own(before)[2]!
    const aside = seriesContract.parse((await keep(before.id, { from: 1, changes: [{ kind: 'set-aside', reading: target.id, reason: 'air bubble' }] }).expect(201)).body)
    expect(own(aside)[2]).toMatchObject({ setAside: { reason: 'air bubble', by: 'Ines Tamsel' }, entersFit: false })
    expect(aside.fit!.n).toBe(before.fit!.n - 1)
    const back = seriesContract.parse((await keep(before.id, { from: 2, changes: [{ kind: 'put-back', reading: target.id }] }).expect(201)).body)
    expect(own(back)[2]!.setAside).toBeNull()
    expect(back.fit!.parameters).toEqual(before.fit!.parameters)
  })

  it('keeps how to fit, and fits so from then on', async () => {
    const before = await measured()
    const choice = { model: 'linear-langmuir', options: { weighting: 'none', parameters: { K: { fixed: 4 } } } }
    const chosen = seriesContract.parse((await keep(before.id, { from: 1, choice }).expect(201)).body)
    expect(chosen.choice).toEqual(choice)
    expect(estimate(chosen, 'K')).toBe(4)
    expect(chosen.revisions[0]!.summary).toMatch(/model changed to saturable binding; equal weights; constants held/)
    const more = seriesContract.parse((await keep(before.id, { from: 2, changes: [{ kind: 'add', x: 1.2, y: 29.5, n: 3 }] }).expect(201)).body)
    expect(estimate(more, 'K')).toBe(4)
    const free = seriesContract.parse((await keep(before.id, { from: 3, choice: { model: null, options: {} } }).expect(201)).body)
    expect(estimate(free, 'K')).not.toBe(4)
  })

  it('names every fault at once and keeps nothing', async () => {
    const series = await measured()
    const [first, second] = own(series)
    const { body } = await keep(series.id, { from: 1, changes: [
      { kind: 'correct', reading: first!.id, to: { y: first!.y }, reason: 'other' },
      { kind: 'put-back', reading: second!.id },
      { kind: 'set-aside', reading: '0197a000-0000-7000-8000-000000000000', reason: 'x' },
      { kind: 'add', x: 0, y: 31 },
    ] }).expect(400)
    expect(Object.keys(faultsOf(body)).sort()).toEqual(['changes.0.to', 'changes.0.words', 'changes.1.reading', 'changes.2.reading', 'changes.3.x'])
    expect((await owner.get(`/api/v1/series/${series.id}`).expect(200)).body.revision).toBe(1)
  })

  it.each([
    ['nothing to keep', {}, 'changes'],
    ['a cloud point out of range', { changes: [{ kind: 'add', x: 0.1, y: 318.6 }] }, 'changes.0.y'],
    ['a constant the model does not have', { choice: { model: 'linear', options: { parameters: { K: { fixed: 3 } } } } }, 'choice.options.parameters.K'],
    ['constants without a model', { choice: { model: null, options: { parameters: { K: { fixed: 3 } } } } }, 'choice.options.parameters'],
  ])('refuses %s', async (_, body, path) => {
    const series = await measured()
    expect(faultsOf((await keep(series.id, { from: 1, ...body }).expect(400)).body)).toHaveProperty([path])
    expect((await owner.get(`/api/v1/series/${series.id}`).expect(200)).body.revision).toBe(1)
  })
})

describe('two people at once', () => {
  it('leave one revision; the other gets the newer state and loses nothing', async () => {
    const series = await measured()
    const reading = own(series)[0]!.id
    const answers = await Promise.all(['bubble', 'dust'].map(reason => keep(series.id, { from: 1, changes: [{ kind: 'set-aside', reading, reason }] })))
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409])
    const refused = answers.find(({ status }) => status === 409)!
    expect(seriesContract.parse(refused.body.current)).toMatchObject({ revision: 2 })
    expect(refused.body.detail).toMatch(/Ines Tamsel kept revision 2/)
  })

  it('of another project are not let in, readers change nothing', async () => {
    const series = await measured()
    const outsider = await signedInAs('outsider')
    await outsider.post(`/api/v1/series/${series.id}/revisions`).send({ from: 1 }).expect(404)
    await outsider.get(`/api/v1/series/${series.id}/revisions/1`).expect(404)
    await outsider.get(`/api/v1/series/${series.id}/draft`).expect(404)
  })
})

describe('blanks', () => {
  it('are edited once for every series of the batch', async () => {
    const series = await measured()
    const { id, revision } = series.batches[0]!
    const second = await newSeriesBeside(series)
    const before = [series, second].map(one => estimate(one, 'T0'))
    const blanks = blanksContract.parse((await owner.get(`/api/v1/batches/${id}`).expect(200)).body)
    const { body } = await owner.post(`/api/v1/batches/${id}/blanks`).send({ from: revision, changes: [{ kind: 'correct', reading: blanks.blanks[0]!.id, to: { y: 31.3 }, reason: 're-measured' }] }).expect(201)
    expect(blanksContract.parse(body).revisions[0]).toMatchObject({ number: 2, summary: 'blank 1 corrected from 31.00, re-measured' })
    const after = await Promise.all([series, second].map(async one => seriesContract.parse((await owner.get(`/api/v1/series/${one.id}`).expect(200)).body)))
    after.forEach((one, index) => {
      expect(estimate(one, 'T0')).toBeGreaterThan(before[index]!)
      expect(one.revision).toBe(1)
      expect(one.readings.find(({ blank }) => blank)!.y).toBe(31.3)
    })
    await owner.post(`/api/v1/batches/${id}/blanks`).send({ from: revision, changes: [{ kind: 'add', x: 0, y: 31 }] }).expect(409)
  })

  it('that go back to an earlier state give the earlier constants again', async () => {
    const series = await measured()
    const { id, revision } = series.batches[0]!
    const blank = series.readings[0]!.id
    const change = (from: number | null, changes: object[]) => owner.post(`/api/v1/batches/${id}/blanks`).send({ from, changes }).expect(201)
    await change(revision, [{ kind: 'set-aside', reading: blank, reason: 'dust' }])
    const without = seriesContract.parse((await owner.get(`/api/v1/series/${series.id}`).expect(200)).body)
    expect(estimate(without, 'T0')).not.toBe(estimate(series, 'T0'))
    await change(2, [{ kind: 'put-back', reading: blank }])
    const back = seriesContract.parse((await owner.get(`/api/v1/series/${series.id}`).expect(200)).body)
    expect(back.fit!.parameters).toEqual(series.fit!.parameters)
  })

  it('hold no salt', async () => {
    const series = await measured()
    const { id, revision } = series.batches[0]!
    const { body } = await owner.post(`/api/v1/batches/${id}/blanks`).send({ from: revision, changes: [{ kind: 'add', x: 0.1, y: 31 }] }).expect(400)
    expect(faultsOf(body)['changes.0.x']).toMatch(/blank holds no salt/)
  })

  async function newSeriesBeside(series: Series): Promise<Series> {
    const campaign = series.campaign.id
    const id = await newSeries({ project: place.project, campaign }, ['NaCl', 'sodium chloride', 'Cl^-', 'Na^+'])
    const { body } = await keep(id, { from: null, changes: [0.1, 0.2, 0.4, 0.8].map(x => ({ kind: 'add', x, y: 31 - 10 * x, batch: series.batches[0]!.id })) }).expect(201)
    return seriesContract.parse(body)
  }
})

describe('a draft', () => {
  it('is kept for its person alone, replaced, and gone once it is kept as a revision', async () => {
    const series = await measured()
    const path = `/api/v1/series/${series.id}/draft`
    expect((await owner.get(path).expect(200)).body).toEqual({ draft: null })
    await owner.put(path).send({ from: 1, content: { cells: { a: '32,' } } }).expect(200)
    await owner.put(path).send({ from: 1, content: { cells: { a: '32,1' } } }).expect(200)
    expect((await (await signedInAs('owner')).get(path).expect(200)).body.draft).toMatchObject({ from: 1, content: { cells: { a: '32,1' } } })
    await keep(series.id, { from: 1, changes: [{ kind: 'set-aside', reading: own(series)[0]!.id, reason: 'dust' }] }).expect(201)
    expect((await owner.get(path).expect(200)).body).toEqual({ draft: null })
    await owner.put(path).send({ from: 2, content: [] }).expect(200)
    await owner.delete(path).expect(204)
    expect((await owner.get(path).expect(200)).body).toEqual({ draft: null })
  })

  it('has a size', async () => {
    const series = await measured()
    await owner.put(`/api/v1/series/${series.id}/draft`).send({ from: 1, content: 'x'.repeat(250_000) }).expect(413)
  })
})

describe('the stock of a series', () => {
  it('is one of the same salt', async () => {
    const series = await measured()
    const post = (salt: string) => owner.post(`/api/v1/projects/${place.project}/stocks`).send({ lab: place.lab, salt, lot: salt })
    const [right, wrong] = [(await post('NaSCN').expect(201)).body.id, (await post('NaCl').expect(201)).body.id]
    await owner.put(`/api/v1/series/${series.id}/stock`).send({ stock: right }).expect(200)
    expect(faultsOf((await owner.put(`/api/v1/series/${series.id}/stock`).send({ stock: wrong }).expect(400)).body).stock).toMatch(/same salt/)
  })
})
