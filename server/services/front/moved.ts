import { and, desc, eq, isNull, lte } from 'drizzle-orm'
import type { ProjectFront } from '#shared/contracts/front'
import type { FitResult } from '#shared/science/fitting/types'
import type { Transaction } from '~~/server/database/client'
import { campaign, fit, fitResult, fitRevision, lab, series, seriesRevision } from '~~/server/database/schema'

type Moved = ProjectFront['moved'][number]
/** The constant that matters most of a fit: K where it binds, else the slope. */
const leading = ['K', 'c']
const most = 6

/** Leading constants that are others now than they were then, those that moved by most of their standard errors first. */
export async function movedSince(tx: Transaction, project: string, since: Date | null): Promise<Moved[]> {
  if (!since) return []
  const [now, then] = [await newestFits(tx, project), await newestFits(tx, project, since)]
  const moved = [...now].flatMap(([id, after]) => {
    const before = then.get(id)
    return before && before.fit !== after.fit ? shiftOf(after, before.result) : []
  })
  return moved.sort((a, b) => b.inErrors - a.inErrors).slice(0, most).map(({ inErrors: _, ...row }) => row)
}

type Newest = Awaited<ReturnType<typeof newestFits>> extends Map<string, infer Row> ? Row : never

/** The newest fit of every series, as of an instant. */
async function newestFits(tx: Transaction, project: string, until?: Date) {
  const rows = await tx.selectDistinctOn([series.id], {
    id: series.id, fit: fit.id, result: fitResult.result,
    salt: { formula: series.saltFormula, name: series.saltName, anion: series.anion, cation: series.cation },
    campaign: { id: campaign.id, name: campaign.name }, lab: { id: lab.id, name: lab.name },
  }).from(series)
    .innerJoin(campaign, eq(campaign.id, series.campaign)).innerJoin(lab, eq(lab.id, campaign.lab))
    .innerJoin(seriesRevision, eq(seriesRevision.series, series.id))
    .innerJoin(fitRevision, eq(fitRevision.revision, seriesRevision.id))
    .innerJoin(fit, eq(fit.id, fitRevision.fit)).innerJoin(fitResult, eq(fitResult.fit, fit.id))
    .where(and(eq(series.project, project), isNull(series.deletedAt), eq(fitResult.kind, 'estimate'), until ? lte(fit.createdAt, until) : undefined))
    .orderBy(series.id, desc(seriesRevision.number), desc(fit.createdAt), desc(fit.id), fitResult.createdAt)
  return new Map(rows.map(row => [row.id, { ...row, result: row.result as FitResult }]))
}

const constantOf = ({ parameters }: FitResult, name: string) => parameters.find(parameter => parameter.name === name && parameter.estimate !== null)

function shiftOf({ id, salt, campaign: { id: of, name: called }, lab: by, result }: Newest, earlier: FitResult): (Moved & { inErrors: number })[] {
  const name = leading.find(one => constantOf(result, one) && constantOf(earlier, one))
  if (!name) return []
  const [now, before] = [constantOf(result, name)!, constantOf(earlier, name)!]
  if (now.estimate === before.estimate) return []
  const error = now.standardError ?? before.standardError
  const written = ({ estimate, standardError }: typeof now) => ({ estimate: estimate!, standardError })
  return [{
    series: id, salt, campaign: { id: of, name: called, lab: by }, name, unit: now.unit, before: written(before), now: written(now),
    inErrors: error ? Math.abs(now.estimate! - before.estimate!) / error : 0,
  }]
}
