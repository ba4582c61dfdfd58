import writeWorkbook from 'write-excel-file/node'
import { beforeAll, describe, expect, it } from 'vitest'
import { committedContract, importContract, type TableImport } from '#shared/contracts/imports'
import { seriesContract } from '#shared/contracts/series'
import { asOwner, clearCounters, personId } from './support/database'
import { newCampaign, thiocyanate } from './support/measuring'
import { people, signedInAs } from './support/server'

type Agent = Awaited<ReturnType<typeof signedInAs>>
let owner: Agent
let place: { project: string, campaign: string, lab: string }

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  place = await newCampaign(owner, 'A project of imports')
})

async function freshCampaign(name: string): Promise<string> {
  return (await owner.post(`/api/v1/projects/${place.project}/campaigns`).send({ name }).expect(201)).body.id
}

const upload = (campaign: string, content: string | Buffer, name: string, agent = owner) =>
  agent.post(`/api/v1/campaigns/${campaign}/imports`).attach('file', Buffer.from(content), name)
const paste = (campaign: string, text: string) => owner.post(`/api/v1/campaigns/${campaign}/imports`).send({ text })
const change = (id: string, body: object) => owner.patch(`/api/v1/imports/${id}`).send(body)
const commit = (id: string, body?: object) => owner.post(`/api/v1/imports/${id}/commit`).send(body)

function checked(body: unknown): TableImport {
  const parsed = importContract.parse(body)
  const { total, ready, toDecide, unreadable, kept } = parsed.rows
  expect(ready + toDecide + unreadable + kept).toBe(total)
  return parsed
}
const pathsOf = (body: { errors: { path: string }[] }) => body.errors.map(({ path }) => path).sort()

const long = ['salt,conc (mol/L),T (°C),sd,n', 'blank,0,31.0,0.03,3', 'blank,0,31.02,0.03,3',
  ...thiocyanate.map(([x, y]) => `NaSCN,${x},${y},0.03,3`), ...[0.1, 0.2, 0.4, 0.8].map(x => `sodium chloride,${x},${31 - 10 * x},0.03,3`)].join('\n')

/** As a lab hands it over (invented). */
const ugly = `conc,salt,Tcp up,Tcp dn,±,measured,remarks
0,blank,31.02,30.70,0.03,04.03.26,
50 mM,NaSCN,31.56,31.22,0.03,04.03.26,
0.08,NaSCN,31.69,31.33,0.03,04.03.26,
0.12,NaSCN,31.91,31.57,0.03,04.03.26,
"0,16",NaSCN,"31,98","31,66","0,03",05.03.26,new cell
0.35,NaSNC,31.97,31.60,0.03,05.03.26,
0.40,NaSCN,318.6,31.51,0.03,05.03.26,
0.60,NaSCN,31.47,31.12,,06.03.26,bubble?
0.60,NaSCN,31.47,31.12,,06.03.26,bubble?
,,mean,,,,sum row
`

