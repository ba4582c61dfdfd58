import { and, asc, desc, eq, inArray, isNull } from 'drizzle-orm'
import type { Series } from '#shared/contracts/series'
import type { Transaction } from '~~/server/database/client'
import { batch, person, reading, revisionReading, seriesRevision } from '~~/server/database/schema'

type ListedReading = Series['readings'][number]

/** The newest revision of a series with what it holds: the blanks of its batches first, then its own readings. */
export interface SeriesContent {
  revision: { id: string, number: number } | null
  readings: ListedReading[]
  /** Day of the earliest batch; null where no batch is dated. */
  firstDay: string | null
}

const fields = {
  id: reading.id, x: reading.concentration, y: reading.value, sd: reading.sd, n: reading.n,
  direction: reading.direction, limit: reading.limit, note: reading.note,
  batch: reading.batch, batchLabel: batch.label, batchDay: batch.measuredOn,
}
type Row = Awaited<ReturnType<typeof blanksOf>>[number]

/** Reads the newest revisions of many series in three queries. */
export async function contentOf(tx: Transaction, series: readonly string[]): Promise<Map<string, SeriesContent>> {
  if (series.length === 0) return new Map()
  const revisions = await tx.selectDistinctOn([seriesRevision.series], { id: seriesRevision.id, series: seriesRevision.series, number: seriesRevision.number })
    .from(seriesRevision).where(inArray(seriesRevision.series, [...series]))
    .orderBy(seriesRevision.series, desc(seriesRevision.number))
  const own = await pinnedReadings(tx, revisions.map(({ id }) => id))
  const blanks = await blanksOf(tx, [...new Set(own.flatMap(row => row.batch ?? []))])
  return new Map(series.map((id) => {
    const revision = revisions.find(one => one.series === id)
    return [id, assemble(revision, own.filter(row => row.revision === revision?.id), blanks)]
  }))
}

function pinnedReadings(tx: Transaction, revisions: string[]) {
  return tx.select({
    ...fields, revision: revisionReading.revision, reason: revisionReading.setAsideReason, at: revisionReading.setAsideAt, by: person.name,
  }).from(revisionReading)
    .innerJoin(reading, eq(reading.id, revisionReading.reading))
    .leftJoin(batch, eq(batch.id, reading.batch))
    .leftJoin(person, eq(person.id, revisionReading.setAsideBy))
    .where(inArray(revisionReading.revision, revisions))
    .orderBy(revisionReading.revision, asc(revisionReading.number))
}

function blanksOf(tx: Transaction, batches: string[]) {
  return tx.select(fields).from(reading)
    .innerJoin(batch, eq(batch.id, reading.batch))
    .where(and(isNull(reading.series), inArray(reading.batch, batches)))
    .orderBy(asc(batch.measuredOn), asc(reading.id))
}

type OwnRow = Awaited<ReturnType<typeof pinnedReadings>>[number]

function assemble(revision: { id: string, number: number } | undefined, own: OwnRow[], allBlanks: Row[]): SeriesContent {
  const batches = new Set(own.map(row => row.batch))
  const blanks = allBlanks.filter(row => batches.has(row.batch))
  const listed = [
    ...blanks.map(row => ({ row, blank: true, setAside: null })),
    ...own.map(row => ({ row, blank: false, setAside: setAsideOf(row) })),
  ]
  const days = own.flatMap(row => row.batchDay ?? []).sort()
  return {
    revision: revision ? { id: revision.id, number: revision.number } : null,
    readings: listed.map(({ row: { batch, batchLabel, batchDay: _, ...row }, blank, setAside }, index) => ({
      ...pick(row), number: index + 1, blank, setAside, batch: batch ? { id: batch, label: batchLabel ?? '' } : null,
    })),
    firstDay: days[0] ?? null,
  }
}

function pick({ id, x, y, sd, n, direction, limit, note }: Omit<Row, 'batch' | 'batchLabel' | 'batchDay'>) {
  return { id, x, y, sd, n, direction, limit, note }
}

function setAsideOf({ reason, by, at }: OwnRow): ListedReading['setAside'] {
  return reason && at ? { reason, by: by ?? 'a former member', at: at.toISOString() } : null
}
