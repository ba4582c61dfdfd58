import { beforeAll, describe, expect, it } from 'vitest'
import { committedContract, importContract } from '#shared/contracts/imports'
import { seriesContract, type Series } from '#shared/contracts/series'
import { engine } from '#shared/science/version'
import { clearCounters } from './support/database'
import { newCampaign, newSeries, thiocyanate } from './support/measuring'
import { signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let place: { project: string, campaign: string, lab: string }
let series: Series

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  place = await newCampaign(owner, 'A project, "to take away"')
  const batch = (await owner.post(`/api/v1/campaigns/${place.campaign}/batches`).send({ label: '=4 March, morning', measuredOn: '2026-03-04' }).expect(201)).body.id
  const id = await newSeries(place)
  const first = (await owner.post(`/api/v1/series/${id}/revisions`).send({
    from: null,
    changes: [
      ...thiocyanate.map(([x, y]) => ({ kind: 'add', x: x + 1 / 3, y: y + 1e-9, n: 3, sd: 0.1 / 3, batch })),
      { kind: 'add', x: 2, y: 26.5, note: '=1+1, a "quoted" note', batch, direction: 'cooling' },
      { kind: 'add', x: 3, y: 4, limit: 'below', batch },
    ],
    batches: [{ batch, from: null, changes: [{ kind: 'add', x: 0, y: 31.01, n: 3, note: '-' }] }],
  }).expect(201)).body as Series
  const target = first.readings.find(({ blank }) => !blank)!
  series = seriesContract.parse((await owner.post(`/api/v1/series/${id}/revisions`).send({ from: 1, changes: [{ kind: 'set-aside', reading: target.id, reason: '\'bubble\', seen at 31 °C' }] }).expect(201)).body)
})

const take = (query: string) => owner.get(`/api/v1/series/${series.id}/export?${query}`)
const essence = ({ readings }: Series) => readings.map(({ x, y, sd, n, direction, limit, batch, note, setAside, blank }) => [x, y, sd, n, direction, limit, batch?.label, note, setAside?.reason ?? null, blank])

describe('a series taken away', () => {
  it('as CSV names its revision, engine and day, and is a file to save', async () => {
    const answer = await take('format=csv').expect(200)
    expect(answer.headers).toMatchObject({ 'content-type': 'text/csv; charset=utf-8', 'x-content-type-options': 'nosniff', 'cache-control': 'no-store' })
    expect(answer.headers['content-disposition']).toMatch(/^attachment; filename="NaSCN Norrvik spring r2-readings\.csv"/)
    expect(answer.text.split('\r\n')[0]).toMatch(new RegExp(`revision 2; engine ${engine.version.replaceAll('.', '\\.')}; \\d{4}-\\d\\d-\\d\\d`))
  })

  it('comes back by import digit for digit, without a question', async () => {
    const { text } = await take('format=csv').expect(200)
    const other = (await owner.post(`/api/v1/projects/${place.project}/campaigns`).send({ name: 'back again' }).expect(201)).body.id
    const made = importContract.parse((await owner.post(`/api/v1/campaigns/${other}/imports`).attach('file', Buffer.from(text), 'back.csv').expect(201)).body)
    expect(made.questions).toEqual([])
    expect(made.rows).toMatchObject({ ready: series.readings.length, toDecide: 0, unreadable: 0 })
    const done = committedContract.parse((await owner.post(`/api/v1/imports/${made.id}/commit`).expect(201)).body)
    const back = seriesContract.parse((await owner.get(`/api/v1/series/${done.series[0]!.id}`).expect(200)).body)
    expect(essence(back)).toEqual(essence(series))
    expect(back.fit!.parameters).toEqual(series.fit!.parameters)
  })

  it('as a workbook comes back, too', async () => {
    const { body } = await take('format=xlsx').buffer().parse((response, done) => {
      const pieces: Buffer[] = []
      response.on('data', (piece: Buffer) => pieces.push(piece))
      response.on('end', () => done(null, Buffer.concat(pieces)))
    }).expect(200)
    const other = (await owner.post(`/api/v1/projects/${place.project}/campaigns`).send({ name: 'back by workbook' }).expect(201)).body.id
    const made = importContract.parse((await owner.post(`/api/v1/campaigns/${other}/imports`).attach('file', body as Buffer, 'back.xlsx').expect(201)).body)
    const done = committedContract.parse((await owner.post(`/api/v1/imports/${made.id}/commit`).expect(201)).body)
    const back = seriesContract.parse((await owner.get(`/api/v1/series/${done.series[0]!.id}`).expect(200)).body)
    expect(essence(back)).toEqual(essence(series))
  })

  it.each([['csv&of=constants', 'lab,campaign,salt,revision'], ['md', '| lab | campaign |'], ['tex', '\\begin{tabular}']])('gives its constants as %s', async (format, piece) => {
    const { text } = await take(`format=${format}`).buffer().parse((response, done) => {
      let all = ''
      response.setEncoding('utf8')
      response.on('data', (more: string) => all += more)
      response.on('end', () => done(null, all))
    }).expect(200).then(answer => ({ text: String(answer.body) }))
    expect(text).toContain(piece)
    expect(text).toContain('Bmax')
    expect(text).toContain(engine.version)
  })

  it('of an unknown format is refused', async () => {
    await take('format=doc').expect(400)
  })
})

describe('a project taken away', () => {
  it('holds every reading once, with lab and campaign', async () => {
    const { text } = await owner.get(`/api/v1/projects/${place.project}/export`).expect(200)
    const rows = text.trim().split('\r\n')
    expect(rows[1]).toMatch(/^lab,campaign,salt,concentration \(mol\/L\),/)
    expect(rows.slice(2).every((row: string) => row.startsWith('Norrvik,'))).toBe(true)
  })

  it('that measured nothing says so', async () => {
    const empty = (await owner.post('/api/v1/projects').send({ name: 'empty' }).expect(201)).body.id
    await owner.get(`/api/v1/projects/${empty}/export`).expect(404)
  })
})