describe('an import', () => {
  it('of a long table becomes series with fits, blanks in their batch', async () => {
    const campaign = await freshCampaign('long')
    const made = checked((await upload(campaign, long, 'norrvik.csv').expect(201)).body)
    expect(made).toMatchObject({ state: 'open', form: 'long', rows: { total: 15, ready: 15 }, readings: 15, file: { name: 'norrvik.csv', by: 'Ines Tamsel' }, series: [] })
    expect(made.columns.map(({ meaning }) => meaning)).toEqual(['salt', 'concentration', 'cloud-point', 'uncertainty', 'samples'])
    const done = committedContract.parse((await commit(made.id).expect(201)).body)
    expect(done.series.map(({ salt, revision, readings, fit }) => [salt.formula, revision, readings, fit?.model])).toEqual([
      ['NaSCN', 1, thiocyanate.length, 'linear-langmuir'], ['NaCl', 1, 4, 'linear'],
    ])
    expect(done.batches).toEqual([expect.objectContaining({ label: 'norrvik.csv', blanks: 2 })])
    const series = seriesContract.parse((await owner.get(`/api/v1/series/${done.series[0]!.id}`).expect(200)).body)
    expect(series.readings.filter(({ blank }) => !blank).map(({ x, y }) => [x, y])).toEqual(thiocyanate)
    expect(series.readings.at(-1)).toMatchObject({ origin: 'norrvik.csv, row 12', n: 3 })
    expect(series.readings.at(-1)!.sd).toBeCloseTo(0.03 / Math.sqrt(3), 12)
    expect(series.fit!.n).toBe(thiocyanate.length + 2)
    expect(checked((await owner.get(`/api/v1/imports/${made.id}`).expect(200)).body)).toMatchObject({ state: 'committed', series: [{ salt: { formula: 'NaSCN' } }, { salt: { formula: 'NaCl' } }] })
  })

  it('of a wide table, tab-separated, has a series a column', async () => {
    const made = checked((await paste(await freshCampaign('wide'), '[M] / M\tNaCl\tNa2SO4\n0\t31.0\t31.0\n0.1\t30\t28\n0.2\t29\t25\n0.4\t27\t19\n').expect(201)).body)
    expect(made).toMatchObject({ form: 'wide', format: 'paste' })
    const { series } = committedContract.parse((await commit(made.id).expect(201)).body)
    expect(series.map(({ salt, readings }) => [salt.formula, readings])).toEqual([['NaCl', 3], ['Na2SO4', 3]])
  })

  it('of a workbook reads the chosen sheet, dates and numbers', async () => {
    const cells = (rows: (string | number | Date | null)[][]) => rows.map(row => row.map(value => value instanceof Date ? { value, type: Date, format: 'yyyy-mm-dd' } : { value }))
    const workbook = await (await writeWorkbook([
      { sheet: 'notes', data: cells([['nothing here'], ['only words']]) },
      { sheet: 'March', data: cells([['salt', 'conc (M)', 'Tcp (°C)', 'date'], ...thiocyanate.map(([x, y]) => ['NaSCN', x, y, new Date('2026-03-04T00:00:00Z')])]) },
    ] as never)).toBuffer()
    const march = checked((await upload(await freshCampaign('workbook'), workbook, 'march.xlsx').expect(201)).body)
    expect(march).toMatchObject({ format: 'xlsx', sheets: ['notes', 'March'], sheet: 'March', rows: { ready: thiocyanate.length } })
    expect((await change(march.id, { sheet: 'notes' }).expect(400)).body.detail).toMatch(/./)
    const { batches, series } = committedContract.parse((await commit(march.id).expect(201)).body)
    expect(batches).toEqual([expect.objectContaining({ label: '2026-03-04' })])
    expect(series[0]!.fit!.parameters.find(({ name }) => name === 'K')!.estimate).toBeGreaterThan(0)
  })

  it('waits for what needs a decision, names it, and takes the decisions', async () => {
    const made = checked((await upload(await freshCampaign('ugly'), ugly, 'ugly.csv').expect(201)).body)
    expect(made.rows).toEqual({ total: 10, ready: 6, toDecide: 2, unreadable: 1, kept: 1 })
    expect(pathsOf((await commit(made.id).expect(400)).body)).toEqual(['questions.uncertainty-meaning.4', 'rows.10', 'rows.7', 'rows.8'])
    expect(made.problems.find(({ row, tone }) => row === 7 && tone === 'decide')).toMatchObject({ code: 'misspelt-salt', suggestion: 'NaSCN' })
    const answered = checked((await change(made.id, {
      answers: [{ code: 'uncertainty-meaning', subject: '4', value: 'standard-uncertainty' }],
      decisions: [{ row: 7, column: 1, action: 'agree' }, { row: 8, column: 2, value: '31.86' }, { row: 10, column: null, action: 'agree' }],
    }).expect(200)).body)
    expect(answered.rows).toMatchObject({ ready: 8, toDecide: 0, unreadable: 0 })
    const { series } = committedContract.parse((await commit(made.id).expect(201)).body)
    expect(series).toEqual([expect.objectContaining({ salt: expect.objectContaining({ formula: 'NaSCN' }), readings: 14 })])
    const { readings, fit } = seriesContract.parse((await owner.get(`/api/v1/series/${series[0]!.id}`).expect(200)).body)
    expect(readings.filter(({ direction }) => direction === 'cooling').every(({ entersFit }) => !entersFit)).toBe(true)
    expect(readings.find(({ x, direction }) => x === 0.4 && direction === 'heating')).toMatchObject({ y: 31.86, sd: 0.03 })
    expect(fit!.n).toBe(8)
    await commit(made.id).expect(409)
  })

  it('shows its rows in pages, and only those that say something', async () => {
    const { id } = checked((await upload(await freshCampaign('rows'), ugly, 'rows.csv').expect(201)).body)
    const first = (await owner.get(`/api/v1/imports/${id}/rows?limit=4`).expect(200)).body
    expect(first).toMatchObject({ items: [{ row: 2 }, { row: 3 }, { row: 4 }, { row: 5 }], next: 5 })
    const rest = (await owner.get(`/api/v1/imports/${id}/rows?after=5`).expect(200)).body
    expect(rest.items).toHaveLength(6)
    expect(rest.next).toBeNull()
    const telling = (await owner.get(`/api/v1/imports/${id}/rows?look=yes&state=to-decide`).expect(200)).body
    expect(telling.items.map(({ row }: { row: number }) => row)).toEqual([7, 10])
  })

  it('takes other meanings of columns', async () => {
    const made = checked((await paste(await freshCampaign('columns'), 'salt,a,b\nNaCl,100,30\nNaCl,200,29\nNaCl,400,27\nNaCl,800,23\n').expect(201)).body)
    const read = checked((await change(made.id, { columns: [{ index: 1, meaning: 'concentration', unit: 'mmol/L' }, { index: 2, meaning: 'cloud-point', unit: '°C' }] }).expect(200)).body)
    expect(read.rows).toMatchObject({ total: 4, ready: 4 })
    const { series } = committedContract.parse((await commit(made.id).expect(201)).body)
    const { readings } = seriesContract.parse((await owner.get(`/api/v1/series/${series[0]!.id}`).expect(200)).body)
    expect(readings.map(({ x }) => x)).toEqual([0.1, 0.2, 0.4, 0.8])
  })

  it('is left, listed and resumed by somebody else of the project', async () => {
    await asOwner(async client => client.query('insert into project_member (project_id, person_id, role) values ($1, $2, \'editor\') on conflict do nothing', [place.project, await personId(people.member)]))
    const { id } = checked((await upload(await freshCampaign('resumed'), ugly, 'left.csv').expect(201)).body)
    const member = await signedInAs('member')
    const { items } = (await member.get(`/api/v1/projects/${place.project}/imports`).expect(200)).body
    expect(items[0]).toMatchObject({ id, name: 'left.csv', state: 'open', by: 'Ines Tamsel' })
    const both = await Promise.all([
      member.patch(`/api/v1/imports/${id}`).send({ decisions: [{ row: 7, column: 1 }] }),
      change(id, { decisions: [{ row: 8, column: 2, value: '31.86' }] }),
    ])
    expect(both.map(({ status }) => status)).toEqual([200, 200])
    expect(checked((await member.get(`/api/v1/imports/${id}`).expect(200)).body).rows).toMatchObject({ toDecide: 1, unreadable: 0 })
    await (await signedInAs('outsider')).get(`/api/v1/imports/${id}`).expect(404)
  })

  it('that is discarded takes no more words, and its file stays', async () => {
    const { id } = checked((await paste(await freshCampaign('discarded'), long).expect(201)).body)
    expect(checked((await owner.post(`/api/v1/imports/${id}/discard`).expect(200)).body).state).toBe('discarded')
    await change(id, { decisions: [] }).expect(409)
    await commit(id).expect(409)
  })

  it('of a file that is there already asks before it doubles the readings', async () => {
    const campaign = await freshCampaign('twice')
    await commit(checked((await upload(campaign, long, 'twice.csv').expect(201)).body).id).expect(201)
    const again = checked((await upload(campaign, long, 'twice.csv').expect(201)).body)
    expect(again.questions.find(({ code }) => code === 'seen-before')).toMatchObject({ isBlocking: true })
    expect(pathsOf((await commit(again.id).expect(400)).body)).toContain('questions.seen-before')
    await change(again.id, { answers: [{ code: 'seen-before', value: 'again' }] }).expect(200)
    const { series } = committedContract.parse((await commit(again.id).expect(201)).body)
    expect(series[0]).toMatchObject({ revision: 2 })
  })

  it('keeps how columns were read as a recipe, and reads the next file of the kind by it', async () => {
    const campaign = await freshCampaign('recipes')
    const table = (y: number) => `anion salt,how much,cloudy at,err\nNaBr,0.1,${y},0.05\nNaBr,0.2,${y - 1},0.05\nNaBr,0.4,${y - 3},0.05\nNaBr,0.8,${y - 7},0.05\n`
    const first = checked((await paste(campaign, table(30)).expect(201)).body)
    await change(first.id, {
      columns: [{ index: 0, meaning: 'salt' }, { index: 1, meaning: 'concentration', unit: 'mol/L' }, { index: 2, meaning: 'cloud-point', unit: '°C' }, { index: 3, meaning: 'uncertainty', uncertaintyMeaning: 'standard-uncertainty' }],
      answers: [{ code: 'uncertainty-meaning', subject: '3', value: 'standard-uncertainty' }],
    }).expect(200)
    await commit(first.id, { recipe: 'bench book' }).expect(201)
    const second = checked((await paste(campaign, table(30.5)).expect(201)).body)
    expect(second).toMatchObject({ recipe: { name: 'bench book' }, rows: { ready: 4 } })
    expect(second.questions.filter(({ isBlocking }) => isBlocking)).toEqual([])
  })
})

