import { beforeAll, describe, expect, it } from 'vitest'
import { bootstrapsContract } from '#shared/contracts/bootstrap'
import { jobContract, type Job } from '#shared/contracts/jobs'
import { bootstrap } from '#shared/science/resampling/bootstrap'
import { clearCounters } from './support/database'
import { newCampaign, newSeries, thiocyanate } from './support/measuring'
import { signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let place: { project: string, campaign: string, lab: string }

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  place = await newCampaign(owner, 'A project of draws')
})

const shake = [0.01, -0.02, 0.015, -0.01, 0.02, -0.015, 0.01, -0.01, 0.005]
const points = thiocyanate.map(([x, y], i) => ({ x, y: y + shake[i]!, n: 3 }))

/** A series of its own with a fit. */
async function measured(pairs = points): Promise<string> {
  const { id: campaign } = (await owner.post(`/api/v1/projects/${place.project}/campaigns`).send({ name: `draws ${Math.random()}` }).expect(201)).body
  const id = await newSeries({ project: place.project, campaign })
  await owner.post(`/api/v1/series/${id}/revisions`).send({ from: null, changes: pairs.map(pair => ({ kind: 'add', ...pair })) }).expect(201)
  return id
}

const start = async (series: string, body: object) => jobContract.parse((await owner.post(`/api/v1/series/${series}/bootstrap`).send(body).expect(202)).body)
const shown = async (series: string) => bootstrapsContract.parse((await owner.get(`/api/v1/series/${series}/bootstrap`).expect(200)).body)

async function ended(id: string): Promise<Job> {
  for (;;) {
    const job = jobContract.parse((await owner.get(`/api/v1/jobs/${id}`).expect(200)).body)
    if (job.finishedAt) return job
    await new Promise(resolve => setTimeout(resolve, 100))
  }
}

describe('a bootstrap of a series', () => {
  it('is carried out by the worker and gives what the science gives for the same seed', async () => {
    const series = await measured()
    const { id } = await start(series, { kind: 'residual', samples: 500, seed: 7 })
    expect(await ended(id)).toMatchObject({ kind: 'bootstrap', state: 'done', done: 500, total: 500 })
    const { results, job } = await shown(series)
    const expected = bootstrap({ model: 'linear-langmuir', weighting: 'replicates', points }, { kind: 'residual', samples: 500, seed: 7, confidence: 0.95 })
    expect(job).toBeNull()
    expect(results).toHaveLength(1)
    results[0]!.quantities.forEach(({ name, percentile }, j) => {
      expect(name).toBe(expected.quantities[j]!.name)
      expect(percentile.lower).toBeCloseTo(expected.quantities[j]!.percentile.lower!, 9)
    })
    expect(results[0]!.bands!.x).toHaveLength(61)
  })

  it('is kept once, however often it is drawn the same way', async () => {
    const series = await measured()
    for (const { id } of [await start(series, { samples: 200, seed: 3 }), await start(series, { samples: 200, seed: 3 })]) await ended(id)
    expect((await shown(series)).results).toHaveLength(1)
    const again = await start(series, { samples: 200, seed: 4 })
    await ended(again.id)
    expect((await shown(series)).results.map(({ seed }) => seed)).toEqual([4, 3])
  })

  it('leaves the constants of the series as they are', async () => {
    const series = await measured()
    const before = (await owner.get(`/api/v1/series/${series}`).expect(200)).body.fit
    await ended((await start(series, { samples: 200, seed: 1 })).id)
    expect((await owner.get(`/api/v1/series/${series}`).expect(200)).body.fit).toEqual(before)
  })

  it('keeps nothing when it is stopped', async () => {
    const series = await measured()
    const { id } = await start(series, { samples: 20_000, seed: 1 })
    await owner.post(`/api/v1/jobs/${id}/cancel`).expect(200)
    expect((await ended(id)).state).toBe('cancelled')
    expect((await shown(series)).results).toEqual([])
  })

  it('goes out of sight with the fit it was drawn for', async () => {
    const series = await measured()
    await ended((await start(series, { samples: 200, seed: 1 })).id)
    await owner.post(`/api/v1/series/${series}/revisions`).send({ from: 1, changes: [{ kind: 'add', x: 1.2, y: 29.5, n: 3 }] }).expect(201)
    expect((await shown(series)).results).toEqual([])
  })

  it.each([[{ samples: 10 }, 'samples'], [{ samples: 1.5e6 }, 'samples'], [{ seed: -1 }, 'seed'], [{ kind: 'magic' }, 'kind'], [{ confidence: 2 }, 'confidence']])('refuses %j by name', async (body, path) => {
    const series = await measured()
    expect((await owner.post(`/api/v1/series/${series}/bootstrap`).send(body).expect(400)).body.errors.map((one: { path: string }) => one.path)).toEqual([path])
  })

  it('is refused where there is nothing to draw about', async () => {
    const few = await newSeries(await newCampaign(owner, 'Too few'))
    expect((await owner.post(`/api/v1/series/${few}/bootstrap`).send({}).expect(400)).body.detail).toMatch(/readings are too few/)
  })
})
