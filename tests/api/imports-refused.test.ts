import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { strToU8, Zip, ZipDeflate, zipSync } from 'fflate'
import { beforeAll, describe, expect, it } from 'vitest'
import { refusedFiles } from '../unit/tables/expected-files'
import { clearCounters } from './support/database'
import { newCampaign } from './support/measuring'
import { signedInAs } from './support/server'

let owner: Awaited<ReturnType<typeof signedInAs>>
let campaign: string

beforeAll(async () => {
  await clearCounters()
  owner = await signedInAs('owner')
  campaign = (await newCampaign(owner, 'A project of refused files')).campaign
})

const upload = (bytes: Uint8Array, name: string) => owner.post(`/api/v1/campaigns/${campaign}/imports`).attach('file', Buffer.from(bytes), name)
const fixture = (name: string) => readFileSync(fileURLToPath(new URL(`../fixtures/tables/${name}`, import.meta.url)))

/** A workbook whose one sheet is a gigabyte of zeros, made piece by piece. */
function bomb(): Uint8Array {
  const pieces: Uint8Array[] = []
  const zip = new Zip((_, piece) => void pieces.push(piece))
  const sheet = new ZipDeflate('xl/worksheets/sheet1.xml', { level: 9 })
  zip.add(sheet)
  const megabytes = 1_024
  const zeros = new Uint8Array(1_048_576)
  for (let count = 1; count <= megabytes; count++) sheet.push(zeros, count === megabytes)
  zip.end()
  return Buffer.concat(pieces)
}

describe('a file that cannot be taken', () => {
  it.each(refusedFiles)('is refused with what to do: $file', async ({ file }) => {
    const { body } = await upload(fixture(file), file).expect(400)
    expect(body.detail.length).toBeGreaterThan(20)
    expect(body.errors[0]).toMatchObject({ path: 'file' })
  })

  it('that is a damaged workbook says so', async () => {
    const { body } = await upload(Buffer.concat([Buffer.from([0x50, 0x4B, 0x03, 0x04]), Buffer.alloc(300, 7)]), 'broken.xlsx').expect(400)
    expect(body.detail).toMatch(/damaged/)
  })

  it('that is a packed file without a workbook in it says so', async () => {
    const { body } = await upload(zipSync({ 'readme.txt': strToU8('hello') }), 'packed.xlsx').expect(400)
    expect(body.detail).toMatch(/damaged/)
  })

  it('that unpacks to a gigabyte is refused without being unpacked', async () => {
    const { body } = await upload(bomb(), 'bomb.xlsx').expect(413)
    expect(body.detail).toMatch(/100 MB/)
  })

  it('of 12 MB is refused by its size', async () => {
    const { body } = await upload(Buffer.alloc(12_000_000, 'a,1\n'), 'large.csv').expect(413)
    expect(body.detail).toMatch(/10 MB/)
  })

  it('of 200,000 rows is refused by the limit of 50,000', async () => {
    const rows = Array.from({ length: 200_000 }, (_, index) => `NaCl,${(index % 100) / 100},31.${index % 10}`)
    const { body } = await upload(Buffer.from(`salt,conc (M),T (°C)\n${rows.join('\n')}`), 'long.csv').expect(413)
    expect(body.detail).toMatch(/50,000 rows/)
  })

  it('that is missing from its form is asked for', async () => {
    const { body } = await owner.post(`/api/v1/campaigns/${campaign}/imports`).field('note', 'no file').expect(400)
    expect(body.errors[0]).toMatchObject({ path: 'file' })
  })

  it('in a body of another type is told the type', async () => {
    await owner.post(`/api/v1/campaigns/${campaign}/imports`).set('content-type', 'text/csv').send('a,b').expect(415)
  })
})
