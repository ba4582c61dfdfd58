import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import type { FitChoice, Series } from '#shared/contracts/series'
import { entersFit } from '#shared/science/fitting'
import type { Transaction } from '~~/server/database/client'
import { batch, batchRevision, batchRevisionReading, campaign, fit, fitBlank, fitRevision, person, reading, revisionReading, series, seriesRevision, upload } from '~~/server/database/schema'

type ListedReading = Series['readings'][number]

/** The newest revision of a series with what it holds: the blanks of its batches first, then its own readings. */
export interface SeriesContent {
  revision: { id: string, number: number, choice: FitChoice | null } | null
  readings: ListedReading[]
  /** Day of the earliest batch; null where no batch is dated. */
  firstDay: string | null
  /** The states of the blanks it uses. */
  blankRevisions: string[]
}

const earlier = alias(reading, 'earlier')
const fields = {
  id: reading.id, x: reading.concentration, y: reading.value, sd: reading.sd, n: reading.n,
  direction: reading.direction, limit: reading.limit, note: reading.note, origin: reading.origin, file: upload.name,
  batch: reading.batch, batchLabel: batch.label, batchDay: batch.measuredOn,
  replaces: { x: earlier.concentration, y: earlier.value, sd: earlier.sd, n: earlier.n }, changeReason: reading.changeReason, changeWords: reading.changeWords,
}
const originUpload = sql`(${reading.origin} ->> 'upload')::uuid`

interface Pinned { revision: string, batch: string | null, batchLabel: string | null, batchDay: string | null, reason: string | null, by: string | null, at: Date | null }
type Row = Pinned & Omit<Awaited<ReturnType<typeof pinnedReadings>>[number], keyof Pinned>

const heads = {
  id: seriesRevision.id, series: seriesRevision.series, number: seriesRevision.number, choice: seriesRevision.choice, clouds: campaign.clouds,
}

/** Reads the newest revisions of many series in three queries. */
export async function contentOf(tx: Transaction, ids: readonly string[]): Promise<Map<string, SeriesContent>> {
  if (ids.length === 0) return new Map()
  const revisions = await tx.selectDistinctOn([seriesRevision.series], heads)
    .from(seriesRevision).innerJoin(series, eq(series.id, seriesRevision.series)).innerJoin(campaign, eq(campaign.id, series.campaign))
    .where(inArray(seriesRevision.series, [...ids]))
    .orderBy(seriesRevision.series, desc(seriesRevision.number))
  const own: Row[] = await pinnedReadings(tx, revisions.map(({ id }) => id))
  const blanks = await blanksOf(tx, [...new Set(own.flatMap(row => row.batch ?? []))])
  return new Map(ids.map((id) => {
    const revision = revisions.find(one => one.series === id)
    return [id, assemble(revision, own.filter(row => row.revision === revision?.id), blanks)]
  }))
}

/** The newest state of a batch's blanks. */
export async function blanksIn(tx: Transaction, of: string): Promise<ListedReading[]> {
  const [head] = await tx.select({ clouds: campaign.clouds }).from(batch).innerJoin(campaign, eq(campaign.id, batch.campaign)).where(eq(batch.id, of))
  const rows: Row[] = await blanksOf(tx, [of])
  return rows.map((row, index) => ({ ...readingOf(row, head!.clouds), number: index + 1, blank: true }))
}

/** One revision with its own readings and the blanks its newest fit used; undefined where there is none of that number. */
export async function earlierContent(tx: Transaction, id: string, number: number): Promise<SeriesContent | undefined> {
  const [revision] = await tx.select(heads)
    .from(seriesRevision).innerJoin(series, eq(series.id, seriesRevision.series)).innerJoin(campaign, eq(campaign.id, series.campaign))
    .where(and(eq(seriesRevision.series, id), eq(seriesRevision.number, number)))
  if (!revision) return undefined
  const own: Row[] = await pinnedReadings(tx, [revision.id])
  return assemble(revision, own, await blanksFitted(tx, revision.id))
}

function pinnedReadings(tx: Transaction, revisions: string[]) {
  return tx.select({
    ...fields, revision: revisionReading.revision, reason: revisionReading.setAsideReason, at: revisionReading.setAsideAt, by: person.name,
  }).from(revisionReading)
    .innerJoin(reading, eq(reading.id, revisionReading.reading))
    .leftJoin(earlier, eq(earlier.id, reading.replaces))
    .leftJoin(upload, eq(upload.id, originUpload))
    .leftJoin(batch, eq(batch.id, reading.batch))
    .leftJoin(person, eq(person.id, revisionReading.setAsideBy))
    .where(inArray(revisionReading.revision, revisions))
    .orderBy(revisionReading.revision, asc(revisionReading.number))
}

