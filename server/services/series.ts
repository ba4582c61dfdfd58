import { and, asc, desc, eq, gt, isNull } from 'drizzle-orm'
import type { Series, SeriesSummary } from '#shared/contracts/series'
import { ScienceError } from '#shared/science/errors'
import { pointsOf, usualOptions } from '#shared/science/fitting'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, lab, person, project, sample, series, seriesRevision, stock } from '~~/server/database/schema'
import { batchesIn } from './campaign-content'
import { conditionsOf } from './conditions'
import { ServiceError } from './errors'
import { compareInPool } from './fit-pool'
import { currentFits } from './fits'
import { cursorOf, pageOf, type Page } from './pages'
import { mayEdit, roleIn } from './projects'
import { contentOf, type SeriesContent } from './series-content'

const heads = (tx: Transaction) => tx
  .select({ series, campaign, lab, stock, sample, project: { id: project.id, name: project.name } })
  .from(series)
  .innerJoin(project, eq(project.id, series.project))
  .innerJoin(campaign, eq(campaign.id, series.campaign))
  .innerJoin(lab, eq(lab.id, campaign.lab))
  .leftJoin(stock, eq(stock.id, series.stock))
  .leftJoin(sample, eq(sample.id, campaign.sample))
  .$dynamic()
type Head = Awaited<ReturnType<typeof heads>>[number]

/** The series of a project with their newest readings and fits, in the order they were made. */
export function listSeries(who: string, id: string, page: Page) {
  return asPerson(who, async (tx) => {
    const rows = await heads(tx)
      .where(and(eq(series.project, id), isNull(series.deletedAt), page.cursor ? gt(series.id, cursorOf(page.cursor)) : undefined))
      .orderBy(asc(series.id)).limit(page.limit + 1)
    const { items, nextCursor } = pageOf(rows.map(head => ({ id: head.series.id, head })), page.limit)
    const contents = await contentOf(tx, items.map(item => item.id))
    const fits = await currentFits(tx, [...contents.values()].flatMap(({ revision }) => revision?.id ?? []))
    return { items: items.map(({ head }) => summaryOf(head, contents.get(head.series.id)!, fits)), nextCursor }
  })
}

function summaryOf(head: Head, content: SeriesContent, fits: Awaited<ReturnType<typeof currentFits>>): SeriesSummary {
  return {
    id: head.series.id,
    salt: saltOf(head),
    campaign: campaignOf(head),
    stock: stockOf(head, content.firstDay),
    revision: content.revision?.number ?? null,
    readings: content.readings.map(({ id, x, y, limit, setAside, blank }) => ({ id, x, y, limit, setAside: setAside !== null, blank })),
    fit: (content.revision && fits.get(content.revision.id)) ?? null,
  }
}

/** One series: readings, current fit, how the models compare, revisions. */
export async function showSeries(who: string, id: string): Promise<Series> {
  const { head, role, content, batches, fits, revisions } = await asPerson(who, tx => readSeries(tx, who, id))
  return {
    id,
    project: head.project,
    salt: saltOf(head),
    campaign: { ...campaignOf(head), conditions: conditionsOf(head) },
    stock: stockOf(head, content.firstDay),
    canEdit: mayEdit(role),
    revision: content.revision?.number ?? null,
    choice: content.revision?.choice ?? null,
    batches,
    readings: content.readings,
    fit: (content.revision && fits.get(content.revision.id)) ?? null,
    support: await supportFor(content),
    revisions,
  }
}

async function readSeries(tx: Transaction, who: string, id: string) {
  const [found] = await heads(tx).where(eq(series.id, id))
  const content = (await contentOf(tx, [id])).get(id)!
  const fits = await currentFits(tx, content.revision ? [content.revision.id] : [])
  const role = await roleIn(tx, who, found!.project.id)
  return { head: found!, role, content, fits, batches: await batchesIn(tx, found!.campaign.id), revisions: await revisionsOf(tx, id) }
}

async function revisionsOf(tx: Transaction, id: string): Promise<Series['revisions']> {
  const rows = await tx.select({ number: seriesRevision.number, summary: seriesRevision.summary, by: person.name, at: seriesRevision.createdAt })
    .from(seriesRevision).leftJoin(person, eq(person.id, seriesRevision.madeBy))
    .where(eq(seriesRevision.series, id)).orderBy(desc(seriesRevision.number))
  return rows.map(({ by, at, ...row }) => ({ ...row, by: by ?? 'a former member', at: at.toISOString() }))
}

async function supportFor(content: SeriesContent): Promise<Series['support']> {
  const points = pointsOf(content.readings)
  if (points.length === 0) return { verdict: null, models: [] }
  try {
    const { verdict, models } = await compareInPool({ ...usualOptions(points), points })
    return { verdict, models }
  }
  catch (error) {
    // Readings that no model takes, or a busy machine, are no failure of the page: it shows them without a comparison.
    if (error instanceof ScienceError || error instanceof ServiceError) return { verdict: null, models: [] }
    throw error
  }
}

function saltOf({ series: { saltFormula, saltName, anion, cation } }: Head) {
  return { formula: saltFormula, name: saltName, anion, cation }
}

function campaignOf({ campaign: { id, name, clouds }, lab }: Head) {
  return { id, name, clouds, lab: { id: lab.id, name: lab.name } }
}

const millisecondsPerMonth = 365.25 / 12 * 86_400_000

function stockOf({ stock: used }: Head, firstDay: string | null): SeriesSummary['stock'] {
  if (!used) return null
  const age = used.madeOn && firstDay ? (Date.parse(firstDay) - Date.parse(used.madeOn)) / millisecondsPerMonth : null
  return { id: used.id, lot: used.lot, madeOn: used.madeOn, ageAtUse: age }
}