describe('two imports at once into one campaign', () => {
  it('add to one series a salt, as revisions 1 and 2', async () => {
    const campaign = await freshCampaign('at once')
    const [a, b] = await Promise.all([long, long.replaceAll('31.', '32.')].map(async (table, index) => checked((await upload(campaign, table, `at-once-${index}.csv`).expect(201)).body).id))
    const answers = await Promise.all([commit(a!), commit(b!)])
    expect(answers.map(({ status }) => status)).toEqual([201, 201])
    const [first, second] = answers.map(({ body }) => committedContract.parse(body))
    expect(first!.series.map(({ id }) => id)).toEqual(second!.series.map(({ id }) => id))
    expect([first!.series[0]!.revision, second!.series[0]!.revision].sort()).toEqual([1, 2])
  })
})

describe('a commit that breaks half-way', () => {
  it('leaves nothing behind', async () => {
    const campaign = await freshCampaign('half-way')
    const { id } = checked((await upload(campaign, long, 'half.csv').expect(201)).body)
    // A fit is the last thing a commit writes; without the right to it everything before must go.
    await asOwner(client => client.query('revoke insert on fit from anionary_app'))
    await commit(id).expect(500)
    await asOwner(client => client.query('grant insert on fit to anionary_app'))
    const left = (await owner.get(`/api/v1/campaigns/${campaign}`).expect(200)).body
    expect([left.series, left.batches]).toEqual([[], []])
    await commit(id).expect(201)
  })
})