/** The blanks of the newest revision of each batch, those set aside among them. */
function blanksOf(tx: Transaction, batches: string[]) {
  const newest = tx.selectDistinctOn([batchRevision.batch], { id: batchRevision.id }).from(batchRevision)
    .where(inArray(batchRevision.batch, batches)).orderBy(batchRevision.batch, desc(batchRevision.number)).as('newest')
  return tx.select({
    ...fields, revision: batchRevisionReading.revision, reason: batchRevisionReading.setAsideReason, at: batchRevisionReading.setAsideAt, by: person.name,
  }).from(newest)
    .innerJoin(batchRevisionReading, eq(batchRevisionReading.revision, newest.id))
    .innerJoin(reading, eq(reading.id, batchRevisionReading.reading))
    .leftJoin(earlier, eq(earlier.id, reading.replaces))
    .leftJoin(upload, eq(upload.id, originUpload))
    .innerJoin(batch, eq(batch.id, reading.batch))
    .leftJoin(person, eq(person.id, batchRevisionReading.setAsideBy))
    .orderBy(asc(batch.measuredOn), asc(batch.id), asc(batchRevisionReading.number))
}

/** The blanks that the newest fit of a revision used. */
async function blanksFitted(tx: Transaction, revision: string): Promise<Row[]> {
  const newest = tx.select({ id: fit.id }).from(fit).innerJoin(fitRevision, eq(fitRevision.fit, fit.id))
    .where(eq(fitRevision.revision, revision)).orderBy(desc(fit.createdAt), desc(fit.id)).limit(1)
  const rows = await tx.select({ ...fields, revision: sql<string>`''` }).from(fitBlank)
    .innerJoin(reading, eq(reading.id, fitBlank.reading))
    .leftJoin(earlier, eq(earlier.id, reading.replaces))
    .leftJoin(upload, eq(upload.id, originUpload))
    .innerJoin(batch, eq(batch.id, reading.batch))
    .where(eq(fitBlank.fit, newest)).orderBy(asc(batch.measuredOn), asc(batch.id), asc(reading.id))
  return rows.map(row => ({ ...row, reason: null, at: null, by: null }))
}

interface Revision { id: string, number: number, choice: FitChoice | null, clouds: typeof campaign.$inferSelect.clouds }

function assemble(revision: Revision | undefined, own: Row[], allBlanks: Row[]): SeriesContent {
  const batches = new Set(own.map(row => row.batch))
  const blanks = allBlanks.filter(row => batches.has(row.batch))
  const listed = [...blanks.map(row => ({ row, blank: true })), ...own.map(row => ({ row, blank: false }))]
  const days = own.flatMap(row => row.batchDay ?? []).sort()
  return {
    revision: revision ? { id: revision.id, number: revision.number, choice: revision.choice } : null,
    readings: listed.map(({ row, blank }, index) => ({ ...readingOf(row, revision?.clouds), number: index + 1, blank })),
    firstDay: days[0] ?? null,
    blankRevisions: [...new Set(blanks.map(row => row.revision))].sort(),
  }
}

function readingOf(row: Row, clouds: Revision['clouds'] | undefined): Omit<ListedReading, 'number' | 'blank'> {
  const { id, x, y, sd, n, direction, limit, note, batch, batchLabel, reason, by, at, changeReason, changeWords } = row
  return {
    id, x, y, sd, n, direction, limit, note,
    batch: batch ? { id: batch, label: batchLabel ?? '' } : null,
    setAside: reason && at ? { reason, by: by ?? 'a former member', at: at.toISOString() } : null,
    entersFit: entersFit({ limit, direction, setAside: reason }, clouds),
    changed: row.replaces && changeReason ? { ...row.replaces, reason: changeReason, words: changeWords } : null,
    origin: originInWords(row),
  }
}

function originInWords({ origin, file }: Row): string {
  if (origin.kind === 'file') return `${file ?? 'a file'}, row ${origin.row}`
  return origin.kind === 'demonstration' ? 'invented for the demonstration' : origin.kind
}
